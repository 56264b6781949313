using LabWatch.Lab.Findings;

namespace LabWatch.Intake.Import;

/// <summary>What an import came to.</summary>
/// <param name="Totals">What was done; null where nothing could be.</param>
/// <param name="FromLine">Line up to which an earlier import had come; 0 for a beginning.</param>
/// <param name="Findings">Why nothing could be done.</param>
public sealed record ImportResult(ImportTotals? Totals, long FromLine, IReadOnlyList<Finding> Findings);
