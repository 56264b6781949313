using LabWatch.Lab.Findings;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Time;

namespace LabWatch.Intake.Payloads;

/// <summary>
/// How a device time is judged against the time of arrival: later by more than <see cref="PermittedSkew"/> is flagged
/// <see cref="ReadingQuality.FromTheFuture"/>, later by more than <see cref="FutureLimit"/> is refused, earlier by more than
/// <see cref="LateAfter"/> is flagged <see cref="ReadingQuality.Late"/>, before <see cref="Earliest"/> is refused.
/// </summary>
public sealed record ReadingTimeRule
{
    /// <summary>How far a device's clock may be ahead unremarked, 0 to 10 minutes. Default 5 s.</summary>
    public TimeSpan PermittedSkew { get; init; } = TimeSpan.FromSeconds(5);

    /// <summary>How far a device's clock may be ahead at all, at least the permitted skew, at most 1 day. Default 10 minutes.</summary>
    public TimeSpan FutureLimit { get; init; } = TimeSpan.FromMinutes(10);

    /// <summary>How old a reading may be on arrival unremarked, 1 s to 1 day. Default 60 s.</summary>
    public TimeSpan LateAfter { get; init; } = TimeSpan.FromSeconds(60);

    /// <summary>How old a reading may be on arrival at all, at least an hour; null for any age. Default 400 days.</summary>
    public TimeSpan? LateLimit { get; init; } = TimeSpan.FromDays(400);

    /// <summary>By how much a device's clock may leap against the clock here before its readings are refused, 10 s to 1 day; null for never. Default 60 s.</summary>
    public TimeSpan? LeapLimit { get; init; } = TimeSpan.FromSeconds(60);

    /// <summary>Earliest device time that is believed. Default 2000-01-01T00:00:00Z.</summary>
    public Instant Earliest { get; init; } = Instant.FromUnixSeconds(946_684_800);

    /// <summary>Everything wrong with this rule.</summary>
    /// <param name="where">Name of the option that holds it.</param>
    public IEnumerable<Finding> Validate(string where) =>
    [
        .. OptionCheck.Range($"{where}.{nameof(PermittedSkew)}", PermittedSkew, TimeSpan.Zero, TimeSpan.FromMinutes(10)),
        .. OptionCheck.Range($"{where}.{nameof(FutureLimit)}", FutureLimit, PermittedSkew, TimeSpan.FromDays(1)),
        .. OptionCheck.Range($"{where}.{nameof(LateAfter)}", LateAfter, TimeSpan.FromSeconds(1), TimeSpan.FromDays(1)),
        .. LateLimit is { } oldest ? OptionCheck.Range($"{where}.{nameof(LateLimit)}", oldest, TimeSpan.FromHours(1), TimeSpan.FromDays(100_000)) : [],
        .. LeapLimit is { } leap ? OptionCheck.Range($"{where}.{nameof(LeapLimit)}", leap, TimeSpan.FromSeconds(10), TimeSpan.FromDays(1)) : [],
    ];

    /// <summary>The flags of a device time; null with the code of the reason where it is refused.</summary>
    internal ReadingQuality? Judge(Instant device, Instant arrival, out string? refusal)
    {
        long ahead = device.Microseconds - arrival.Microseconds;
        refusal = device < Earliest ? IntakeCode.TimeTooEarly
            : ahead > Microseconds(FutureLimit) ? IntakeCode.TimeInTheFuture
            : LateLimit is { } oldest && -ahead > Microseconds(oldest) ? IntakeCode.TimeTooOld
            : null;
        return refusal is not null ? null
            : ahead > Microseconds(PermittedSkew) ? ReadingQuality.FromTheFuture
            : -ahead > Microseconds(LateAfter) ? ReadingQuality.Late
            : ReadingQuality.None;
    }

    private static long Microseconds(TimeSpan span) => span.Ticks / TimeSpan.TicksPerMicrosecond;
}
