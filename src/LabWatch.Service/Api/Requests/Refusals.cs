using LabWatch.Lab.Findings;
using Microsoft.AspNetCore.Http.HttpResults;
using Microsoft.AspNetCore.Mvc;

namespace LabWatch.Service.Api.Requests;

/// <summary>Answers to requests that cannot be done: problem details (RFC 9457) that carry the findings.</summary>
internal static class Refusals
{
    /// <summary>The request is wrong: every finding is listed.</summary>
    public static ProblemHttpResult BadRequest(IReadOnlyList<Finding> findings) =>
        Problem(StatusCodes.Status400BadRequest, "The request has mistakes.", string.Join(' ', findings.Select(finding => finding.ToString())), findings);

    /// <summary>The request is understood but not done: every finding is listed.</summary>
    public static ProblemHttpResult Refuse(int status, string title, IReadOnlyList<Finding> findings) =>
        Problem(status, title, string.Join(' ', findings.Select(finding => finding.ToString())), findings);

    /// <summary>There is no such thing.</summary>
    public static ProblemHttpResult NotFound(string what, string? id, string cure) =>
        Refuse(StatusCodes.Status404NotFound, "not-found", $"There is no such {what}.", id, cure);

    /// <summary>The thing is not in a state in which this can be done.</summary>
    public static ProblemHttpResult Conflict(string code, string message, string? value, string cure) =>
        Refuse(StatusCodes.Status409Conflict, code, message, value, cure);

    /// <summary>A part of the service does not answer now; the same request may succeed later.</summary>
    public static ProblemHttpResult Unavailable(string code, string message, string cure) =>
        Refuse(StatusCodes.Status503ServiceUnavailable, code, message, null, cure);

    /// <summary>The caller may not do this.</summary>
    public static ProblemHttpResult Forbidden(string code, string message, string? value, string cure) =>
        Refuse(StatusCodes.Status403Forbidden, code, message, value, cure);

    /// <summary>Nobody is signed in.</summary>
    public static ProblemHttpResult NotSignedIn() =>
        Refuse(StatusCodes.Status401Unauthorized, "not-signed-in", "Nobody is signed in.", null, "Sign in on the pages, or send a token: Authorization: Bearer lw_...");

    /// <summary>The request could not be read at all.</summary>
    public static ProblemHttpResult Malformed(int status) =>
        Refuse(status, "malformed", "The request could not be read.", null, "Send JSON with Content-Type: application/json, as /openapi/v1.json describes it.");

    /// <summary>A defect of the service.</summary>
    public static ProblemHttpResult Failed() =>
        Refuse(StatusCodes.Status500InternalServerError, "failed", "The service failed to answer.", null, "The log of the service has the details; please report it as a defect.");

    private static ProblemHttpResult Refuse(int status, string code, string message, string? value, string cure) =>
        Problem(status, message, cure, [new Finding(code, "request", message, Finding.Quote(value), cure)]);

    private static ProblemHttpResult Problem(int status, string title, string detail, IReadOnlyList<Finding> findings) =>
        TypedResults.Problem(new ProblemDetails
        {
            Status = status,
            Title = title,
            Detail = detail,
            Extensions = { ["findings"] = findings },
        });
}
