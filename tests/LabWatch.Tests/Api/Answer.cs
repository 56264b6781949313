using System.Net;
using System.Text.Json;

namespace LabWatch.Tests.Api;

/// <summary>What the API answered.</summary>
internal sealed record Answer(HttpStatusCode Status, string Text, string MediaType, IReadOnlyDictionary<string, string> Headers)
{
    public JsonElement Json { get; } = MediaTypeIsJson(MediaType) ? JsonSerializer.Deserialize<JsonElement>(Text) : default;

    /// <summary>Codes of the findings of a refusal, in order.</summary>
    public string[] FindingCodes => [.. Json.GetProperty("findings").EnumerateArray().Select(finding => finding.GetProperty("code").GetString()!)];

    /// <summary>A text member of the answer.</summary>
    public string? Member(string name) => Json.GetProperty(name).GetString();

    private static bool MediaTypeIsJson(string type) => type.EndsWith("json", StringComparison.Ordinal);
}
