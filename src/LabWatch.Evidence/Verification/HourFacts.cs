using System.Text.Json;
using LabWatch.Lab.Time;

namespace LabWatch.Evidence.Verification;

/// <summary>What an entry tells of a sealed part besides its digest.</summary>
internal readonly record struct HourFacts(long Seal, long Readings, long LastChange, long SealedAt)
{
    /// <summary>Reads the content of an entry; null where it does not have its members.</summary>
    public static HourFacts? Read(ReadOnlySpan<byte> content)
    {
        try
        {
            Utf8JsonReader reader = new(content);
            using JsonDocument document = JsonDocument.ParseValue(ref reader);
            return document.RootElement is { ValueKind: JsonValueKind.Object } root
                && Number(root, "seal") is { } seal && Number(root, "readings") is { } readings && Number(root, "lastChange") is { } change
                && root.TryGetProperty("sealedAt", out JsonElement at) && at.ValueKind is JsonValueKind.String && Instant.TryParse(at.GetString(), out Instant sealedAt)
                ? new HourFacts(seal, readings, change, sealedAt.Microseconds)
                : null;
        }
        catch (JsonException)
        {
            return null;
        }
    }

    private static long? Number(JsonElement root, string name) =>
        root.TryGetProperty(name, out JsonElement value) && value.ValueKind is JsonValueKind.Number && value.TryGetInt64(out long number) ? number : null;
}
