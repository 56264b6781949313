using LabWatch.Lab.Alerts;
using LabWatch.Records.Alerts;

namespace LabWatch.Alerts.Outbox;

/// <summary>One way for messages to leave the service. Implementations are thread-safe and bound their own time.</summary>
internal interface INotifierChannel
{
    /// <summary>The kind of notifier it serves.</summary>
    NotifierKind Kind { get; }

    /// <summary>Makes one attempt. Throws only <see cref="OperationCanceledException"/>, and only for the token given.</summary>
    ValueTask<SendOutcome> SendAsync(Notifier notifier, OutboxMessage message, CancellationToken cancellationToken);
}
