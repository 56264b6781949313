using LabWatch.Alerts.Desk;
using LabWatch.Lab;
using LabWatch.Lab.Alerts;
using LabWatch.Lab.Time;
using LabWatch.Records.Alerts;
using Microsoft.Extensions.Logging;

namespace LabWatch.Alerts.Outbox;

/// <summary>Tries to send one message until it is sent, refused, or too old, and reports every attempt.</summary>
internal sealed class MessageSender(
    IEnumerable<INotifierChannel> channels,
    ILabSnapshotSource lab,
    DeskQueue desk,
    AlertsOptions options,
    AlertsMetrics metrics,
    TimeProvider clock,
    ILogger<MessageSender> logger)
{
    /// <summary>The notifier that is there where the lab file names none, so that messages stand at least in the log.</summary>
    public static Notifier Fallback { get; } = new("log", NotifierKind.Log, null, null);

    private readonly Dictionary<NotifierKind, INotifierChannel> _channels = channels.ToDictionary(channel => channel.Kind);
    private readonly RetrySchedule _schedule = new(options.RetryFirst, options.RetryLongest);

    /// <summary>Sends a message.</summary>
    /// <param name="message">The message.</param>
    /// <param name="slots">Bounds the attempts under way.</param>
    /// <param name="stopping">Ends waiting between attempts; an attempt under way ends by its own time-out.</param>
    public async Task DeliverAsync(OutboxMessage message, SemaphoreSlim slots, CancellationToken stopping)
    {
        while (message is { SentAt: null, GivenUpAt: null })
        {
            TimeSpan wait = message.DueAt - Instant.Now(clock);
            if (wait > TimeSpan.Zero)
            {
                // A wall clock that was set back must not stretch the wait beyond the longest one.
                await Task.Delay(wait < options.RetryLongest ? wait : options.RetryLongest, clock, stopping);
            }

            await slots.WaitAsync(stopping);
            try
            {
                message = await AttemptAsync(message);
            }
            finally
            {
                slots.Release();
            }

            desk.Post(new DeskWork.Settled(message));
        }
    }

    private async Task<OutboxMessage> AttemptAsync(OutboxMessage message)
    {
        SendOutcome outcome = await SendAsync(message);
        Instant now = Instant.Now(clock);
        OutboxMessage attempted = message with { Attempts = message.Attempts + 1, LastError = outcome.Error };
        if (outcome.Result == SendResult.Sent)
        {
            metrics.Sent(message.Notifier);
            return attempted with { SentAt = now };
        }

        TimeSpan wait = _schedule.After(attempted.Attempts, outcome.RetryAfter, NextRandom());
        if (outcome.Result == SendResult.Refused || now + wait - message.QueuedAt > options.GiveUpAfter)
        {
            metrics.GivenUp(message.Notifier);
            Log.GivenUp(logger, message.Id, message.Notifier, attempted.Attempts, outcome.Error ?? string.Empty);
            return attempted with { GivenUpAt = now };
        }

        metrics.Failed(message.Notifier);
        Log.AttemptFailed(logger, message.Id, message.Notifier, attempted.Attempts, outcome.Error ?? string.Empty, wait);
        return attempted with { DueAt = now + wait };
    }

    private async Task<SendOutcome> SendAsync(OutboxMessage message)
    {
        IReadOnlyList<Notifier> notifiers = lab.Current.Notifiers;
        Notifier? notifier = notifiers.FirstOrDefault(candidate => string.Equals(candidate.Id, message.Notifier, StringComparison.Ordinal))
            ?? (string.Equals(message.Notifier, Fallback.Id, StringComparison.Ordinal) ? Fallback : null);
        return notifier is null
            ? new SendOutcome(SendResult.Refused, "The lab file has no notifier of this id any more.")
            : _channels.TryGetValue(notifier.Kind, out INotifierChannel? channel)
                ? await channel.SendAsync(notifier, message, CancellationToken.None)
                : new SendOutcome(SendResult.Refused, "No channel serves this kind of notifier.");
    }

#pragma warning disable CA5394 // Spreading retries needs no secrecy.
    private static double NextRandom() => Random.Shared.NextDouble();
#pragma warning restore CA5394
}
