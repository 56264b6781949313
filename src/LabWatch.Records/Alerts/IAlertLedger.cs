using LabWatch.Lab.Alerts;
using LabWatch.Lab.Time;

namespace LabWatch.Records.Alerts;

/// <summary>The alerts, their transitions, and the outbox of messages about them.</summary>
public interface IAlertLedger : IPositionLedger
{
    /// <summary>
    /// Stores an alert's new state, the transition that led to it, and the messages it causes, in one transaction. Idempotent by the
    /// alert's id and the transition's sequence in that alert.
    /// </summary>
    ValueTask RecordAsync(AlertTransition transition, IReadOnlyList<OutboxMessage> messages, CancellationToken cancellationToken);

    /// <summary>Alerts that are not normal.</summary>
    ValueTask<IReadOnlyList<Alert>> OpenAsync(CancellationToken cancellationToken);

    /// <summary>The alert of an id; null where there is none.</summary>
    ValueTask<Alert?> FindAsync(Guid id, CancellationToken cancellationToken);

    /// <summary>Alerts, newest raised first, one page at a time.</summary>
    ValueTask<AlertPage> ListAsync(AlertQuery query, CancellationToken cancellationToken);

    /// <summary>The transitions of an alert, in order.</summary>
    ValueTask<IReadOnlyList<AlertTransition>> TransitionsAsync(Guid id, CancellationToken cancellationToken);

    /// <summary>Messages that are due to be sent, oldest first.</summary>
    ValueTask<IReadOnlyList<OutboxMessage>> DueAsync(Instant now, int count, CancellationToken cancellationToken);

    /// <summary>The messages that an alert caused, in the order they were queued: who was told what, when, and whether it arrived.</summary>
    ValueTask<IReadOnlyList<OutboxMessage>> MessagesAsync(Guid alertId, CancellationToken cancellationToken);

    /// <summary>Stores what became of an attempt to send a message.</summary>
    ValueTask SettleAsync(OutboxMessage message, CancellationToken cancellationToken);
}
