using System.Collections.Concurrent;
using LabWatch.Alerts.Desk;
using LabWatch.Lab.Alerts;
using LabWatch.Lab.Time;
using LabWatch.Records.Alerts;
using Microsoft.Extensions.Logging;

namespace LabWatch.Alerts.Outbox;

/// <summary>Tries to send one message until it is sent, refused, or too old, and reports every attempt.</summary>
internal sealed class MessageSender(
    IEnumerable<INotifierChannel> channels,
    NotifierBook notifiers,
    DeskQueue desk,
    AlertsOptions options,
    AlertsMetrics metrics,
    TimeProvider clock,
    ILogger<MessageSender> logger)
{
    private readonly Dictionary<NotifierKind, INotifierChannel> _channels = channels.ToDictionary(channel => channel.Kind);
    private readonly ConcurrentDictionary<string, CircuitBreaker> _breakers = new(StringComparer.Ordinal);
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

            CircuitBreaker breaker = _breakers.GetOrAdd(message.Notifier, _ => new CircuitBreaker(clock, options.CircuitRest));
            while (breaker.Ask() is { Ticks: > 0 } rest)
            {
                await Task.Delay(rest, clock, stopping);
            }

            await slots.WaitAsync(stopping);
            try
            {
                (message, bool answered) = await AttemptAsync(message);
                breaker.Note(answered);
            }
            finally
            {
                slots.Release();
            }

            desk.Post(new DeskWork.Settled(message));
        }
    }

    /// <summary>Makes one attempt and keeps no record of it: for test messages.</summary>
    public Task<SendOutcome> AttemptOnceAsync(OutboxMessage message, CancellationToken cancellationToken) => SendAsync(message, cancellationToken);

    private async Task<(OutboxMessage Message, bool Answered)> AttemptAsync(OutboxMessage message)
    {
        SendOutcome outcome = await SendAsync(message, CancellationToken.None);
        return (Attempted(message, outcome), outcome.Result != SendResult.Retry);
    }

    private OutboxMessage Attempted(OutboxMessage message, SendOutcome outcome)
    {
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

    private async Task<SendOutcome> SendAsync(OutboxMessage message, CancellationToken cancellationToken)
    {
        Notifier? notifier = notifiers.Find(message.Notifier);
        return notifier is null
            ? new SendOutcome(SendResult.Refused, "There is no notifier of this id any more.")
            : _channels.TryGetValue(notifier.Kind, out INotifierChannel? channel)
                ? await channel.SendAsync(notifier, message, cancellationToken)
                : new SendOutcome(SendResult.Refused, "No channel serves this kind of notifier.");
    }

#pragma warning disable CA5394 // Spreading retries needs no secrecy.
    private static double NextRandom() => Random.Shared.NextDouble();
#pragma warning restore CA5394
}
