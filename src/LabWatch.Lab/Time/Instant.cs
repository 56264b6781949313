using System.Globalization;
using System.Text.Json.Serialization;

namespace LabWatch.Lab.Time;

/// <summary>
/// A point on the UTC time line, in whole microseconds since 1970-01-01T00:00:00Z. Leap seconds are not counted (as in POSIX time).
/// Decimal input is truncated towards negative infinity, so that the same text always gives the same instant.
/// </summary>
/// <param name="Microseconds">Microseconds since the epoch; negative before 1970.</param>
[JsonConverter(typeof(InstantJsonConverter))]
public readonly record struct Instant(long Microseconds) : IComparable<Instant>
{
    /// <summary>Microseconds in one second.</summary>
    public const long MicrosecondsPerSecond = 1_000_000;

    /// <summary>Microseconds in one hour.</summary>
    public const long MicrosecondsPerHour = 3_600 * MicrosecondsPerSecond;

    /// <summary>The earliest instant that <see cref="ToString"/> can write: 0001-01-01T00:00:00Z.</summary>
    public static Instant MinValue { get; } = From(DateTimeOffset.MinValue);

    /// <summary>The latest instant that <see cref="ToString"/> can write: 9999-12-31T23:59:59.999999Z.</summary>
    public static Instant MaxValue { get; } = From(DateTimeOffset.MaxValue);

    /// <summary>The instant of a date with offset, truncated to the microsecond.</summary>
    public static Instant From(DateTimeOffset time) =>
        new(Math.DivRem(time.UtcTicks - DateTimeOffset.UnixEpoch.UtcTicks, TimeSpan.TicksPerMicrosecond, out long rest) - (rest < 0 ? 1 : 0));

    /// <summary>The present instant of a clock.</summary>
    public static Instant Now(TimeProvider clock)
    {
        ArgumentNullException.ThrowIfNull(clock);
        return From(clock.GetUtcNow());
    }

    /// <summary>The instant a number of whole seconds after the epoch.</summary>
    public static Instant FromUnixSeconds(long seconds) => new(seconds * MicrosecondsPerSecond);

    /// <summary>Reads RFC 3339, offset required (for example 2026-12-01T08:15:30.25Z); false for anything else.</summary>
    public static bool TryParse(string? text, out Instant instant)
    {
        bool ok = DateTimeOffset.TryParseExact(
            text,
            ["yyyy-MM-dd'T'HH:mm:ssK", "yyyy-MM-dd'T'HH:mm:ss.FFFFFFFK", "yyyy-MM-dd'T'HH:mmK"],
            CultureInfo.InvariantCulture,
            DateTimeStyles.AssumeUniversal,
            out DateTimeOffset parsed);
        bool hasOffset = text is { Length: > 10 } && (text[^1] is 'Z' or 'z' || text.AsSpan(10).IndexOfAny('+', '-') > 0);
        instant = ok && hasOffset ? From(parsed) : default;
        return ok && hasOffset;
    }

    /// <summary>The same instant as a <see cref="DateTimeOffset"/> with offset zero. Throws outside years 1 to 9999.</summary>
    public DateTimeOffset ToDateTimeOffset() => DateTimeOffset.UnixEpoch.AddTicks(Microseconds * TimeSpan.TicksPerMicrosecond);

    /// <summary>The start of the UTC hour that holds this instant.</summary>
    public Instant StartOfHour() => Floor(MicrosecondsPerHour);

    /// <summary>The largest multiple of a step, counted from the epoch, that is not after this instant. The step must be positive.</summary>
    public Instant Floor(long stepMicroseconds)
    {
        ArgumentOutOfRangeException.ThrowIfNegativeOrZero(stepMicroseconds);
        long rest = Microseconds % stepMicroseconds;
        return new(Microseconds - (rest < 0 ? rest + stepMicroseconds : rest));
    }

    /// <inheritdoc/>
    public int CompareTo(Instant other) => Microseconds.CompareTo(other.Microseconds);

    /// <summary>RFC 3339 in UTC with the shortest fraction that is exact, for example 2026-12-01T08:15:30.25Z.</summary>
    public override string ToString() =>
        ToDateTimeOffset().ToString("yyyy-MM-dd'T'HH:mm:ss.FFFFFF", CultureInfo.InvariantCulture) + "Z";

    /// <summary>The instant a duration later.</summary>
    public static Instant operator +(Instant instant, TimeSpan duration) => new(instant.Microseconds + (duration.Ticks / TimeSpan.TicksPerMicrosecond));

    /// <summary>The instant a duration earlier.</summary>
    public static Instant operator -(Instant instant, TimeSpan duration) => new(instant.Microseconds - (duration.Ticks / TimeSpan.TicksPerMicrosecond));

    /// <summary>The duration from the right instant to the left one.</summary>
    public static TimeSpan operator -(Instant left, Instant right) =>
        TimeSpan.FromTicks((left.Microseconds - right.Microseconds) * TimeSpan.TicksPerMicrosecond);

    /// <summary>Whether the left instant is before the right one.</summary>
    public static bool operator <(Instant left, Instant right) => left.Microseconds < right.Microseconds;

    /// <summary>Whether the left instant is after the right one.</summary>
    public static bool operator >(Instant left, Instant right) => left.Microseconds > right.Microseconds;

    /// <summary>Whether the left instant is not after the right one.</summary>
    public static bool operator <=(Instant left, Instant right) => left.Microseconds <= right.Microseconds;

    /// <summary>Whether the left instant is not before the right one.</summary>
    public static bool operator >=(Instant left, Instant right) => left.Microseconds >= right.Microseconds;
}
