using LabWatch.Lab.Readings;

namespace LabWatch.Readings;

/// <summary>The readings of one channel in rising order of time, as columns of equal length.</summary>
/// <param name="Channel">Id of the channel.</param>
/// <param name="TimeMicroseconds">Device times, microseconds since 1970 UTC, strictly rising.</param>
/// <param name="Values">Raw values in the channel's unit; NaN where there is none.</param>
/// <param name="Qualities">Quality of each reading.</param>
public sealed record ReadingSeries(
    string Channel, ReadOnlyMemory<long> TimeMicroseconds, ReadOnlyMemory<double> Values, ReadOnlyMemory<ReadingQuality> Qualities)
{
    /// <summary>Number of readings.</summary>
    public int Count => TimeMicroseconds.Length;
}
