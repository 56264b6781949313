using System.Buffers.Text;
using LabWatch.Records;
using LabWatch.Service.Api.Access;
using LabWatch.Service.Api.Live;
using LabWatch.Service.Api.Requests;
using LabWatch.Service.Api.Views;
using Microsoft.AspNetCore.Http.Features;
using Microsoft.Net.Http.Headers;

namespace LabWatch.Service.Api.Streaming;

/// <summary>Changes as they happen, as server-sent events (HTML Living Standard, 9.2).</summary>
internal static class StreamEndpoints
{
    /// <summary>Maps the endpoint into the group of the API's version.</summary>
    public static void Map(RouteGroupBuilder api) =>
        api.MapGet("stream", ListenAsync)
            .Allow(Permission.Read)
            .WithTags("Stream")
            .WithName("Listen")
            .WithSummary("Changes as server-sent events: a snapshot, then every change")
            .WithDescription(
                "The first event, on every connection (with Last-Event-ID too), is `snapshot`; then `source` (status of a source), `alert`, `assessment`, `progress` and, where nothing else happens, `clock`. "
                + "Each replaces what was known of the same id. A client that does not keep up is cut and starts again with a snapshot.")
            .Produces<SnapshotView>(StatusCodes.Status200OK, "text/event-stream")
            .ProducesProblem(StatusCodes.Status503ServiceUnavailable);

    private static async Task ListenAsync(HttpContext context, StreamHub hub, SiteBoard board, StreamOptions options, ICallers callers)
    {
        using StreamClient? client = hub.Join();
        if (client is null)
        {
            context.Response.Headers.RetryAfter = "10";
            await Refusals.Unavailable("too-many-listeners", "No more pages can listen now.", "Try again later, or read the lists instead.").ExecuteAsync(context);
            return;
        }

        try
        {
            using CancellationTokenSource end = CancellationTokenSource.CreateLinkedTokenSource(context.RequestAborted, client.Cut);
            Task watched = WatchAsync(context, client, callers, options, end.Token);
            try
            {
                await SendAsync(context, client, hub, board, options, end.Token);
            }
            finally
            {
                await end.CancelAsync();
                await watched;
            }
        }
        catch (OperationCanceledException) when (context.RequestAborted.IsCancellationRequested || client.Cut.IsCancellationRequested)
        {
            // The listener has gone, or was cut because it does not keep up: it comes back by itself.
            context.Abort();
        }
        finally
        {
            hub.Leave(client);
        }
    }

    // The stream ends with the session or token that it was asked for with: signed out, expired, taken back, closed account, lost role.
    private static async Task WatchAsync(HttpContext context, StreamClient client, ICallers callers, StreamOptions options, CancellationToken cancellationToken)
    {
        while (!cancellationToken.IsCancellationRequested)
        {
            await Task.Delay(options.CallerCheck, options.Clock, cancellationToken).ConfigureAwait(ConfigureAwaitOptions.SuppressThrowing);
            try
            {
                if (await callers.FindAsync(context) is { } caller && caller.May(Permission.Read))
                {
                    continue;
                }

                client.End();
                return;
            }
            catch (Exception exception) when (exception is RecordsUnavailableException or OperationCanceledException)
            {
                // Nobody can tell now; the next look will.
            }
        }
    }

    private static async Task SendAsync(
        HttpContext context, StreamClient client, StreamHub hub, SiteBoard board, StreamOptions options, CancellationToken cancellationToken)
    {
        long lastId = hub.LastId;
        byte[] snapshot = hub.Write(await board.SnapshotAsync(cancellationToken));
        context.Response.ContentType = "text/event-stream; charset=utf-8";
        context.Response.Headers.CacheControl = "no-store";
        context.Response.Headers["X-Accel-Buffering"] = "no";
        context.Response.Headers[HeaderNames.ContentEncoding] = "identity";
        context.Features.Get<IHttpResponseBodyFeature>()?.DisableBuffering();
        Stream body = context.Response.Body;
        await body.WriteAsync("retry: 2000\n"u8.ToArray(), cancellationToken);
        await WriteAsync(body, new StreamMessage(lastId, "snapshot", snapshot), cancellationToken);
        while (true)
        {
            Task<bool> next = client.Waiting.WaitToReadAsync(cancellationToken).AsTask();
            while (!await HeardAsync(next, options))
            {
                // A comment for whatever sits between, and the service's clock for the page, which cannot see comments.
                await body.WriteAsync(": still here\n"u8.ToArray(), cancellationToken);
                await WriteAsync(body, new StreamMessage(hub.LastId, "clock", hub.Write(new ClockEvent(board.Site().Now))), cancellationToken);
            }

            if (!await next)
            {
                return;
            }

            while (client.Waiting.TryRead(out StreamMessage? message))
            {
                await WriteAsync(body, message, cancellationToken);
            }
        }
    }

    private static async Task<bool> HeardAsync(Task<bool> next, StreamOptions options)
    {
        if (next.IsCompleted)
        {
            return true;
        }

        using CancellationTokenSource heard = new();
        Task pause = Task.Delay(options.Heartbeat, options.Clock, heard.Token);
        Task first = await Task.WhenAny(next, pause);
        await heard.CancelAsync();
        return ReferenceEquals(first, next);
    }

    private static async Task WriteAsync(Stream body, StreamMessage message, CancellationToken cancellationToken)
    {
        byte[] number = new byte[20];
        Utf8Formatter.TryFormat(message.Id, number, out int digits);
        await body.WriteAsync("id: "u8.ToArray(), cancellationToken);
        await body.WriteAsync(number.AsMemory(0, digits), cancellationToken);
        await body.WriteAsync("\nevent: "u8.ToArray(), cancellationToken);
        await body.WriteAsync(System.Text.Encoding.ASCII.GetBytes(message.Event), cancellationToken);
        await body.WriteAsync("\ndata: "u8.ToArray(), cancellationToken);
        await body.WriteAsync(message.Data, cancellationToken);
        await body.WriteAsync("\n\n"u8.ToArray(), cancellationToken);
        await body.FlushAsync(cancellationToken);
    }
}
