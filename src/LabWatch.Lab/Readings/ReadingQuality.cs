namespace LabWatch.Lab.Readings;

/// <summary>What is known about one reading besides its value. One byte; the bits are part of the stored format and never change meaning.</summary>
[Flags]
#pragma warning disable CA1028 // The storage format fixes one byte.
public enum ReadingQuality : byte
#pragma warning restore CA1028
{
    /// <summary>Nothing to note.</summary>
    None = 0,

    /// <summary>The device said that there is no value (null or not a number); the value is NaN.</summary>
    NoValue = 1,

    /// <summary>The payload had no time; the reading carries the time of arrival.</summary>
    StampedOnArrival = 2,

    /// <summary>The value is outside the range that the channel's sensor can give.</summary>
    OutsideSensorRange = 4,

    /// <summary>The clock of this service stepped near this reading; its arrival time is doubtful.</summary>
    ClockStepped = 8,

    /// <summary>The device time was later than the arrival time by more than the permitted skew.</summary>
    FromTheFuture = 16,

    /// <summary>The reading arrived long after its device time (delivered late or back-filled).</summary>
    Late = 32,

    /// <summary>The device sent another unit; the value was converted to the channel's.</summary>
    Converted = 64,
}
