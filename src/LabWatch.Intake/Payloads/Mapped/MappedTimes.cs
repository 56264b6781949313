using System.Buffers;
using System.Text;
using System.Text.Json;
using LabWatch.Intake.Options;
using LabWatch.Lab.Time;

namespace LabWatch.Intake.Payloads.Mapped;

/// <summary>Reads the time of a mapped message. Numbers are read as decimals, never as binary floating point.</summary>
internal static class MappedTimes
{
    private const int LongestNumber = 64;
    private static readonly SearchValues<char> NumberCharacters = SearchValues.Create("0123456789.-");

    /// <summary>Reads a time; false where it is none.</summary>
    public static bool TryRead(JsonElement element, MappedTime format, out Instant time)
    {
        time = default;
        string? text = element.ValueKind switch
        {
            JsonValueKind.String => element.GetString(),
            JsonValueKind.Number when format != MappedTime.Rfc3339 => element.GetRawText(),
            _ => null,
        };
        return text is not null && TryRead(text, format, out time);
    }

    /// <summary>Reads a time from a text; false where it is none.</summary>
    public static bool TryRead(string text, MappedTime format, out Instant time)
    {
        time = default;
        if (format == MappedTime.Rfc3339)
        {
            return Instant.TryParse(text, out time);
        }

        if (text.Length is 0 or > LongestNumber || text.AsSpan().ContainsAnyExcept(NumberCharacters) || text.Count(letter => letter == '.') > 1 || text.LastIndexOf('-') > 0 || text is "-" or ".")
        {
            return false;
        }

        string exponent = format switch
        {
            MappedTime.UnixMilliseconds => "e-3",
            MappedTime.UnixMicroseconds => "e-6",
            MappedTime.UnixNanoseconds => "e-9",
            _ => string.Empty,
        };
        bool isTime = DecimalSeconds.TryParse(Encoding.ASCII.GetBytes(text + exponent), out DecimalSeconds seconds);
        time = new Instant(seconds.Microseconds);
        return isTime;
    }
}
