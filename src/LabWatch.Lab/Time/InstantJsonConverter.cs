using System.Text.Json;
using System.Text.Json.Serialization;

namespace LabWatch.Lab.Time;

/// <summary>Writes an <see cref="Instant"/> as RFC 3339 in UTC and reads RFC 3339 with any offset.</summary>
public sealed class InstantJsonConverter : JsonConverter<Instant>
{
    /// <inheritdoc/>
    public override Instant Read(ref Utf8JsonReader reader, Type typeToConvert, JsonSerializerOptions options) =>
        reader.TokenType == JsonTokenType.String && Instant.TryParse(reader.GetString(), out Instant instant)
            ? instant
            : throw new JsonException("A time must be RFC 3339 with an offset, for example 2026-12-01T08:15:30Z.");

    /// <inheritdoc/>
    public override void Write(Utf8JsonWriter writer, Instant value, JsonSerializerOptions options)
    {
        ArgumentNullException.ThrowIfNull(writer);
        writer.WriteStringValue(value.ToString());
    }
}
