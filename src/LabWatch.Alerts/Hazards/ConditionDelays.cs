namespace LabWatch.Alerts.Hazards;

/// <summary>On-delay and off-delay in ticks of a monotonic clock.</summary>
/// <param name="On">How long a condition must be seen before it is raised; 0 raises on the first reading.</param>
/// <param name="Off">How long its absence must be seen before it returns.</param>
internal readonly record struct ConditionDelays(long On, long Off)
{
    /// <summary>The delays in ticks of a clock.</summary>
    public static ConditionDelays From(TimeSpan on, TimeSpan off, TimeProvider clock) => new(Ticks(on, clock), Ticks(off, clock));

    /// <summary>A duration in time stamp ticks of a clock.</summary>
    public static long Ticks(TimeSpan duration, TimeProvider clock) => (long)(duration.TotalSeconds * clock.TimestampFrequency);
}
