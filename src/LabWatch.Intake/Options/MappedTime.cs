namespace LabWatch.Intake.Options;

/// <summary>How a mapped message writes its time.</summary>
public enum MappedTime
{
    /// <summary>RFC 3339 with <c>Z</c> or an offset.</summary>
    Rfc3339,

    /// <summary>Seconds since 1970 UTC, decimals permitted.</summary>
    UnixSeconds,

    /// <summary>Milliseconds since 1970 UTC.</summary>
    UnixMilliseconds,

    /// <summary>Microseconds since 1970 UTC.</summary>
    UnixMicroseconds,

    /// <summary>Nanoseconds since 1970 UTC, truncated to the microsecond.</summary>
    UnixNanoseconds,
}
