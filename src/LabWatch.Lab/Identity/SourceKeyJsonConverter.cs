using System.Text.Json;
using System.Text.Json.Serialization;

namespace LabWatch.Lab.Identity;

/// <summary>Writes and reads a <see cref="SourceKey"/> as <c>site.source</c>.</summary>
public sealed class SourceKeyJsonConverter : JsonConverter<SourceKey>
{
    /// <inheritdoc/>
    public override SourceKey Read(ref Utf8JsonReader reader, Type typeToConvert, JsonSerializerOptions options) =>
        reader.TokenType == JsonTokenType.String && SourceKey.TryParse(reader.GetString(), out SourceKey key)
            ? key
            : throw new JsonException("A source key must be two ids joined by a full stop, for example hollin-vale.fir.");

    /// <inheritdoc/>
    public override void Write(Utf8JsonWriter writer, SourceKey value, JsonSerializerOptions options)
    {
        ArgumentNullException.ThrowIfNull(writer);
        writer.WriteStringValue(value.ToString());
    }
}
