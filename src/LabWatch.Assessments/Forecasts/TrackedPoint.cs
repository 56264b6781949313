using LabWatch.Lab.Time;

namespace LabWatch.Assessments.Forecasts;

/// <summary>What one assessment says about a tracked quantity.</summary>
/// <param name="Series">The series it belongs to.</param>
/// <param name="WindowEnd">End of the assessment's window.</param>
/// <param name="Value">The value, in the unit of the series.</param>
/// <param name="Limit">Distance of the limits from zero, or from the reference days where the series has no zero of its own; null where no limit applies.</param>
/// <param name="Basis">What must be the same for two values to be compared: certificates, and the baseline where there is one.</param>
/// <param name="Assessment">Id of the assessment.</param>
internal sealed record TrackedPoint(SeriesKey Series, Instant WindowEnd, double Value, double? Limit, string Basis, string Assessment);
