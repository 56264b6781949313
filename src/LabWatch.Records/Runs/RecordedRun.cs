using LabWatch.Lab.Runs;

namespace LabWatch.Records.Runs;

/// <summary>A calibration run with its steps.</summary>
/// <param name="Run">The run as it stands.</param>
/// <param name="Steps">Its steps, in order; at least the start.</param>
public sealed record RecordedRun(CalibrationRun Run, IReadOnlyList<RunStep> Steps);
