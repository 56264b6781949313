using LabWatch.Lab.Time;

namespace LabWatch.Intake.Diagnostics;

/// <summary>What is known about the clock of the device that sends for a source, from its device times and the times of arrival.</summary>
/// <param name="State">How it stands.</param>
/// <param name="OffsetSeconds">
/// Device time less arrival time, seconds, median of the latest messages: negative by the time that delivery takes, and by what the device's clock is
/// behind. NaN before the first.
/// </param>
/// <param name="StandardUncertaintySeconds">
/// Standard uncertainty of that median for scatter alone: 1.2533 times 1.4826 times the median absolute deviation, over the root of the count. NaN below three messages.
/// </param>
/// <param name="LeastDelaySeconds">
/// Largest device time less arrival of the latest messages, seconds: the message that took the shortest way. What the clock is ahead is at least this.
/// </param>
/// <param name="Messages">Messages that it rests on.</param>
/// <param name="LeapSeconds">By how much the clock has leapt, seconds, positive for ahead; 0 where it has not.</param>
/// <param name="Since">Arrival from which the state holds.</param>
public sealed record DeviceClock(
    DeviceClockState State, double OffsetSeconds, double StandardUncertaintySeconds, double LeastDelaySeconds, int Messages, double LeapSeconds, Instant Since);
