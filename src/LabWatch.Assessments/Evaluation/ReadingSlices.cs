using LabWatch.Lab.Time;
using LabWatch.Readings;

namespace LabWatch.Assessments.Evaluation;

/// <summary>Parts of readings without copying them.</summary>
public static class ReadingSlices
{
    /// <summary>The readings of a shorter window, with the hours that it touches.</summary>
    public static ReadingWindow Slice(this ReadingWindow readings, TimeWindow window)
    {
        ArgumentNullException.ThrowIfNull(readings);
        return new(
            readings.Source,
            window,
            [.. readings.Series.Select(series => series.Slice(window)).Where(series => series.Count > 0)],
            [.. readings.Hours.Where(hour => hour.Hour < window.End && hour.Hour.Microseconds + Instant.MicrosecondsPerHour > window.Start.Microseconds)]);
    }

    /// <summary>The readings of some channels in a shorter window, with the hours that it touches.</summary>
    public static ReadingWindow Slice(this ReadingWindow readings, TimeWindow window, IReadOnlyCollection<string> channels)
    {
        ArgumentNullException.ThrowIfNull(readings);
        return (readings with { Series = [.. readings.Series.Where(series => channels.Contains(series.Channel))] }).Slice(window);
    }

    /// <summary>Whether a series has a reading in a window.</summary>
    public static bool HasReadingIn(this ReadingSeries series, TimeWindow window)
    {
        ArgumentNullException.ThrowIfNull(series);
        ReadOnlySpan<long> times = series.TimeMicroseconds.Span;
        int first = FirstNotBefore(times, window.Start.Microseconds);
        return first < times.Length && times[first] < window.End.Microseconds;
    }

    /// <summary>The readings of a series in a window.</summary>
    public static ReadingSeries Slice(this ReadingSeries series, TimeWindow window)
    {
        ArgumentNullException.ThrowIfNull(series);
        int from = FirstNotBefore(series.TimeMicroseconds.Span, window.Start.Microseconds);
        int length = FirstNotBefore(series.TimeMicroseconds.Span, window.End.Microseconds) - from;
        return new(
            series.Channel, series.TimeMicroseconds.Slice(from, length), series.Values.Slice(from, length), series.Qualities.Slice(from, length));
    }

    private static int FirstNotBefore(ReadOnlySpan<long> times, long time)
    {
        int index = times.BinarySearch(time);
        return index < 0 ? ~index : index;
    }
}
