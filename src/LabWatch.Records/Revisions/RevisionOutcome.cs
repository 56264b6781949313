using LabWatch.Lab.Findings;

namespace LabWatch.Records.Revisions;

/// <summary>What became of a new revision.</summary>
/// <param name="Findings">What is wrong with it, at JSON Pointers into its content; it was not recorded.</param>
/// <param name="Conflict">Why its revision number cannot be given; it was not recorded. Null where it can.</param>
/// <param name="Revision">The revision on record; null where it was not recorded.</param>
/// <param name="IsNew">Whether this call recorded it; false where the same revision with the same content was on record already.</param>
/// <param name="Records">The site's records afterwards; null where it was not recorded.</param>
public sealed record RevisionOutcome(
    IReadOnlyList<Finding> Findings, Finding? Conflict, RecordRevision? Revision, bool IsNew, LabRecordSet? Records)
{
    internal static RevisionOutcome Wrong(params IReadOnlyList<Finding> findings) => new(findings, null, null, false, null);

    internal static RevisionOutcome Conflicting(Finding conflict) => new([], conflict, null, false, null);
}
