using LabWatch.Lab.Findings;

namespace LabWatch.Lab.LabFile;

/// <summary>What reading a lab file gave.</summary>
/// <param name="Snapshot">The site; null where there are findings.</param>
/// <param name="Findings">Everything that is wrong, in the order of the file; empty where nothing is.</param>
public sealed record LabFileResult(LabSnapshot? Snapshot, IReadOnlyList<Finding> Findings)
{
    /// <summary>What a document in force was put together from; null for a file that people wrote.</summary>
    public LabRecorded? Recorded { get; init; }
}
