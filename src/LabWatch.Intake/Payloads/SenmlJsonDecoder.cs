using System.Globalization;
using System.Text;
using System.Text.Json;
using LabWatch.Intake.Units;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Time;

namespace LabWatch.Intake.Payloads;

/// <summary>
/// Decodes SenML JSON (RFC 8428 sections 4 and 5) to readings. A record that cannot be one is refused by itself; an error that makes the
/// rest of the pack doubtful (grammar, base values, version) refuses the whole of it.
/// </summary>
internal static class SenmlJsonDecoder
{
    private const int LongestName = 256;

    /// <summary>Times below this many seconds are relative to now (RFC 8428 section 4.5.3).</summary>
    private const long RelativeBelowMicroseconds = (1L << 28) * Instant.MicrosecondsPerSecond;

    public static void Decode(ReadOnlySpan<byte> utf8, in DecodeContext context, ref ReadingBuffer readings, ref FindingList? findings)
    {
        var reader = new Utf8JsonReader(utf8, new JsonReaderOptions { MaxDepth = context.Limits.MaximumDepth });
        try
        {
            if (!TryReadPack(ref reader, context, ref readings, ref findings))
            {
                readings.Clear();
            }
        }
        catch (Exception exception) when (exception is JsonException or InvalidOperationException)
        {
            // Malformed JSON, or a text with a lone surrogate: nothing of the message is believed.
            readings.Clear();
            string place = string.Create(CultureInfo.InvariantCulture, $"byte {reader.BytesConsumed}");
            (findings ??= new()).Add(
                IntakeCode.MalformedJson, place, "The payload breaks the grammar of JSON or is nested too deeply.", Rest(utf8, reader.BytesConsumed), "Send a SenML pack as JSON.");
        }
    }

    private static bool TryReadPack(scoped ref Utf8JsonReader reader, in DecodeContext context, ref ReadingBuffer readings, ref FindingList? findings)
    {
        var record = default(SenmlRecord);
        ChannelEntry? last = null;
        int index = 0;
        reader.Read();
        bool single = reader.TokenType == JsonTokenType.StartObject;
        while (single || (reader.Read() && reader.TokenType != JsonTokenType.EndArray))
        {
            if (index == context.Limits.MaximumRecords)
            {
                (findings ??= new()).AddWithoutValue(IntakeCode.TooManyRecords, Pointer(index, default), "The pack holds more records than the limit.", "Send smaller packs or raise the limit.");
                return false;
            }

            if (!TryReadRecord(ref reader, index, ref record, context, ref findings))
            {
                return false;
            }

            Resolve(ref record, index, context, ref last, ref readings, ref findings);
            index++;
            if (single)
            {
                break;
            }
        }

        return !reader.Read();
    }

    private static bool TryReadRecord(scoped ref Utf8JsonReader reader, int index, ref SenmlRecord record, in DecodeContext context, ref FindingList? findings)
    {
        if (reader.TokenType != JsonTokenType.StartObject)
        {
            (findings ??= new()).Add(IntakeCode.NotSenml, Pointer(index, default), "Every item of a pack must be an object.", reader.ValueSpan, "Send an array of SenML records.");
            return false;
        }

        if (SenmlRecordReader.Read(ref reader, ref record) is { } refusal)
        {
            SenmlRefusal.Report(refusal, Pointer(index, record.WrongLabel), record.ValueText, findings ??= new());
            return false;
        }

        return true;
    }

    private static void Resolve(
        ref SenmlRecord record, int index, in DecodeContext context, ref ChannelEntry? last, ref ReadingBuffer readings, ref FindingList? findings)
    {
        if ((record.Fields & SenmlFields.Regular) == 0)
        {
            return;
        }

        if ((record.Refusal ?? CheckValueFields(record.Fields)) is { } refusal)
        {
            SenmlRefusal.Report(refusal, Pointer(index, record.WrongLabel), record.ValueText, findings ??= new());
            return;
        }

        if (FindChannel(record, context.Route, last, index, ref findings) is { } channel)
        {
            last = channel;
            Accept(record, channel, index, context, ref readings, ref findings);
        }
    }

    private static string? CheckValueFields(SenmlFields fields)
    {
        SenmlFields values = fields & SenmlFields.AnyValue;
        return values == SenmlFields.None ? ((fields & SenmlFields.Sum) != 0 ? IntakeCode.SumWithoutValue : IntakeCode.MissingValue)
            : (values & (values - 1)) != 0 ? IntakeCode.SeveralValues
            : null;
    }

