using LabWatch.Lab.Time;

namespace LabWatch.Lab.Readings;

/// <summary>
/// One value of one channel as the device sent it: raw, in the channel's own unit, never corrected. Its identity is (source, channel, time).
/// </summary>
/// <param name="Channel">Id of the channel in its source.</param>
/// <param name="Time">Device time (arrival time where <see cref="ReadingQuality.StampedOnArrival"/> is set).</param>
/// <param name="Value">Value in the channel's raw unit; NaN exactly where <see cref="ReadingQuality.NoValue"/> is set; never infinite.</param>
/// <param name="Quality">What is known about the reading.</param>
public readonly record struct Reading(string Channel, Instant Time, double Value, ReadingQuality Quality = ReadingQuality.None);
