using System.Globalization;
using System.Text.Json;
using System.Text.Json.Nodes;
using LabWatch.Lab.Time;
using LabWatch.Readings.Retention;
using LabWatch.Records.Audit;

namespace LabWatch.Evidence.Recording;

/// <summary>The entry that tells which readings were removed: of one source and day, with the digests of each part before and after.</summary>
public static class RemovalNote
{
    internal const string Prefix = "removal/";

    /// <summary>The entry of parts of one source and day.</summary>
    /// <param name="parts">The parts; at least one.</param>
    /// <param name="at">When they are removed.</param>
    /// <param name="by">Who ordered it, as given.</param>
    /// <param name="reason">Why, as given.</param>
    public static AuditNote Of(IReadOnlyList<RemovablePart> parts, Instant at, string by, string reason)
    {
        ArgumentNullException.ThrowIfNull(parts);
        RemovablePart first = parts[0];
        JsonArray list = [];
        foreach (RemovablePart part in parts)
        {
            list.Add(new JsonObject
            {
                ["hour"] = part.Hour.ToString(),
                ["part"] = part.Part,
                ["seal"] = part.Seal,
                ["channels"] = new JsonArray([.. part.Channels.Select(channel => JsonValue.Create(channel))]),
                ["readings"] = part.Readings,
                ["before"] = Convert.ToHexStringLower(part.Digest.Span),
                ["after"] = Convert.ToHexStringLower(part.DigestAfter.Span),
            });
        }

        return new AuditNote(
            first.Source.Site, at, AuditActor.Service, AuditActions.ReadingsRemoved,
            string.Create(CultureInfo.InvariantCulture, $"{Prefix}{first.Source.Source}/{first.Hour.ToString()[..10]}"),
            new JsonObject { ["source"] = first.Source.Source, ["by"] = by, ["reason"] = reason, ["parts"] = list },
            null);
    }

    /// <summary>The digests before and after of every part that an entry tells of; what is no such entry gives none.</summary>
    internal static IEnumerable<(string Before, string After)> Read(ReadOnlySpan<byte> content)
    {
        try
        {
            return JsonNode.Parse(content)?["parts"] is JsonArray parts
                ? [.. parts.OfType<JsonObject>().Select(part => (Text(part["before"]), Text(part["after"]))).Where(one => one.Item1.Length > 0 && one.Item2.Length > 0)]
                : [];
        }
        catch (JsonException)
        {
            return [];
        }
    }

    private static string Text(JsonNode? node) => node is JsonValue value && value.TryGetValue(out string? text) ? text : string.Empty;
}
