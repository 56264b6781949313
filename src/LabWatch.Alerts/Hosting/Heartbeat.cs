using System.Globalization;
using System.Net.Http.Headers;
using System.Text;
using System.Text.Json.Nodes;
using LabWatch.Alerts.Desk;
using LabWatch.Alerts.Outbox;
using LabWatch.Lab;
using LabWatch.Lab.Alerts;
using LabWatch.Lab.Time;
using Microsoft.Extensions.Logging;

namespace LabWatch.Alerts.Hosting;

/// <summary>
/// Lets others watch the watcher: a file that is written anew every few seconds, and a request to an address, each only after the alert desk has
/// answered. A monitor that misses the beat knows that nobody would be told of anything.
/// </summary>
internal sealed class Heartbeat(
    AlertsOptions options, DeskQueue queue, AlertDesk desk, ILabSnapshotSource lab, IHttpClientFactory clients, TimeProvider clock, ILogger<Heartbeat> logger)
{
    /// <summary>Name of the file in the folder of the service's data.</summary>
    public const string FileName = "heartbeat.json";

    private static readonly TimeSpan Beat = TimeSpan.FromSeconds(10);
    private static readonly TimeSpan Patience = TimeSpan.FromSeconds(5);
    private long? _sentAt;
    private bool _failing;

    /// <summary>Beats until the token is cancelled.</summary>
    public async Task RunAsync(CancellationToken stopping)
    {
        using PeriodicTimer timer = new(Beat, clock);
        do
        {
            await BeatAsync(stopping);
        }
        while (await timer.WaitForNextTickAsync(stopping));
    }

    private async Task BeatAsync(CancellationToken stopping)
    {
        try
        {
            TaskCompletionSource answer = new(TaskCreationOptions.RunContinuationsAsynchronously);
            queue.Post(new DeskWork.Barrier(answer));
            await answer.Task.WaitAsync(Patience, clock, stopping);
            byte[] content = Content();
            WriteFile(content);
            await SendAsync(content, stopping);
            _failing = false;
        }
        catch (Exception exception) when (!stopping.IsCancellationRequested)
        {
            // A beat that fails is a beat that is missed: that is its message. It is said once, and the next one is tried.
            if (!_failing)
            {
                Log.HeartbeatMissed(logger, exception);
            }

            _failing = true;
        }
    }

    private byte[] Content()
    {
        IReadOnlyList<Alert> open = desk.View.Open;
        JsonObject beat = new()
        {
            ["site"] = lab.Current.Site.Id,
            ["at"] = Instant.Now(clock).ToString(),
            ["standingHazards"] = open.Count(alert => alert.IsHazard && alert.ReturnedAt is null),
            ["openAlerts"] = open.Count,
            ["messagesWaiting"] = desk.Pending.Count,
        };
        return Encoding.UTF8.GetBytes(beat.ToJsonString());
    }

    private void WriteFile(byte[] content)
    {
        string path = Path.Combine(options.DataDirectory, FileName);
        File.WriteAllBytes(path + ".new", content);
        File.Move(path + ".new", path, overwrite: true);
    }

    private async Task SendAsync(byte[] content, CancellationToken stopping)
    {
        bool isDue = _sentAt is not { } sent || clock.GetElapsedTime(sent) >= options.HeartbeatInterval;
        if (options.HeartbeatAddress is null || !isDue)
        {
            return;
        }

        using CancellationTokenSource timeout = new(options.WebhookTimeout, clock);
        using CancellationTokenSource both = CancellationTokenSource.CreateLinkedTokenSource(timeout.Token, stopping);
        using ByteArrayContent body = new(content);
        body.Headers.ContentType = new MediaTypeHeaderValue("application/json");
        using HttpClient client = clients.CreateClient(WebhookChannel.ClientName);
        using HttpResponseMessage answer = await client.PostAsync(new Uri(options.HeartbeatAddress), body, both.Token);
        if (!answer.IsSuccessStatusCode)
        {
            throw new HttpRequestException(string.Create(CultureInfo.InvariantCulture, $"The monitor answered {(int)answer.StatusCode}."));
        }

        _sentAt = clock.GetTimestamp();
    }
}
