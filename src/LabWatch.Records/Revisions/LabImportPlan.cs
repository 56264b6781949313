using LabWatch.Lab.Findings;

namespace LabWatch.Records.Revisions;

/// <summary>What an import comes to.</summary>
/// <param name="Revisions">The revisions to add, in their order.</param>
/// <param name="Changes">The same in words, and what is left alone.</param>
/// <param name="Findings">What is wrong with the file: it cannot be imported.</param>
/// <param name="ToAccept">What the file would revert or withdraw: it is imported only where that is accepted.</param>
public sealed record LabImportPlan(
    IReadOnlyList<RecordRevision> Revisions, IReadOnlyList<LabChange> Changes, IReadOnlyList<Finding> Findings, IReadOnlyList<Finding> ToAccept)
{
    /// <summary>A file that cannot be imported.</summary>
    internal static LabImportPlan Refused(IReadOnlyList<Finding> findings) => new([], [], findings, []);
}
