using System.Text.Json;
using FsCheck.Xunit;
using LabWatch.Lab.Time;

namespace LabWatch.Tests.Lab;

public sealed class InstantTests
{
    [Theory]
    [InlineData("1970-01-01T00:00:00Z", 0)]
    [InlineData("1969-12-31T23:59:59.9999999Z", -1)]
    [InlineData("1970-01-01T00:00:00.0000019Z", 1)]
    [InlineData("2026-12-01T09:15:30.25+01:00", 1_796_112_930_250_000)]
    [InlineData("2026-12-01T08:15Z", 1_796_112_900_000_000)]
    public void TryParse_reads_rfc_3339_and_truncates_downwards(string text, long microseconds)
    {
        Assert.True(Instant.TryParse(text, out Instant instant));
        Assert.Equal(microseconds, instant.Microseconds);
    }

    [Theory]
    [InlineData(null)]
    [InlineData("")]
    [InlineData("2026-12-01")]
    [InlineData("2026-12-01T08:15:30")]
    [InlineData("01/12/2026 08:15:30Z")]
    [InlineData("2026-13-01T08:15:30Z")]
    [InlineData("2026-12-01T08:15:30Z ")]
    public void TryParse_refuses_what_has_no_offset_or_is_no_time(string? text) => Assert.False(Instant.TryParse(text, out _));

    [Property]
    public bool Text_round_trips_every_microsecond(long seed)
    {
        long span = Instant.MaxValue.Microseconds - Instant.MinValue.Microseconds;
        Instant instant = new(Instant.MinValue.Microseconds + (long)(unchecked((ulong)seed) % (ulong)span));
        return Instant.TryParse(instant.ToString(), out Instant read) && read == instant
            && JsonSerializer.Deserialize<Instant>(JsonSerializer.Serialize(instant)) == instant;
    }

    [Property]
    public bool StartOfHour_is_the_last_whole_hour_not_after(int seconds)
    {
        Instant instant = new((seconds * 1_000_003L) - 1);
        Instant hour = instant.StartOfHour();
        return hour <= instant && instant - hour < TimeSpan.FromHours(1) && hour.Microseconds % Instant.MicrosecondsPerHour == 0;
    }
}
