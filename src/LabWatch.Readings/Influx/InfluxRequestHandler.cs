using System.Globalization;
using System.Net.Http.Headers;
using System.Text;

namespace LabWatch.Readings.Influx;

/// <summary>
/// Sends requests the way that the server's generation expects: writes to the path of the options, and who asks. The client library knows
/// only the path of 2.x.
/// </summary>
internal sealed class InfluxRequestHandler(InfluxDbReadingsOptions options, Func<string?> readSecret) : DelegatingHandler(new SocketsHttpHandler
{
    ConnectTimeout = TimeSpan.FromSeconds(2),
    PooledConnectionIdleTimeout = TimeSpan.FromSeconds(30),
})
{
    private const string LibraryPath = "/api/v2/write";

    protected override Task<HttpResponseMessage> SendAsync(HttpRequestMessage request, CancellationToken cancellationToken)
    {
        if (readSecret() is { } secret)
        {
            request.Headers.Authorization = options.User is { } user
                ? new AuthenticationHeaderValue("Basic", Convert.ToBase64String(Encoding.UTF8.GetBytes($"{user}:{secret}")))
                : new AuthenticationHeaderValue("Token", secret);
        }

        if (request.RequestUri is { } uri && uri.AbsolutePath.EndsWith(LibraryPath, StringComparison.Ordinal) && !options.WritePath.EndsWith(LibraryPath, StringComparison.Ordinal))
        {
            request.RequestUri = new Uri(Root() + options.WritePath + "?" + DatabaseQuery(options) + "&precision=u");
        }

        return base.SendAsync(request, cancellationToken);
    }

    /// <summary>The database, and its retention policy where one is named, as a query string.</summary>
    public static string DatabaseQuery(InfluxDbReadingsOptions options)
    {
        string[] parts = options.Database.Split('/');
        string policy = parts.Length > 1 ? "&rp=" + Uri.EscapeDataString(parts[1]) : string.Empty;
        return string.Create(CultureInfo.InvariantCulture, $"db={Uri.EscapeDataString(parts[0])}{policy}");
    }

    private string Root() => options.Url!.TrimEnd('/');
}
