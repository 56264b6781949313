using LabWatch.Lab.Time;

namespace LabWatch.Records.Revisions;

/// <summary>A lab file to import.</summary>
/// <param name="Document">The file, UTF-8.</param>
/// <param name="FileName">Name of the file, for the reason.</param>
/// <param name="Author">Who imports it.</param>
/// <param name="At">When.</param>
public sealed record LabImportOrder(ReadOnlyMemory<byte> Document, string FileName, string Author, Instant At)
{
    /// <summary>Why; null for the import of this file.</summary>
    public string? Reason { get; init; }

    /// <summary>Whether the file may revert edits and withdraw what it does not have.</summary>
    public bool Accept { get; init; }

    /// <summary>Whether only to say what would change.</summary>
    public bool DryRun { get; init; }
}
