using LabWatch.Lab.Time;

namespace LabWatch.Assessments.Clock;

/// <summary>
/// Compares the wall clock with the monotonic one. A steady frequency correction (at most 500 parts per million by NTP, RFC 5905) moves the
/// wall clock by 5 ms in ten seconds; anything above a second is a step.
/// </summary>
internal sealed class ClockComparison(TimeProvider clock)
{
    /// <summary>The smallest difference that counts as a step.</summary>
    public static readonly TimeSpan Threshold = TimeSpan.FromSeconds(1);

    private DateTimeOffset _wall = clock.GetUtcNow();
    private long _stamp = clock.GetTimestamp();

    /// <summary>The step since the last look; null where there was none.</summary>
    public ClockStep? Look()
    {
        DateTimeOffset wall = clock.GetUtcNow();
        long stamp = clock.GetTimestamp();
        TimeSpan elapsed = clock.GetElapsedTime(_stamp, stamp);
        TimeSpan step = wall - _wall - elapsed;
        (_wall, _stamp) = (wall, stamp);
        return step.Duration() > Threshold ? new ClockStep(Instant.From(wall), step, elapsed) : null;
    }
}
