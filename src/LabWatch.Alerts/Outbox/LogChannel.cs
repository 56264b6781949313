using System.Text.Json;
using LabWatch.Lab.Alerts;
using LabWatch.Records.Alerts;
using Microsoft.Extensions.Logging;

namespace LabWatch.Alerts.Outbox;

/// <summary>Writes messages as lines of the service's log.</summary>
internal sealed class LogChannel(ILogger<LogChannel> logger) : INotifierChannel
{
    /// <inheritdoc/>
    public NotifierKind Kind => NotifierKind.Log;

    /// <inheritdoc/>
    public ValueTask<SendOutcome> SendAsync(Notifier notifier, OutboxMessage message, CancellationToken cancellationToken)
    {
        MessageBody? body = JsonSerializer.Deserialize(message.Body, MessageJson.Default.MessageBody);
        if (body is not null)
        {
            Log.AlertMessage(logger, body.Event, body.Priority, body.Headline, body.Alert, body.Code);
        }

        return ValueTask.FromResult(SendOutcome.Sent);
    }
}