    private static ChannelEntry? FindChannel(in SenmlRecord record, TopicRoute route, ChannelEntry? last, int index, ref FindingList? findings)
    {
        if (record.BaseName.Length + record.Name.Length > LongestName)
        {
            (findings ??= new()).Add(IntakeCode.NameTooLong, Pointer(index, "n"u8), "Base name and name together are longer than 256 bytes.", record.BaseName, "Name the channel by its id.");
            return null;
        }

        Span<byte> joined = stackalloc byte[LongestName];
        record.BaseName.CopyTo(joined);
        record.Name.CopyTo(joined[record.BaseName.Length..]);
        ReadOnlySpan<byte> name = joined[..(record.BaseName.Length + record.Name.Length)];

        ChannelEntry? channel = name.IsEmpty && route.Channel is not null ? route.Channel : route.Source.Find(name, last);
        if (channel is null || (route.Channel is not null && channel != route.Channel))
        {
            (findings ??= new()).Add(
                IntakeCode.UnknownChannel, Pointer(index, "n"u8), channel is null ? "The source has no channel of this name." : "The name is not the channel of the topic.", name, "Name the channel by its id in the lab file.");
            return null;
        }

        return channel;
    }

    private static void Accept(
        in SenmlRecord record, ChannelEntry channel, int index, in DecodeContext context, ref ReadingBuffer readings, ref FindingList? findings)
    {
        ReadOnlySpan<byte> unit = record.Unit.IsEmpty ? record.BaseUnit : record.Unit;
        double value = double.IsNaN(record.Value) || (record.Fields & SenmlFields.Value) == 0 ? record.Value : record.BaseValue + record.Value;
        if (!channel.TryFindConversion(unit, out UnitConversion? conversion, out string? refusal))
        {
            (findings ??= new()).Add(refusal!, Pointer(index, "u"u8), SenmlRefusal.Unit(refusal!, channel), unit, "Send the channel's unit, or one that can become it, or mend the unit in the lab file.");
            return;
        }

        value = conversion?.Convert(value) ?? value;
        if (double.IsInfinity(value))
        {
            SenmlRefusal.Report(IntakeCode.ValueOutOfRange, Pointer(index, "v"u8), record.ValueText, findings ??= new());
        }
        else if (TryResolveTime(record.BaseTime + record.Time, index, context, out Instant time, out ReadingQuality quality, ref findings))
        {
            quality |= double.IsNaN(value) ? ReadingQuality.NoValue : channel.JudgeRange(value);
            quality |= conversion is null ? ReadingQuality.None : ReadingQuality.Converted;
            readings.Add(new Reading(channel.Id, time, value, quality));
        }
    }

    private static bool TryResolveTime(
        DecimalSeconds resolved, int index, in DecodeContext context, out Instant time, out ReadingQuality quality, ref FindingList? findings)
    {
        bool relative = resolved.Microseconds < RelativeBelowMicroseconds;
        time = new Instant(relative ? context.Arrival.Microseconds + resolved.Microseconds : resolved.Microseconds);
        string? refusal = relative && context.Retained ? IntakeCode.RetainedWithoutTime : null;
        ReadingQuality? judged = refusal is null ? context.Times.Judge(time, context.Arrival, out refusal) : null;
        quality = (judged ?? ReadingQuality.None) | (relative ? ReadingQuality.StampedOnArrival : ReadingQuality.None);
        if (refusal is not null)
        {
            SenmlRefusal.Report(refusal, Pointer(index, "t"u8), Encoding.UTF8.GetBytes(SenmlRefusal.Show(time)), findings ??= new());
        }

        return refusal is null;
    }

    private static string Pointer(int index, ReadOnlySpan<byte> label) =>
        label.IsEmpty
            ? string.Create(CultureInfo.InvariantCulture, $"/{index}")
            : string.Create(CultureInfo.InvariantCulture, $"/{index}/{Encoding.UTF8.GetString(label[..Math.Min(label.Length, 32)]).Replace("~", "~0", StringComparison.Ordinal).Replace("/", "~1", StringComparison.Ordinal)}");

    private static ReadOnlySpan<byte> Rest(ReadOnlySpan<byte> utf8, long from) => utf8[(int)Math.Min(from, utf8.Length)..];
}
