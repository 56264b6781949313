using LabWatch.Lab.Time;

namespace LabWatch.Assessments.Criteria.DataHealthParts;

/// <summary>
/// Promised readings that are not there. A reading may come up to a quarter of an interval early or late; more often than promised is no fault.
/// </summary>
/// <param name="Missing">How many.</param>
/// <param name="Longest">The longest stretch without a reading, in the window; zero where none is missing.</param>
/// <param name="From">Where that stretch begins.</param>
internal readonly record struct ReadingGaps(int Missing, TimeSpan Longest, Instant From)
{
    /// <summary>Looks for gaps.</summary>
    /// <param name="times">Device times up to the end of the window, rising, microseconds.</param>
    /// <param name="first">Index of the first in the window.</param>
    /// <param name="window">The window.</param>
    /// <param name="interval">The promised interval.</param>
    public static ReadingGaps Of(ReadOnlySpan<long> times, int first, TimeWindow window, TimeSpan interval)
    {
        long start = window.Start.Microseconds, end = window.End.Microseconds, step = Math.Max(1, interval.Ticks / TimeSpan.TicksPerMicrosecond);
        if (first == times.Length)
        {
            return new((int)Math.Max(1, (end - start) / step), window.Duration, window.Start);
        }

        long missing = 0, longest = 0, from = start;
        long last = first > 0 && times[first] - times[first - 1] < step + (step / 2) ? times[first] : start;
        Count(times[first], last == start ? (times[first] - start) / step : 0);
        for (int i = first + 1; i < times.Length; i++)
        {
            Count(times[i], ((times[i] - last + (step / 2)) / step) - 1);
        }

        Count(end, ((end - last + (step / 2) - 1) / step) - 1);
        return new((int)missing, TimeSpan.FromMicroseconds(longest), new Instant(from));

        void Count(long time, long lost)
        {
            if (lost > 0)
            {
                missing += lost;
                (longest, from) = time - last > longest ? (time - last, last) : (longest, from);
            }

            last = time;
        }
    }
}
