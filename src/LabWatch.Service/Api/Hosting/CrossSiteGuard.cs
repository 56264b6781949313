using LabWatch.Service.Api.Access;
using LabWatch.Service.Api.Requests;
using Microsoft.AspNetCore.Http.HttpResults;

namespace LabWatch.Service.Api.Hosting;

/// <summary>
/// Refuses requests that change something and that another site's page makes a browser send. Browsers say so themselves: Fetch Metadata
/// (Sec-Fetch-Site), and those that do not know it, the Origin of the page. A request with our cookie and neither comes from no browser of
/// this decade, and is refused too; so a cookie alone never changes anything. A client that is no browser sends a token, and none of these.
/// A body must be JSON, which a form of another site cannot send.
/// </summary>
internal static class CrossSiteGuard
{
    /// <summary>Adds the guard.</summary>
    public static void Use(IApplicationBuilder app) => app.Use(static (context, next) =>
        (IsChange(context.Request) ? Refusal(context.Request) : null) is { } refusal ? refusal.ExecuteAsync(context) : next(context));

    private static bool IsChange(HttpRequest request) =>
        !(HttpMethods.IsGet(request.Method) || HttpMethods.IsHead(request.Method) || HttpMethods.IsOptions(request.Method));

    private static ProblemHttpResult? Refusal(HttpRequest request)
    {
        if (Where(request) is { } elsewhere)
        {
            return Refusals.Forbidden("cross-site", "Another site's page sent this request.", elsewhere, "Use the pages of this service, or a client of your own.");
        }

        bool hasBody = request.ContentLength is > 0 || request.Headers.TransferEncoding.Count > 0;
        return hasBody && !request.HasJsonContentType() ? Refusals.Malformed(StatusCodes.Status415UnsupportedMediaType) : null;
    }

    // What speaks against the request; null where nothing does.
    private static string? Where(HttpRequest request)
    {
        string? site = request.Headers["Sec-Fetch-Site"];
        if (!string.IsNullOrEmpty(site))
        {
            return site is "same-origin" or "none" ? null : site;
        }

        string? origin = request.Headers.Origin;
        if (!string.IsNullOrEmpty(origin))
        {
            return string.Equals(origin, $"{request.Scheme}://{request.Host}", StringComparison.OrdinalIgnoreCase) ? null : origin;
        }

        bool hasCookie = string.IsNullOrEmpty(request.Headers.Authorization) && request.Cookies.ContainsKey(SessionCookie.NameFor(request));
        return hasCookie ? "no Sec-Fetch-Site and no Origin" : null;
    }
}
