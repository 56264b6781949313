using LabWatch.Lab.Time;

namespace LabWatch.Assessments.Forecasts;

/// <summary>The mean of a tracked quantity over the assessments of one UTC day.</summary>
/// <param name="At">Mean of the windows' ends.</param>
/// <param name="Value">Mean, in the unit of the quantity.</param>
/// <param name="Count">Assessments in it.</param>
public readonly record struct DayMean(Instant At, double Value, int Count);
