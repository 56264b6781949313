namespace LabWatch.Records.Runs;

/// <summary>What became of a step.</summary>
/// <param name="Problem">Why it was not recorded.</param>
/// <param name="Run">The run it is about, or the one that stands against it; null where there is none.</param>
/// <param name="IsNew">Whether this call recorded it; false where the same request had been answered before.</param>
public sealed record RunOutcome(RunProblem Problem, RecordedRun? Run, bool IsNew);
