using LabWatch.Lab.Findings;
using LabWatch.Lab.LabFile;
using LabWatch.Lab.Time;

namespace LabWatch.Records.Revisions;

/// <summary>
/// Finds what a lab file changes in the records of its site. A record that the file gives with other content is superseded; where it
/// carries its revision itself, other content under a number that is on record is refused. What the file does not have any more is
/// withdrawn, and that, like the reverting of an edit, has to be accepted.
/// </summary>
internal sealed class LabImportPlanner
{
    private readonly LabRecordSet _records;
    private readonly LabImportOrder _order;
    private readonly int _import;
    private readonly Dictionary<(LabRecordKind, string), RecordHistory> _histories;
    private readonly HashSet<(LabRecordKind, string)> _inFile = [];
    private readonly List<RecordRevision> _revisions = [];
    private readonly List<LabChange> _changes = [];
    private readonly List<Finding> _findings = [];
    private readonly List<Finding> _toAccept = [];

    private LabImportPlanner(LabRecordSet records, LabImportOrder order, string digest)
    {
        (_records, _order) = (records, order);
        _import = (records.LatestImport?.Sequence ?? 0) + (string.Equals(records.LatestImport?.Digest, digest, StringComparison.Ordinal) ? 0 : 1);
        _histories = RecordHistory.Of(records.Revisions).ToDictionary(history => (history.Kind, history.Id));
    }

    private string Reason(string digest) => _order.Reason ?? $"Import of {_order.FileName}, digest {digest[..12]}";

    /// <summary>The plan of an import. The file must be valid by itself, references to what is on record apart.</summary>
    /// <param name="records">The records of the file's site.</param>
    /// <param name="order">The import.</param>
    /// <param name="digest">Digest of the file.</param>
    public static LabImportPlan Plan(LabRecordSet records, LabImportOrder order, string digest)
    {
        LabImportPlanner planner = new(records, order, digest);
        IReadOnlyList<LabEntry> file = LabDocument.Split(LabDocument.Parse(order.Document));
        foreach (LabEntry entry in file)
        {
            planner.Take(entry, planner.Reason(digest));
        }

        planner.TellKept(file);
        foreach (RecordHistory history in planner._histories.Values.Where(history => !history.IsWithdrawn && !planner._inFile.Contains((history.Kind, history.Id))))
        {
            planner.Withdraw(history, planner.Reason(digest));
        }

        return planner.Finish(file, digest);
    }

    private LabImportPlan Finish(IReadOnlyList<LabEntry> file, string digest)
    {
        if (_findings.Count == 0)
        {
            // The whole as it would be in force; the file's entries stand first, so that findings point into the file.
            _findings.AddRange(LabFileReader.Read(LabDocument.Write(LabComposition.Compose([.. _records.Revisions, .. _revisions], digest, file))).Findings);
        }

        return _findings.Count > 0 ? LabImportPlan.Refused(_findings) : new LabImportPlan(_revisions, _changes, [], _toAccept);
    }

    private void Take(LabEntry entry, string reason)
    {
        _inFile.Add((entry.Kind, entry.Id));
        string text = RevisionDigest.Text(entry.Content);
        RecordHistory? history = _histories.GetValueOrDefault((entry.Kind, entry.Id));
        if (LabEntry.CarriesRevision(entry.Kind))
        {
            TakeNumbered(entry, history, text, reason);
        }
        else if (history is null || history.IsWithdrawn || !string.Equals(history.Last.Digest, RevisionDigest.Of(text), StringComparison.Ordinal))
        {
            TakeChanged(entry, history, text, reason);
        }
    }

    private void TakeNumbered(LabEntry entry, RecordHistory? history, string text, string reason)
    {
        int number = entry.Revision!.Value;
        int highest = Math.Max(history?.Last.Revision ?? 0, Planned(entry));
        RecordRevision? known = history?.Revisions.FirstOrDefault(revision => revision.Revision == number);
        if (known is null && number > highest)
        {
            Add(entry, number, text, TimeOf(entry, entry.Kind switch { LabRecordKind.Limit => "effectiveFrom", LabRecordKind.Certificate => "validFrom", _ => "at" }), reason);
            _changes.Add(new LabChange(history is null ? "added" : "revised", SubjectOf(entry.Kind, entry.Id, number)));
        }
        else if (known is null || !string.Equals(known.Digest, RevisionDigest.Of(text), StringComparison.Ordinal))
        {
            Refuse(entry, number, highest, known);
        }
        else if (history!.IsWithdrawn)
        {
            Refuse(entry, number, highest, history.Last);
        }
    }

    /// <summary>Later revisions that somebody recorded and that the file leaves alone.</summary>
    private void TellKept(IReadOnlyList<LabEntry> file)
    {
        HashSet<(LabRecordKind, string, int?)> inFile = [.. file.Select(entry => (entry.Kind, entry.Id, entry.Revision))];
        _changes.AddRange(_histories.Values
            .Where(history => history is { IsWithdrawn: false, Last.Import: null } && _inFile.Contains((history.Kind, history.Id))
                && LabEntry.CarriesRevision(history.Kind) && !inFile.Contains((history.Kind, history.Id, history.Last.Revision)))
            .Select(history => new LabChange("kept", SubjectOf(history.Kind, history.Id, history.Last.Revision))));
    }

