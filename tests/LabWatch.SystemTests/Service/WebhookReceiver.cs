using System.Collections.Concurrent;
using Microsoft.AspNetCore.Builder;
using Microsoft.AspNetCore.Http;
using Microsoft.Extensions.Logging;

namespace LabWatch.SystemTests.Service;

/// <summary>Somebody else's HTTP server that takes messages and remembers them.</summary>
internal sealed class WebhookReceiver : IAsyncDisposable
{
    private readonly WebApplication _app;
    private readonly ConcurrentQueue<string> _bodies = new();

    private WebhookReceiver(WebApplication app, Uri address)
    {
        _app = app;
        Address = address;
    }

    /// <summary>Where to post to.</summary>
    public Uri Address { get; }

    /// <summary>What was posted, in order.</summary>
    public IReadOnlyCollection<string> Bodies => _bodies;

    /// <summary>Starts on a free port of this machine.</summary>
    public static WebhookReceiver Start()
    {
        Uri address = new($"http://127.0.0.1:{LabWatchProcess.FreePort()}/messages");
        WebApplicationBuilder builder = WebApplication.CreateSlimBuilder();
        builder.Logging.ClearProviders();
        WebApplication app = builder.Build();
        WebhookReceiver receiver = new(app, address);
        app.MapPost("/messages", async (HttpRequest request) =>
        {
            using StreamReader reader = new(request.Body);
            receiver._bodies.Enqueue(await reader.ReadToEndAsync());
            return Results.Ok();
        });
        app.Urls.Add(address.GetLeftPart(UriPartial.Authority));
        _ = app.RunAsync();
        return receiver;
    }

    public ValueTask DisposeAsync() => _app.DisposeAsync();
}
