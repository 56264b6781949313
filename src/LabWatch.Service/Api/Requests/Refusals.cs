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
        Unauthorized("not-signed-in", "Nobody is signed in.", "Sign in on the pages, or send a token: Authorization: Bearer lw_...");

    /// <summary>It is not known who calls.</summary>
    public static ProblemHttpResult Unauthorized(string code, string message, string cure) =>
        Refuse(StatusCodes.Status401Unauthorized, code, message, null, cure);

    /// <summary>Too much was asked in a short time; <see cref="RetryAfter"/> says how long to wait.</summary>
    public static ProblemHttpResult TooMany(string code, string message, string cure) =>
        Refuse(StatusCodes.Status429TooManyRequests, code, message, null, cure);

    /// <summary>Says in the answer's header how long to wait, in whole seconds, at least one.</summary>
    public static void RetryAfter(HttpContext http, TimeSpan wait) =>
        http.Response.Headers.RetryAfter = Math.Max(1, (long)Math.Ceiling(wait.TotalSeconds)).ToString(System.Globalization.CultureInfo.InvariantCulture);

    /// <summary>The service was called by a name that is not its own.</summary>
    public static ProblemHttpResult WrongHost(string name) =>
        Refuse(StatusCodes.Status400BadRequest, "wrong-host", "The service has no such name.", name, "Call it by the address that it printed, or add the name to Web:Hosts.");

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
