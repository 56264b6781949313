using LabWatch.Lab.Findings;

namespace LabWatch.Intake.Import;

/// <summary>What could not become a reading.</summary>
/// <param name="Line">Line of the file.</param>
/// <param name="Text">The row as read, or the part of it that was refused.</param>
/// <param name="Findings">Why, with the line in their place.</param>
public sealed record RefusedRow(long Line, string Text, IReadOnlyList<Finding> Findings);
