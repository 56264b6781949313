using System.Collections.Concurrent;
using System.Net;

namespace LabWatch.Tests.Alerts;

/// <summary>Stands at the end of the webhook's HTTP client and answers as the test says.</summary>
internal sealed class WebhookReceiver : HttpMessageHandler
{
    public ConcurrentQueue<ReceivedRequest> Received { get; } = new();

    /// <summary>Answers the n-th request, counted from 1.</summary>
    public Func<int, CancellationToken, Task<HttpResponseMessage>> Answer { get; set; } = (_, _) => Task.FromResult(new HttpResponseMessage(HttpStatusCode.NoContent));

    protected override async Task<HttpResponseMessage> SendAsync(HttpRequestMessage request, CancellationToken cancellationToken)
    {
        byte[] body = await request.Content!.ReadAsByteArrayAsync(cancellationToken);
        Dictionary<string, string> headers = request.Headers.Concat(request.Content.Headers)
            .ToDictionary(header => header.Key, header => string.Join(", ", header.Value), StringComparer.OrdinalIgnoreCase);
        int number;
        lock (Received)
        {
            Received.Enqueue(new ReceivedRequest(request.Method, request.RequestUri!, headers, body));
            number = Received.Count;
        }

        return await Answer(number, cancellationToken);
    }
}

internal sealed record ReceivedRequest(HttpMethod Method, Uri Address, IReadOnlyDictionary<string, string> Headers, byte[] Body);
