using System.Globalization;
using System.Text.Json;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Time;

namespace LabWatch.Intake.Import;

/// <summary>Writes readings as SenML (RFC 8428), times as decimal seconds.</summary>
internal static class SenmlText
{
    /// <summary>Writes one record.</summary>
    public static void Write(Utf8JsonWriter writer, string channel, Instant time, double value, string? unit)
    {
        writer.WriteStartObject();
        writer.WriteString("n"u8, channel);
        writer.WritePropertyName("t"u8);
        writer.WriteRawValue(((decimal)time.Microseconds / Instant.MicrosecondsPerSecond).ToString(CultureInfo.InvariantCulture), skipInputValidation: true);
        if (unit is not null)
        {
            writer.WriteString("u"u8, unit);
        }

        if (double.IsNaN(value))
        {
            writer.WriteNull("v"u8);
        }
        else
        {
            writer.WriteNumber("v"u8, value);
        }

        writer.WriteEndObject();
    }

    /// <summary>Readings in their channels' units as a pack.</summary>
    public static byte[] Pack(IReadOnlyList<Reading> readings)
    {
        using MemoryStream stream = new();
        using (Utf8JsonWriter writer = new(stream))
        {
            writer.WriteStartArray();
            foreach (Reading reading in readings)
            {
                Write(writer, reading.Channel, reading.Time, reading.Value, null);
            }

            writer.WriteEndArray();
        }

        return stream.ToArray();
    }
}
