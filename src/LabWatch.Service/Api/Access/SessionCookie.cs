using System.Globalization;

namespace LabWatch.Service.Api.Access;

/// <summary>
/// The cookie of a session: out of reach of scripts, never sent from another site's page, over https bound to this host alone
/// (<c>__Host-</c>, RFC 6265bis). Cookies do not tell ports apart, so the name does: two services on one machine keep to their own.
/// </summary>
internal static class SessionCookie
{
    /// <summary>Name of the cookie for a request.</summary>
    public static string NameFor(HttpRequest request)
    {
        string name = request.Host.Port is { } port ? string.Create(CultureInfo.InvariantCulture, $"labwatch-{port}") : "labwatch";
        return request.IsHttps ? "__Host-" + name : name;
    }

    /// <summary>Gives the cookie to the browser.</summary>
    public static void Set(HttpContext http, string secret, TimeSpan life) =>
        http.Response.Cookies.Append(NameFor(http.Request), secret, Options(http, life));

    /// <summary>Takes it away.</summary>
    public static void Remove(HttpContext http) => http.Response.Cookies.Delete(NameFor(http.Request), Options(http, null));

    private static CookieOptions Options(HttpContext http, TimeSpan? life) => new()
    {
        HttpOnly = true,
        Secure = http.Request.IsHttps,
        SameSite = SameSiteMode.Strict,
        Path = "/",
        IsEssential = true,
        MaxAge = life,
    };
}
