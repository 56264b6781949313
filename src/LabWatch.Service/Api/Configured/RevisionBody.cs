using System.Text.Json;
using System.Text.Json.Nodes;
using LabWatch.Lab.Findings;
using LabWatch.Service.Api.Requests;

namespace LabWatch.Service.Api.Configured;

/// <summary>Reads the body of a new revision: an entry in the lab file's own form with the member <c>reason</c>.</summary>
internal static class RevisionBody
{
    /// <summary>Largest body, bytes.</summary>
    public const int MaximumLength = 1024 * 1024;

    private const int LongestReason = 1_000;
    private const string ReasonMember = "reason";

    private static readonly JsonDocumentOptions Strict = new() { AllowDuplicateProperties = false, MaxDepth = 32 };

    /// <summary>The entry and the reason; or the findings.</summary>
    public static async Task<(JsonObject? Content, string Reason, IReadOnlyList<Finding> Findings)> ReadAsync(HttpRequest http, CancellationToken cancellationToken)
    {
        BodyChecks checks = new();
        JsonObject? body = null;
        try
        {
            body = await JsonNode.ParseAsync(http.Body, documentOptions: Strict, cancellationToken: cancellationToken) as JsonObject;
        }
        catch (JsonException exception)
        {
            checks.Add("not-json", string.Empty, "This is not JSON: " + exception.Message, null, "Correct the text at that place; a member may stand only once.");
            return (null, string.Empty, checks.Findings);
        }

        if (body is null)
        {
            checks.Add("wrong-type", string.Empty, "An object belongs here.", null, "Write an object in braces.");
            return (null, string.Empty, checks.Findings);
        }

        string reason = checks.Line(ReasonMember, Text(body), LongestReason);
        body.Remove(ReasonMember);
        return (checks.Findings.Count == 0 ? body : null, reason, checks.Findings);
    }

    private static string? Text(JsonObject body)
    {
        try
        {
            return body[ReasonMember] is JsonValue value && value.GetValueKind() == JsonValueKind.String ? value.GetValue<string>() : null;
        }
        catch (InvalidOperationException)
        {
            // An escape such as \ud800 alone is JSON by its grammar, but no text.
            return null;
        }
    }
}
