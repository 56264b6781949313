using LabWatch.Metrology.Attribution;

namespace LabWatch.Assessments.Attribution;

/// <summary>A deviation with what it was made of.</summary>
/// <param name="Deviation">Deviation, uncertainty and how each candidate would show in it.</param>
/// <param name="Channel">Channel of the comparator; empty for the differences between wells.</param>
/// <param name="SetPointCelsius">Set point.</param>
/// <param name="RecentDays">Days in its mean.</param>
/// <param name="ReferenceDays">Days in the mean that it is told from; 0 where it is told from the model.</param>
public sealed record Observation(BandDeviation Deviation, string Channel, double SetPointCelsius, int RecentDays, int ReferenceDays);
