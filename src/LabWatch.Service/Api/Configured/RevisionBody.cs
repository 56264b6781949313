using System.Text.Json;
using System.Text.Json.Nodes;
using LabWatch.Lab.Findings;
using LabWatch.Records.Audit;
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
        catch (Exception exception) when (exception is JsonException or ArgumentException)
        {
            checks.Add("not-json", string.Empty, "This is not JSON: " + exception.Message, null, "Correct the text at that place; a member may stand only once.");
            return (null, string.Empty, checks.Findings);
        }

        if (body is null)
        {
            checks.Add("wrong-type", string.Empty, "An object belongs here.", null, "Write an object in braces.");
            return (null, string.Empty, checks.Findings);
        }

        if (!HasCanonicalForm(body))
        {
            checks.Add("not-text", string.Empty, "A number is too large, or a \\u escape is half of a surrogate pair.", null, "Correct it.");
            return (null, string.Empty, checks.Findings);
        }

        string reason = checks.Line(ReasonMember, body[ReasonMember] is JsonValue value && value.GetValueKind() == JsonValueKind.String ? value.GetValue<string>() : null, LongestReason);
        body.Remove(ReasonMember);
        return (checks.Findings.Count == 0 ? body : null, reason, checks.Findings);
    }

    private static bool HasCanonicalForm(JsonObject body)
    {
        try
        {
            return CanonicalJson.Write(body).Length > 0;
        }
        catch (Exception exception) when (exception is InvalidOperationException or ArgumentException or FormatException)
        {
            return false;
        }
    }
}
