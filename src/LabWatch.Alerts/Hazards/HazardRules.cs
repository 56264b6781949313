using LabWatch.Lab.Time;

namespace LabWatch.Alerts.Hazards;

/// <summary>The options of the hazard watch in the units of its hot path.</summary>
internal readonly record struct HazardRules(
    double DeadBandKelvin, ConditionDelays HotDelays, double SilenceIntervals, TimeSpan SilenceMinimum, long StartGrace, TimeSpan OldestReading, long OldTicks, TimeSpan OffDelay)
{
    /// <summary>The rules of options on a clock.</summary>
    public static HazardRules From(AlertsOptions options, TimeProvider clock) => new(
        options.HotSurfaceDeadBandKelvin,
        ConditionDelays.From(options.HotSurfaceOnDelay, options.HotSurfaceOffDelay, clock),
        options.SilenceIntervals,
        options.SilenceMinimum,
        ConditionDelays.Ticks(options.StartGrace, clock),
        options.OldestReading,
        ConditionDelays.Ticks(options.OldestReading, clock),
        options.HotSurfaceOffDelay);

    /// <summary>The length of a silence that is called one.</summary>
    public TimeSpan SilenceOf(TimeSpan interval) => TimeSpan.FromTicks(Math.Max((long)(interval.Ticks * SilenceIntervals), SilenceMinimum.Ticks));

    /// <summary>Whether a device time is too old to say anything about the time of its arrival.</summary>
    public bool IsOld(Instant time, Instant arrival) => time.Microseconds < arrival.Microseconds - (OldestReading.Ticks / TimeSpan.TicksPerMicrosecond);
}
