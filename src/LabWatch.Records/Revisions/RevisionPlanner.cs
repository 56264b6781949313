using System.Text.Json.Nodes;
using LabWatch.Lab.Findings;
using LabWatch.Lab.LabFile;
using LabWatch.Lab.Time;

namespace LabWatch.Records.Revisions;

/// <summary>Checks one new revision against the records of its site.</summary>
internal static class RevisionPlanner
{
    private const string InstrumentMember = "instrument";

    /// <summary>The outcome, with the new revision but not yet recorded.</summary>
    public static RevisionOutcome Plan(LabRecordSet records, RevisionOrder order)
    {
        if (records.Revisions.Count == 0)
        {
            return RevisionOutcome.Conflicting(new Finding("no-lab", "request", "No lab file has been imported yet.", null, "Try again when the lab file is on record."));
        }

        JsonObject document = LabComposition.Compose(records.Revisions, records.LatestImport?.Digest);
        (string? pointer, Finding? misplaced) = Insert(document, order);
        if (pointer is null)
        {
            return RevisionOutcome.Wrong(misplaced!);
        }

        IReadOnlyList<Finding> findings = LabFileReader.Read(LabDocument.Write(document)).Findings;
        IReadOnlyList<Finding> wrong = [.. findings.Where(finding => finding.Code != "repeated-id" || finding.Value is null || !finding.Value.Contains('@', StringComparison.Ordinal))];
        return wrong.Count > 0 ? RevisionOutcome.Wrong([.. wrong.Select(finding => Within(finding, pointer))]) : Number(records, order);
    }

    private static RevisionOutcome Number(LabRecordSet records, RevisionOrder order)
    {
        LabEntry entry = LabEntry.Of(order.Kind, order.Content);
        RecordRevision[] history = [.. records.Revisions
            .Where(revision => revision.Kind == entry.Kind && string.Equals(revision.Id, entry.Id, StringComparison.Ordinal))
            .OrderBy(revision => revision.Revision)];
        string text = RevisionDigest.Text(entry.Content);
        RecordRevision? same = Array.Find(history, revision => revision.Revision == entry.Revision);
        if (same is not null && string.Equals(same.Digest, RevisionDigest.Of(text), StringComparison.Ordinal))
        {
            return new RevisionOutcome([], null, same, false, records);
        }

        int next = history.Length == 0 ? 1 : history[^1].Revision + 1;
        if (entry.Revision != next)
        {
            return RevisionOutcome.Conflicting(new Finding(
                "revision-not-next", "/revision", FormattableString.Invariant($"The next revision of {entry.Id} is {next}."), FormattableString.Invariant($"{entry.Revision}"),
                history.Length == 0 ? "Give a new one revision 1." : "Look at the revisions on record, then give the next one: no record is overwritten."));
        }

        RecordRevision revision = new(
            records.Site, entry.Kind, entry.Id, next, records.Sequence + 1, EffectiveFrom(entry), order.Author, order.Reason, order.At, text, RevisionDigest.Of(text), null);
        return new RevisionOutcome([], null, revision, true, records with { Revisions = [.. records.Revisions, revision] });
    }

    private static Instant EffectiveFrom(LabEntry entry) =>
        Instant.TryParse(
            entry.Content[entry.Kind switch { LabRecordKind.Limit => "effectiveFrom", LabRecordKind.Certificate => "validFrom", _ => "at" }]!.GetValue<string>(),
            out Instant instant) ? instant : default;

    private static (string? Pointer, Finding? Misplaced) Insert(JsonObject document, RevisionOrder order)
    {
        JsonObject content = order.Content.DeepClone().AsObject();
        if (order.Kind == LabRecordKind.Limit)
        {
            return (Append(document, "limits", string.Empty, content), null);
        }

        string? instrument = content[InstrumentMember] is JsonValue value && value.TryGetValue(out string? id) ? id : null;
        JsonArray instruments = document["instruments"]!.AsArray();
        for (int i = 0; i < instruments.Count; i++)
        {
            if (string.Equals(instruments[i]!["id"]!.GetValue<string>(), instrument, StringComparison.Ordinal))
            {
                content.Remove(InstrumentMember);
                string member = order.Kind == LabRecordKind.Certificate ? "certificates" : "triplePointChecks";
                return (Append(instruments[i]!.AsObject(), member, FormattableString.Invariant($"/instruments/{i}"), content), null);
            }
        }

        return (null, new Finding("unknown-reference", "/" + InstrumentMember, "This instrument does not exist.", Finding.Quote(instrument), "Use the id of an instrument of the site."));
    }

    private static string Append(JsonObject parent, string member, string pointer, JsonObject content)
    {
        JsonArray items = parent[member]!.AsArray();
        items.Add(content);
        return FormattableString.Invariant($"{pointer}/{member}/{items.Count - 1}");
    }

    private static Finding Within(Finding finding, string pointer) =>
        finding.Where.StartsWith(pointer, StringComparison.Ordinal) ? finding with { Where = finding.Where[pointer.Length..] } : finding;
}