    private int Planned(LabEntry entry) => _revisions
        .Where(revision => revision.Kind == entry.Kind && string.Equals(revision.Id, entry.Id, StringComparison.Ordinal))
        .Select(revision => revision.Revision)
        .DefaultIfEmpty(0)
        .Max();

    private void Refuse(LabEntry entry, int number, int highest, RecordRevision? known)
    {
        string what = $"{LabEntry.NameOf(entry.Kind)} {entry.Id}";
        string cure = FormattableString.Invariant($"Leave what is on record as it is, and give the changed one revision {highest + 1}.");
        _findings.Add(known switch
        {
            null => new Finding("revision-not-next", entry.Where + "/revision", $"Revision {number} of {what} would come behind one on record.", Text(number), cure),
            { IsWithdrawal: true } => new Finding("revision-withdrawn", entry.Where + "/revision", $"The {what} was withdrawn by {known.Author} at {known.RecordedAt}.", Text(number), cure),
            _ => new Finding("revision-changed", entry.Where, $"Revision {number} of {what} is on record with other content, and no record is overwritten.", Text(number), cure),
        });
    }

    private void TakeChanged(LabEntry entry, RecordHistory? history, string text, string reason)
    {
        if (history is { IsWithdrawn: false, Last: { Import: null } edit } && edit.RecordedAt > (_records.LatestImport?.At ?? default))
        {
            _toAccept.Add(new Finding(
                "edit-reverted", entry.Where, $"The file would revert an edit of {LabEntry.NameOf(entry.Kind)} {entry.Id} by {edit.Author} at {edit.RecordedAt}: {edit.Reason}",
                edit.Reference, "Bring the edit into the file, or accept that it is reverted with --accept."));
        }

        int number = (history?.Last.Revision ?? 0) + 1;
        Add(entry, number, text, EffectiveFrom(entry, history), reason);
        _changes.Add(new LabChange(history is null ? "added" : "revised", SubjectOf(entry.Kind, entry.Id, number)));
    }

    private Instant EffectiveFrom(LabEntry entry, RecordHistory? history)
    {
        if (entry.Kind != LabRecordKind.Source || !entry.Content.ContainsKey("effectiveFrom"))
        {
            return entry.Kind == LabRecordKind.Installation ? TimeOf(entry, "from") : _order.At;
        }

        Instant stated = TimeOf(entry, "effectiveFrom");
        if (stated > _order.At)
        {
            _findings.Add(new Finding(
                "effective-later", entry.Where + "/effectiveFrom", "A source's description cannot be put on record before it holds.", stated.ToString(),
                "Import it when the change has been made."));
        }
        else if (history is { IsWithdrawn: false, Last.EffectiveFrom: var former } && stated < former)
        {
            _findings.Add(new Finding(
                "effective-earlier", entry.Where + "/effectiveFrom", $"The revision on record holds from {former}; the next one cannot hold from an earlier time.", stated.ToString(),
                "Give that time to correct it for all of its time, or a later one."));
        }

        return stated;
    }

    private void Withdraw(RecordHistory history, string reason)
    {
        RecordRevision last = history.Last;
        string what = $"{LabEntry.NameOf(history.Kind)} {last.Reference}";
        bool isEdit = last.Import is null && last.RecordedAt > (_records.LatestImport?.At ?? default);
        _toAccept.Add(new Finding(
            isEdit ? "edit-withdrawn" : "withdrawn", string.Empty, $"The file has no {what}{(isEdit ? $", which {last.Author} recorded at {last.RecordedAt}: {last.Reason}" : string.Empty)}; it would be withdrawn.",
            last.Reference, "Write it into the file, or accept its withdrawal with --accept."));
        _revisions.Add(new RecordRevision(
            _records.Site, history.Kind, history.Id, last.Revision + 1, NextSequence(), _order.At, _order.Author, reason, _order.At, null, RevisionDigest.OfWithdrawal, _import));
        _changes.Add(new LabChange("withdrawn", SubjectOf(history.Kind, history.Id, last.Revision + 1)));
    }

    private void Add(LabEntry entry, int number, string text, Instant effectiveFrom, string reason) =>
        _revisions.Add(new RecordRevision(
            _records.Site, entry.Kind, entry.Id, number, NextSequence(), effectiveFrom, _order.Author, reason, _order.At, text, RevisionDigest.Of(text), _import));

    private long NextSequence() => _records.Sequence + _revisions.Count + 1;

    private static Instant TimeOf(LabEntry entry, string member) =>
        Instant.TryParse(entry.Content[member]!.GetValue<string>(), out Instant instant) ? instant : default;

    private static string SubjectOf(LabRecordKind kind, string id, int revision) => $"{LabEntry.NameOf(kind)}/{id}@{Text(revision)}";

    private static string Text(int number) => FormattableString.Invariant($"{number}");
}
