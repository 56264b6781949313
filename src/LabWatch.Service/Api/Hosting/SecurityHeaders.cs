namespace LabWatch.Service.Api.Hosting;

/// <summary>Headers that keep a browser from doing with our pages what they never need.</summary>
internal static class SecurityHeaders
{
    private const string Policy =
        "default-src 'none'; script-src 'self'; style-src 'self'; img-src 'self' data:; connect-src 'self'; font-src 'self'; manifest-src 'self'; "
        + "worker-src 'self'; base-uri 'none'; form-action 'self'; frame-ancestors 'none'";

    private const string OneYear = "max-age=31536000";

    private static readonly string[] LoopbackNames = ["localhost", "127.0.0.1", "[::1]"];

    /// <summary>Adds the headers to every answer.</summary>
    public static void Use(IApplicationBuilder app) => app.Use(static (context, next) =>
    {
        IHeaderDictionary headers = context.Response.Headers;
        headers.ContentSecurityPolicy = Policy;
        headers.XContentTypeOptions = "nosniff";
        headers["Referrer-Policy"] = "no-referrer";
        headers["Cross-Origin-Opener-Policy"] = "same-origin";
        headers["Cross-Origin-Resource-Policy"] = "same-origin";
        headers["Permissions-Policy"] = "camera=(), geolocation=(), microphone=(), payment=(), usb=()";

        // What was answered to one person is not to be found by the next at the same browser.
        if (!IsPage(context.Request.Path))
        {
            headers.CacheControl = "no-store";
        }

        // Not on loopback: other services of a machine share that name, and may speak plain http.
        if (context.Request.IsHttps && !LoopbackNames.Contains(context.Request.Host.Host, StringComparer.OrdinalIgnoreCase))
        {
            headers.StrictTransportSecurity = OneYear;
        }

        return next(context);
    });

    private static bool IsPage(PathString path) =>
        !(path.StartsWithSegments("/api", StringComparison.OrdinalIgnoreCase) || path.StartsWithSegments("/metrics", StringComparison.OrdinalIgnoreCase)
            || path.StartsWithSegments("/health", StringComparison.OrdinalIgnoreCase));
}
