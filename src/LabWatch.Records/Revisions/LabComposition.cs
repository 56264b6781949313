using System.Text.Json.Nodes;
using LabWatch.Lab.LabFile;
using LabWatch.Lab.Time;

namespace LabWatch.Records.Revisions;

/// <summary>
/// Puts the records of a site together to the document in force: a lab file with the highest revision of each record, and in its member
/// <c>recorded</c> what a lab file does not say. It is read like any lab file, so that an edit passes the same checks as a file.
/// </summary>
public static class LabComposition
{
    /// <summary>The document in force.</summary>
    /// <param name="revisions">All revisions of one site; at least the site itself.</param>
    /// <param name="importDigest">Digest of the lab file imported last; null where none was.</param>
    public static JsonObject Compose(IEnumerable<RecordRevision> revisions, string? importDigest) => Compose(revisions, importDigest, []);

    /// <summary>The document in force with the entries of a file in the file's order, so that findings point into that file.</summary>
    internal static JsonObject Compose(IEnumerable<RecordRevision> revisions, string? importDigest, IReadOnlyList<LabEntry> file)
    {
        IReadOnlyList<RecordHistory> histories = RecordHistory.Of(revisions);
        Dictionary<(LabRecordKind, string, int?), int> places = [];
        for (int i = 0; i < file.Count; i++)
        {
            places.TryAdd((file[i].Kind, file[i].Id, file[i].Revision), i);
        }

        IEnumerable<LabEntry> entries = histories.SelectMany(InForce)
            .OrderBy(entry => places.GetValueOrDefault((entry.Kind, entry.Id, entry.Revision), int.MaxValue));
        return LabDocument.Join(entries, Recorded(histories, importDigest));
    }

    private static IEnumerable<LabEntry> InForce(RecordHistory history)
    {
        IEnumerable<RecordRevision> shown = history.Kind switch
        {
            LabRecordKind.Certificate or LabRecordKind.TriplePointCheck or LabRecordKind.Limit => history.Revisions.Where(revision => !revision.IsWithdrawal),
            LabRecordKind.Instrument => Some(history.Latest),
            LabRecordKind.Installation when history.IsWithdrawn => [],
            _ => history.IsWithdrawn ? [] : Some(history.Latest),
        };
        return history is { Kind: LabRecordKind.Installation, IsWithdrawn: true, Latest.Entry: { } stay }
            ? Ended(stay, history.Last.EffectiveFrom)
            : shown.Select(revision => revision.Entry!);
    }

    /// <summary>A stay that is withdrawn ended then; one that had not begun never was.</summary>
    private static IEnumerable<LabEntry> Ended(LabEntry stay, Instant end)
    {
        Instant from = Time(stay.Content, "from") ?? end;
        Instant? until = Time(stay.Content, "until");
        if (from >= end)
        {
            return [];
        }

        stay.Content["until"] = (until < end ? until.Value : end).ToString();
        return [stay];
    }

    private static JsonObject Recorded(IReadOnlyList<RecordHistory> histories, string? importDigest)
    {
        JsonObject recorded = new() { ["sequence"] = histories.Max(history => history.Revisions.Max(revision => revision.Sequence)) };
        if (importDigest is not null)
        {
            recorded["importDigest"] = importDigest;
        }

        RecordHistory[] sources = [.. histories.Where(history => history.Kind == LabRecordKind.Source)];
        recorded["sources"] = new JsonArray([.. sources.Where(history => !history.IsWithdrawn).Select(history => Dated(history.Last, new JsonObject { ["id"] = history.Id }))]);
        recorded["formerSources"] = new JsonArray(
            [.. sources.SelectMany(history => history.Revisions.Where(revision => !revision.IsWithdrawal && revision != history.Last)).Select(Former)]);
        recorded["withdrawn"] = new JsonArray(
            [.. histories.Where(history => history.IsWithdrawn && IsShownWhenWithdrawn(history.Kind)).Select(history => new JsonObject
            {
                ["kind"] = LabEntry.NameOf(history.Kind),
                ["id"] = history.Id,
                ["from"] = history.Last.EffectiveFrom.ToString(),
            })]);
        return recorded;
    }

    private static bool IsShownWhenWithdrawn(LabRecordKind kind) => kind == LabRecordKind.Instrument || LabEntry.CarriesRevision(kind);

    private static JsonObject Former(RecordRevision revision)
    {
        JsonObject former = Dated(revision, []);
        former["description"] = revision.Entry!.Content;
        return former;
    }

    private static JsonObject Dated(RecordRevision revision, JsonObject target)
    {
        target["revision"] = revision.Revision;
        target["effectiveFrom"] = revision.EffectiveFrom.ToString();
        return target;
    }

    private static IEnumerable<RecordRevision> Some(RecordRevision? revision) => revision is null ? [] : [revision];

    private static Instant? Time(JsonObject content, string member) =>
        Instant.TryParse(content[member]?.GetValue<string>(), out Instant instant) ? instant : null;
}
