using LabWatch.Records.Alerts;
using Microsoft.Extensions.Logging;

namespace LabWatch.Alerts.Outbox;

/// <summary>
/// Sends the messages of one notifier. Messages about the same alert go one after the other, in order; hazards have attempts of their own, so
/// that no other message holds them up.
/// </summary>
internal sealed class NotifierLane : IDisposable
{
    private readonly string _notifier;
    private readonly MessageSender _sender;
    private readonly CancellationToken _stopping;
    private readonly ILogger _logger;
    private readonly Dictionary<Guid, Queue<OutboxMessage>> _byAlert = [];
    private readonly HashSet<string> _known = new(StringComparer.Ordinal);
    private readonly HashSet<Task> _running = [];
    private readonly SemaphoreSlim _hazards;
    private readonly SemaphoreSlim _others;
    private readonly Lock _gate = new();

    public NotifierLane(string notifier, MessageSender sender, int parallel, ILogger logger, CancellationToken stopping)
    {
        _notifier = notifier;
        _sender = sender;
        _stopping = stopping;
        _logger = logger;
        _hazards = new SemaphoreSlim(parallel);
        _others = new SemaphoreSlim(parallel);
    }

    /// <summary>Adds a message; one that is here already changes nothing.</summary>
    public void Add(OutboxMessage message, bool hazard)
    {
        lock (_gate)
        {
            if (!_known.Add(message.Id))
            {
                return;
            }

            if (_byAlert.TryGetValue(message.AlertId, out Queue<OutboxMessage>? queue))
            {
                queue.Enqueue(message);
                return;
            }

            _byAlert[message.AlertId] = new Queue<OutboxMessage>([message]);
            Task task = Task.Run(() => RunAsync(message.AlertId, hazard), CancellationToken.None);
            _running.Add(task);
            _ = task.ContinueWith(Forget, CancellationToken.None, TaskContinuationOptions.ExecuteSynchronously, TaskScheduler.Default);
        }
    }

    /// <summary>Completes when nothing is under way any more: after the token that stops the lane was cancelled.</summary>
    public Task DrainAsync()
    {
        lock (_gate)
        {
            return Task.WhenAll(_running);
        }
    }

    /// <inheritdoc/>
    public void Dispose()
    {
        _hazards.Dispose();
        _others.Dispose();
    }

    private void Forget(Task task)
    {
        lock (_gate)
        {
            _running.Remove(task);
        }
    }

    private async Task RunAsync(Guid alert, bool hazard)
    {
        try
        {
            while (Next(alert) is { } message)
            {
                await _sender.DeliverAsync(message, hazard ? _hazards : _others, _stopping);
                Done(alert, message);
            }
        }
        catch (OperationCanceledException) when (_stopping.IsCancellationRequested)
        {
            // The service stops: what was not sent stands in the journal and is sent after the next start.
        }
        catch (Exception exception)
        {
            // A defect in sending about one alert: its messages stay in the journal and are tried again after the next start.
            Log.NotifierFailed(_logger, _notifier, exception);
        }
    }

    private OutboxMessage? Next(Guid alert)
    {
        lock (_gate)
        {
            if (_byAlert[alert].TryPeek(out OutboxMessage? message))
            {
                return message;
            }

            _byAlert.Remove(alert);
            return null;
        }
    }

    private void Done(Guid alert, OutboxMessage message)
    {
        lock (_gate)
        {
            _byAlert[alert].Dequeue();
            _known.Remove(message.Id);
        }
    }
}
