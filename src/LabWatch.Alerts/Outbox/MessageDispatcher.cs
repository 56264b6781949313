using System.Collections.Concurrent;
using System.Text.Json;
using LabWatch.Alerts.Desk;
using LabWatch.Alerts.Journal;
using LabWatch.Lab.Alerts;
using LabWatch.Records.Alerts;
using Microsoft.Extensions.Logging;

namespace LabWatch.Alerts.Outbox;

/// <summary>Deals messages out to the lanes of their notifiers, as soon as they are durable.</summary>
internal sealed class MessageDispatcher(MessageSender sender, AlertsOptions options, ILogger<MessageDispatcher> logger) : IEntryListener, IDisposable
{
    private static readonly TimeSpan DrainTime = TimeSpan.FromSeconds(5);

    private readonly ConcurrentDictionary<string, NotifierLane> _lanes = new(StringComparer.Ordinal);
    private readonly CancellationTokenSource _stopping = new();

    /// <inheritdoc/>
    public void OnEntries(IReadOnlyList<JournalEntry> entries)
    {
        foreach (JournalEntry entry in entries)
        {
            foreach (OutboxMessage message in entry.Messages ?? [])
            {
                Send(message, entry.Transition!.Alert.IsHazard);
            }

            if (entry.Pending is { } pending)
            {
                Send(pending);
            }
        }
    }

    /// <summary>Sends a message that stands from an earlier time.</summary>
    public void Send(OutboxMessage message) => Send(message, IsHazard(message));

    /// <summary>Starts nothing new, and waits a little for the attempts under way.</summary>
    public async Task StopAsync(TimeProvider clock)
    {
        await _stopping.CancelAsync();
        try
        {
            await Task.WhenAll(_lanes.Values.Select(lane => lane.DrainAsync())).WaitAsync(DrainTime, clock);
        }
        catch (TimeoutException)
        {
            // What is still under way counts as not sent: it goes again after the next start, with the same id.
        }
    }

    /// <inheritdoc/>
    public void Dispose() => _stopping.Dispose();

    private void Send(OutboxMessage message, bool hazard)
    {
        if (!_stopping.IsCancellationRequested)
        {
            _lanes.GetOrAdd(message.Notifier, id => new NotifierLane(id, sender, options.ParallelAttempts, logger, _stopping.Token)).Add(message, hazard);
        }
    }

    private static bool IsHazard(OutboxMessage message) =>
        JsonSerializer.Deserialize(message.Body, MessageJson.Default.MessageBody) is { } body && HazardCode.IsHazard(body.Code);
}
