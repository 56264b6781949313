using System.Globalization;
using System.Text.RegularExpressions;
using LabWatch.Intake.Options;
using LabWatch.Intake.Payloads.Mapped;
using LabWatch.Lab.Findings;
using LabWatch.Lab.Time;

namespace LabWatch.Intake.Import;

/// <summary>
/// Reads the times of a file. Where a clock was put back a local time happens twice, where it was put forward it does not happen: both are
/// refused, as nobody can tell from the file which instant was meant.
/// </summary>
internal sealed partial class ImportTimes
{
    public const string Ambiguous = "time-ambiguous";
    public const string Missing = "time-does-not-exist";
    public const string ZoneNeeded = "time-zone-needed";
    public const string NotATime = "not-a-time";

    private readonly string _format;
    private readonly TimeZoneInfo? _zone;

    private ImportTimes(string format, TimeZoneInfo? zone)
    {
        _format = format;
        _zone = zone;
    }

    /// <summary>Makes a reader; the finding where the zone is not known.</summary>
    public static (ImportTimes? Times, Finding? Finding) Create(string format, string? zone)
    {
        if (zone is null)
        {
            return (new ImportTimes(format, null), null);
        }

        if (zone is "UTC" or "Z")
        {
            return (new ImportTimes(format, TimeZoneInfo.Utc), null);
        }

        if (OffsetForm().IsMatch(zone))
        {
            var offset = TimeSpan.ParseExact(zone[1..], @"hh\:mm", CultureInfo.InvariantCulture);
            return (new ImportTimes(format, TimeZoneInfo.CreateCustomTimeZone(zone, zone[0] == '-' ? -offset : offset, zone, zone)), null);
        }

        return TimeZoneInfo.TryFindSystemTimeZoneById(zone, out TimeZoneInfo? found)
            ? (new ImportTimes(format, found), null)
            : (null, new Finding("unknown-time-zone", "--time-zone", "This time zone is not known here.", Finding.Quote(zone), "Give UTC, an IANA name such as Europe/Dublin, or an offset such as +01:00."));
    }

    /// <summary>Reads a time; the code of the reason where it is none or leads to no one instant.</summary>
    public string? Read(string text, out Instant time)
    {
        time = default;
        MappedTime? number = _format switch
        {
            "unix" => MappedTime.UnixSeconds,
            "unix-ms" => MappedTime.UnixMilliseconds,
            "unix-us" => MappedTime.UnixMicroseconds,
            _ => null,
        };
        if (number is { } format)
        {
            return MappedTimes.TryRead(text, format, out time) ? null : NotATime;
        }

        return _format == "iso" ? ReadIso(text, out time) : ReadPattern(text, out time);
    }

    private string? ReadIso(string text, out Instant time)
    {
        Match match = IsoForm().Match(text);
        time = default;
        if (!match.Success)
        {
            return NotATime;
        }

        string form = match.Groups["date"].Value + "T" + match.Groups["time"].Value;
        if (match.Groups["offset"].Success)
        {
            return Instant.TryParse(form + match.Groups["offset"].Value, out time) ? null : NotATime;
        }

        return Instant.TryParse(form + "Z", out Instant asIfUtc) ? Place(asIfUtc, out time) : NotATime;
    }

    private string? ReadPattern(string text, out Instant time)
    {
        time = default;
        if (_format.Contains('z', StringComparison.Ordinal) || _format.Contains('K', StringComparison.Ordinal))
        {
            if (!DateTimeOffset.TryParseExact(text, _format, CultureInfo.InvariantCulture, DateTimeStyles.AssumeUniversal, out DateTimeOffset stated))
            {
                return NotATime;
            }

            time = Instant.From(stated);
            return null;
        }

        return DateTimeOffset.TryParseExact(text, _format, CultureInfo.InvariantCulture, DateTimeStyles.AssumeUniversal, out DateTimeOffset clock)
            ? Place(Instant.From(clock), out time)
            : NotATime;
    }

    /// <summary>The instant of a local clock time that was read as if it were UTC.</summary>
    private string? Place(Instant asIfUtc, out Instant time)
    {
        time = asIfUtc;
        if (_zone is null)
        {
            return ZoneNeeded;
        }

        // The offsets in force a day before and after are all that can lead there; each is right where it is in force at the instant that it gives.
        // (The base library's own answers fail for zones whose winter is the exception, such as Ireland's.)
        TimeSpan before = OffsetAt(asIfUtc - TimeSpan.FromDays(1));
        TimeSpan after = OffsetAt(asIfUtc + TimeSpan.FromDays(1));
        bool isBefore = OffsetAt(asIfUtc - before) == before;
        bool isAfter = OffsetAt(asIfUtc - after) == after;
        time = asIfUtc - (isBefore ? before : after);
        return isBefore && isAfter && before != after ? Ambiguous
            : isBefore || isAfter ? null
            : Missing;
    }

    private TimeSpan OffsetAt(Instant instant) => _zone!.GetUtcOffset(instant.ToDateTimeOffset());

    [GeneratedRegex("^[+-][0-9]{2}:[0-9]{2}$")]
    private static partial Regex OffsetForm();

    [GeneratedRegex(@"^(?<date>[0-9]{4}-[0-9]{2}-[0-9]{2})[T ](?<time>[0-9]{2}:[0-9]{2}:[0-9]{2}(\.[0-9]+)?) ?(?<offset>Z|[+-][0-9]{2}:[0-9]{2})?$")]
    private static partial Regex IsoForm();
}
