using LabWatch.Lab.Time;

namespace LabWatch.Readings;

/// <summary>Readings of one channel in one bucket of time. Readings without a value are not counted.</summary>
/// <param name="Start">Start of the bucket.</param>
/// <param name="Count">Number of values.</param>
/// <param name="First">Value of the earliest.</param>
/// <param name="Last">Value of the latest.</param>
/// <param name="Minimum">Smallest value.</param>
/// <param name="Maximum">Largest value.</param>
/// <param name="Mean">Arithmetic mean.</param>
/// <param name="SumOfSquaredDeviations">Sum of squared deviations from the mean, in the square of the unit.</param>
public readonly record struct ReadingSummary(
    Instant Start, int Count, double First, double Last, double Minimum, double Maximum, double Mean, double SumOfSquaredDeviations);
