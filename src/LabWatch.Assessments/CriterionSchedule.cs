using LabWatch.Lab.Time;

namespace LabWatch.Assessments;

/// <summary>
/// Which windows a criterion looks at. Window ends are the multiples of <paramref name="Every"/> since 1970-01-01T00:00:00Z, so that they
/// never depend on when the service started, on a time zone or on daylight saving.
/// </summary>
/// <param name="Window">Length of a window, positive.</param>
/// <param name="Every">Time from one window's end to the next, positive; shorter than the window where windows overlap.</param>
/// <param name="LeadIn">Time before the window whose readings the criterion needs as well, zero or positive.</param>
/// <param name="Grace">How long after its end a window waits for readings that are on their way, zero or positive.</param>
public sealed record CriterionSchedule(TimeSpan Window, TimeSpan Every, TimeSpan LeadIn, TimeSpan Grace)
{
    private long Step => Every.Ticks / TimeSpan.TicksPerMicrosecond;

    /// <summary>Length of window and lead-in.</summary>
    public TimeSpan Reach => Window + LeadIn;

    /// <summary>The window that ends at an instant.</summary>
    public TimeWindow EndingAt(Instant end) => new(end - Window, end);

    /// <summary>What a window is read from: the window with its lead-in.</summary>
    public TimeWindow SpanOf(TimeWindow window) => new(window.Start - LeadIn, window.End);

    /// <summary>The latest window end that is not after an instant.</summary>
    public Instant EndAtOrBefore(Instant instant) => instant.Floor(Step);

    /// <summary>The latest window end whose window is due at an instant, grace included.</summary>
    public Instant LastDue(Instant now) => EndAtOrBefore(now - Grace);

    /// <summary>The windows that end after one instant and not after another, in rising order.</summary>
    public IEnumerable<TimeWindow> Ending(Instant after, Instant upTo)
    {
        for (Instant end = EndAtOrBefore(after) + Every; end <= upTo; end += Every)
        {
            yield return EndingAt(end);
        }
    }

    /// <summary>The windows whose span (lead-in included) overlaps an hour, in rising order.</summary>
    public IEnumerable<TimeWindow> Touching(Instant hour)
    {
        Instant hourEnd = new(hour.Microseconds + Instant.MicrosecondsPerHour);
        return Ending(hour, hourEnd + Reach).Where(window => SpanOf(window).Start < hourEnd);
    }
}
