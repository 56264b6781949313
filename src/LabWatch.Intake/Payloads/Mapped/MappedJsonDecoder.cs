using System.Globalization;
using System.Text;
using System.Text.Json;
using LabWatch.Intake.Units;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Time;

namespace LabWatch.Intake.Payloads.Mapped;

/// <summary>Decodes the JSON of a gateway by a mapping. A value that cannot be a reading is refused by itself; the others are kept.</summary>
internal static class MappedJsonDecoder
{
    public static void Decode(ReadOnlyMemory<byte> utf8, PayloadMapping mapping, in DecodeContext context, ref ReadingBuffer readings, ref FindingList? findings)
    {
        JsonDocument document;
        try
        {
            document = JsonDocument.Parse(utf8, new JsonDocumentOptions { MaxDepth = context.Limits.MaximumDepth });
        }
        catch (JsonException exception)
        {
            (findings ??= new()).Add(IntakeCode.MalformedJson, "payload", "The payload breaks the grammar of JSON or is nested too deeply.", Encoding.UTF8.GetBytes(exception.Message), "Send JSON.");
            return;
        }

        using (document)
        {
            try
            {
                DecodeDocument(document.RootElement, mapping, context, ref readings, ref findings);
            }
            catch (InvalidOperationException)
            {
                // A text with half a surrogate pair: nothing of the message is believed.
                readings.Clear();
                (findings ??= new()).AddWithoutValue(IntakeCode.MalformedJson, "payload", "A text of the payload is no Unicode.", "Send whole characters.");
            }
        }
    }

    private static void DecodeDocument(JsonElement root, PayloadMapping mapping, in DecodeContext context, ref ReadingBuffer readings, ref FindingList? findings)
    {
        if (mapping.Items is null)
        {
            DecodeItem(root, string.Empty, mapping, context, ref readings, ref findings);
            return;
        }

        if (!mapping.Items.TryEvaluate(root, out JsonElement items) || items.ValueKind != JsonValueKind.Array)
        {
            (findings ??= new()).AddWithoutValue(IntakeCode.MappedMissing, mapping.Items.Text, "There is no array here.", "Mend the mapping or the gateway.");
            return;
        }

        if ((long)items.GetArrayLength() * mapping.Values.Count > context.Limits.MaximumRecords)
        {
            (findings ??= new()).AddWithoutValue(IntakeCode.TooManyRecords, mapping.Items.Text, "The message holds more values than the limit of records.", "Send smaller messages or raise the limit.");
            return;
        }

        int index = 0;
        foreach (JsonElement item in items.EnumerateArray())
        {
            DecodeItem(item, string.Create(CultureInfo.InvariantCulture, $"{mapping.Items.Text}/{index}"), mapping, context, ref readings, ref findings);
            index++;
        }
    }

    private static void DecodeItem(JsonElement item, string place, PayloadMapping mapping, in DecodeContext context, ref ReadingBuffer readings, ref FindingList? findings)
    {
        if (!TryTime(item, place, mapping, context, out Instant time, out ReadingQuality quality, ref findings))
        {
            return;
        }

        ChannelEntry? last = null;
        foreach (MappedValue mapped in mapping.Values)
        {
            string where = place + mapped.Pointer.Text;
            ChannelEntry? channel = context.Route.Source.Find(Encoding.UTF8.GetBytes(mapped.Channel), last);
            UnitConversion? conversion = null;
            string? refusal = null;
            if (channel is null)
            {
                (findings ??= new()).AddWithoutValue(IntakeCode.UnknownChannel, where, $"The source has no channel {mapped.Channel}.", "Mend the mapping or add the channel to the lab file.");
            }
            else if (!mapped.Pointer.TryEvaluate(item, out JsonElement element))
            {
                (findings ??= new()).AddWithoutValue(IntakeCode.MappedMissing, where, "There is no value here.", "Mend the mapping or the gateway.");
            }
            else if (!channel.TryFindConversion(mapped.Unit, out conversion, out refusal))
            {
                (findings ??= new()).Add(refusal!, where, SenmlRefusal.Unit(refusal!, channel), mapped.Unit, "Mend the unit of the mapping.");
            }
            else if (!TryNumber(element, out double value))
            {
                SenmlRefusal.Report(IntakeCode.ValueNotNumber, where, Encoding.UTF8.GetBytes(element.GetRawText()), findings ??= new());
            }
            else if (double.IsInfinity(value = conversion?.Convert(value) ?? value))
            {
                SenmlRefusal.Report(IntakeCode.ValueOutOfRange, where, Encoding.UTF8.GetBytes(element.GetRawText()), findings ??= new());
            }
            else
            {
                last = channel;
                ReadingQuality judged = double.IsNaN(value) ? ReadingQuality.NoValue : channel.JudgeRange(value);
                readings.Add(new Reading(channel.Id, time, value, quality | judged | (conversion is null ? ReadingQuality.None : ReadingQuality.Converted)));
            }
        }
    }

    private static bool TryTime(
        JsonElement item, string place, PayloadMapping mapping, in DecodeContext context, out Instant time, out ReadingQuality quality, ref FindingList? findings)
    {
        time = context.Arrival;
        quality = ReadingQuality.StampedOnArrival;
        if (mapping.Time is null)
        {
            if (context.Retained)
            {
                SenmlRefusal.Report(IntakeCode.RetainedWithoutTime, place, default, findings ??= new());
            }

            return !context.Retained;
        }

        string where = place + mapping.Time.Text;
        if (!mapping.Time.TryEvaluate(item, out JsonElement element))
        {
            (findings ??= new()).AddWithoutValue(IntakeCode.MappedMissing, where, "There is no time here.", "Mend the mapping or the gateway.");
            return false;
        }

        if (!MappedTimes.TryRead(element, mapping.Options.TimeFormat, out time))
        {
            SenmlRefusal.Report(IntakeCode.TimeOutOfRange, where, Encoding.UTF8.GetBytes(element.GetRawText()), findings ??= new());
            return false;
        }

        quality = context.Times.Judge(time, context.Arrival, out string? refusal) ?? ReadingQuality.None;
        if (refusal is not null)
        {
            SenmlRefusal.Report(refusal, where, Encoding.UTF8.GetBytes(SenmlRefusal.Show(time)), findings ??= new());
        }

        return refusal is null;
    }

    private static bool TryNumber(JsonElement element, out double value)
    {
        value = double.NaN;
        switch (element.ValueKind)
        {
            case JsonValueKind.Null:
                return true;
            case JsonValueKind.True or JsonValueKind.False:
                value = element.ValueKind == JsonValueKind.True ? 1 : 0;
                return true;
            case JsonValueKind.Number:
                return element.TryGetDouble(out value);
            case JsonValueKind.String:
                return BareNumberDecoder.TryParse(Encoding.UTF8.GetBytes(element.GetString() ?? string.Empty), out value);
            default:
                return false;
        }
    }
}
