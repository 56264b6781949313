using LabWatch.Lab.Alerts;
using LabWatch.Lab.Time;
using LabWatch.Records.Alerts;

namespace LabWatch.Tests.Alerts;

/// <summary>An alert ledger in memory that can be stopped, keeps the contract strictly, and counts what it must not see.</summary>
internal sealed class MemoryAlertLedger : IAlertLedger
{
    private readonly Lock _gate = new();
    private readonly Dictionary<Guid, List<AlertTransition>> _alerts = [];
    private readonly Dictionary<string, OutboxMessage> _messages = new(StringComparer.Ordinal);
    private readonly Dictionary<string, long> _positions = new(StringComparer.Ordinal);

    /// <summary>Whether every call fails.</summary>
    public bool Stopped { get; set; }

    /// <summary>Whether every call hangs until it is cancelled.</summary>
    public bool Hanging { get; set; }

    /// <summary>An alert that the ledger refuses to record.</summary>
    public Func<AlertTransition, bool> Refuses { get; set; } = _ => false;

    public IReadOnlyCollection<OutboxMessage> Messages
    {
        get
        {
            lock (_gate)
            {
                return [.. _messages.Values];
            }
        }
    }

    public IReadOnlyList<AlertTransition> Steps(Guid id)
    {
        lock (_gate)
        {
            return [.. _alerts.GetValueOrDefault(id) ?? []];
        }
    }

    public IReadOnlyList<Guid> Alerts
    {
        get
        {
            lock (_gate)
            {
                return [.. _alerts.Keys];
            }
        }
    }

    public async ValueTask RecordAsync(AlertTransition transition, IReadOnlyList<OutboxMessage> messages, CancellationToken cancellationToken)
    {
        await AnswerAsync(cancellationToken);
        lock (_gate)
        {
            if (Refuses(transition))
            {
                throw new InvalidOperationException("refused");
            }

            List<AlertTransition> steps = _alerts.TryGetValue(transition.Alert.Id, out List<AlertTransition>? known) ? known : _alerts[transition.Alert.Id] = [];
            if (steps.All(step => step.Sequence != transition.Sequence))
            {
                Assert.Equal(steps.Count + 1, transition.Sequence);
                steps.Add(transition);
            }

            foreach (OutboxMessage message in messages)
            {
                _messages.TryAdd(message.Id, message);
            }
        }
    }

    public async ValueTask<IReadOnlyList<Alert>> OpenAsync(CancellationToken cancellationToken)
    {
        await AnswerAsync(cancellationToken);
        lock (_gate)
        {
            return [.. _alerts.Values.Select(steps => steps[^1].Alert).Where(alert => alert.State != AlertState.Normal)];
        }
    }

    public async ValueTask<Alert?> FindAsync(Guid id, CancellationToken cancellationToken)
    {
        await AnswerAsync(cancellationToken);
        return Steps(id) is [.., { } last] ? last.Alert : null;
    }

    public ValueTask<AlertPage> ListAsync(AlertQuery query, CancellationToken cancellationToken) => throw new NotSupportedException("Not used by the alerts.");

    public async ValueTask<IReadOnlyList<AlertTransition>> TransitionsAsync(Guid id, CancellationToken cancellationToken)
    {
        await AnswerAsync(cancellationToken);
        return Steps(id);
    }

    public async ValueTask<IReadOnlyList<OutboxMessage>> DueAsync(Instant now, int count, CancellationToken cancellationToken)
    {
        await AnswerAsync(cancellationToken);
        return [.. Messages.Where(message => message is { SentAt: null, GivenUpAt: null } && message.DueAt <= now).OrderBy(message => message.QueuedAt).Take(count)];
    }

    public async ValueTask<IReadOnlyList<OutboxMessage>> MessagesAsync(Guid alertId, CancellationToken cancellationToken)
    {
        await AnswerAsync(cancellationToken);
        return [.. Messages.Where(message => message.AlertId == alertId)];
    }

    public async ValueTask SettleAsync(OutboxMessage message, CancellationToken cancellationToken)
    {
        await AnswerAsync(cancellationToken);
        lock (_gate)
        {
            Assert.True(_messages.ContainsKey(message.Id), "A message is settled that was never queued.");
            _messages[message.Id] = message;
        }
    }

    public async ValueTask<long> PositionAsync(string reader, CancellationToken cancellationToken)
    {
        await AnswerAsync(cancellationToken);
        lock (_gate)
        {
            return _positions.GetValueOrDefault(reader);
        }
    }

    public async ValueTask SetPositionAsync(string reader, long position, CancellationToken cancellationToken)
    {
        await AnswerAsync(cancellationToken);
        lock (_gate)
        {
            _positions[reader] = position;
        }
    }

    private async Task AnswerAsync(CancellationToken cancellationToken)
    {
        if (Hanging)
        {
            await Task.Delay(Timeout.InfiniteTimeSpan, TimeProvider.System, cancellationToken);
        }

        if (Stopped)
        {
            throw new IOException("The records database does not answer.");
        }
    }
}
