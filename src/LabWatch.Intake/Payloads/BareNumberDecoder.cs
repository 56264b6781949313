using System.Buffers;
using System.Globalization;
using System.Text;
using LabWatch.Lab.Readings;

namespace LabWatch.Intake.Payloads;

/// <summary>Decodes one number in decimal text, on a channel's topic. It has no time, so it is stamped on arrival.</summary>
internal static class BareNumberDecoder
{
    private const int LongestNumber = 64;
    private static readonly SearchValues<byte> NumberBytes = SearchValues.Create("0123456789+-.eE"u8);

    public static void Decode(ReadOnlySpan<byte> utf8, in DecodeContext context, ref ReadingBuffer readings, ref FindingList? findings)
    {
        ReadOnlySpan<byte> text = utf8[Ascii.Trim(utf8)];
        ChannelEntry channel = context.Route.Channel!;
        double value = double.NaN;
        string? refusal = context.Retained ? IntakeCode.RetainedWithoutTime
            : !TryParse(text, out value) ? IntakeCode.ValueNotNumber
            : double.IsInfinity(value) ? IntakeCode.ValueOutOfRange
            : null;
        if (refusal is not null)
        {
            SenmlRefusal.Report(refusal, string.Empty, text, findings ??= new());
            return;
        }

        ReadingQuality quality = double.IsNaN(value) ? ReadingQuality.NoValue : channel.JudgeRange(value);
        readings.Add(new Reading(channel.Id, context.Arrival, value, quality | ReadingQuality.StampedOnArrival));
    }

    /// <summary>Reads a number in decimal text, or the words for no value (NaN then); false where it is neither.</summary>
    public static bool TryParse(ReadOnlySpan<byte> text, out double value)
    {
        value = double.NaN;
        return IsNoValue(text) || (IsNumber(text) && double.TryParse(text, NumberStyles.Float, CultureInfo.InvariantCulture, out value));
    }

    private static bool IsNoValue(ReadOnlySpan<byte> text) =>
        Ascii.EqualsIgnoreCase(text, "nan"u8) || Ascii.EqualsIgnoreCase(text, "null"u8);

    /// <summary>Digits, one sign in front, a full stop, an exponent: no names of infinities, no separators of thousands.</summary>
    private static bool IsNumber(ReadOnlySpan<byte> text) =>
        text.Length is > 0 and <= LongestNumber && !text.ContainsAnyExcept(NumberBytes);
}
