using LabWatch.Lab.LabFile;

namespace LabWatch.Records.Revisions;

/// <summary>All revisions of one record, in rising order; at least one.</summary>
internal sealed record RecordHistory(LabRecordKind Kind, string Id, IReadOnlyList<RecordRevision> Revisions)
{
    /// <summary>The newest revision.</summary>
    public RecordRevision Last => Revisions[^1];

    /// <summary>The newest revision that has content; null where it was withdrawn before it had any.</summary>
    public RecordRevision? Latest => Revisions.LastOrDefault(revision => !revision.IsWithdrawal);

    /// <summary>Whether the record is out of force.</summary>
    public bool IsWithdrawn => Last.IsWithdrawal;

    /// <summary>The histories of a site's revisions, in the order of first recording.</summary>
    public static IReadOnlyList<RecordHistory> Of(IEnumerable<RecordRevision> revisions) =>
        [.. revisions
            .OrderBy(revision => revision.Sequence)
            .GroupBy(revision => (revision.Kind, revision.Id))
            .Select(group => new RecordHistory(group.Key.Kind, group.Key.Id, [.. group.OrderBy(revision => revision.Revision)]))];
}
