using System.Collections.Concurrent;
using System.Security.Cryptography.X509Certificates;
using Microsoft.AspNetCore.Builder;
using Microsoft.AspNetCore.Hosting;
using Microsoft.AspNetCore.Http;
using Microsoft.Extensions.Logging;

namespace LabWatch.SystemTests.Service;

/// <summary>Somebody else's HTTPS server: a gateway that takes webhooks, and a push service.</summary>
internal sealed class HttpsReceiver : IAsyncDisposable
{
    private readonly WebApplication _app;
    private readonly ConcurrentQueue<(string Path, IReadOnlyDictionary<string, string> Headers, byte[] Body)> _received = new();

    private HttpsReceiver(WebApplication app, Uri address)
    {
        _app = app;
        Address = address;
    }

    /// <summary>Where it is.</summary>
    public Uri Address { get; }

    /// <summary>What was posted to a path, in order.</summary>
    public IReadOnlyList<(string Path, IReadOnlyDictionary<string, string> Headers, byte[] Body)> At(string path) => [.. _received.Where(one => one.Path == path)];

    /// <summary>Starts on a free port of this machine.</summary>
    public static HttpsReceiver Start(X509Certificate2 certificate)
    {
        int port = LabWatchProcess.FreePort();
        WebApplicationBuilder builder = WebApplication.CreateSlimBuilder();
        builder.Logging.ClearProviders();
        builder.WebHost.UseKestrelHttpsConfiguration();
        builder.WebHost.ConfigureKestrel(kestrel => kestrel.ListenLocalhost(port, listen => listen.UseHttps(certificate)));
        WebApplication app = builder.Build();
        HttpsReceiver receiver = new(app, new Uri($"https://localhost:{port}"));
        app.MapPost("{**path}", async (HttpRequest request) =>
        {
            using MemoryStream body = new();
            await request.Body.CopyToAsync(body);
            Dictionary<string, string> headers = request.Headers.ToDictionary(header => header.Key, header => header.Value.ToString(), StringComparer.OrdinalIgnoreCase);
            receiver._received.Enqueue((request.Path, headers, body.ToArray()));
            return Results.StatusCode(StatusCodes.Status201Created);
        });
        _ = app.RunAsync();
        return receiver;
    }

    public ValueTask DisposeAsync() => _app.DisposeAsync();
}
