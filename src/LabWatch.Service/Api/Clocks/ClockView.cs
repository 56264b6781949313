using System.ComponentModel;
using LabWatch.Intake.Diagnostics;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Time;

namespace LabWatch.Service.Api.Clocks;

/// <summary>The clock of the device of a source.</summary>
internal sealed record ClockView(
    [property: Description("Key of the source, site.source.")] string Source,
    [property: Description("learning, steady, leapt-ahead or leapt-back; while it has leapt its readings go to quarantine.")] string State,
    [property: Description("Device time less arrival, seconds, median of the latest messages: negative by the time of delivery, and by what the clock is behind.")] double? OffsetSeconds,
    [property: Description("Standard uncertainty of the offset from the scatter of the messages, seconds.")] double? StandardUncertaintySeconds,
    [property: Description("Device time less arrival of the message that took the shortest way, seconds: the clock is ahead by this at least.")] double? ShortestWaySeconds,
    [property: Description("Messages that it rests on.")] int Messages,
    [property: Description("By how much it has leapt, seconds, positive for ahead; null where it has not.")] double? LeapSeconds,
    [property: Description("Arrival from which the state holds; null before the first message.")] Instant? Since)
{
    /// <summary>The view of a clock.</summary>
    public static ClockView Of(SourceKey source, DeviceClock clock) => new(
        source.ToString(),
        Names.Of(clock.State),
        Finite(clock.OffsetSeconds),
        Finite(clock.StandardUncertaintySeconds),
        Finite(clock.LeastDelaySeconds),
        clock.Messages,
        clock.LeapSeconds == 0 ? null : clock.LeapSeconds,
        clock.Since == default ? null : clock.Since);

    private static double? Finite(double value) => double.IsFinite(value) ? value : null;
}
