using LabWatch.Intake.Diagnostics;
using LabWatch.Intake.Options;
using LabWatch.Intake.Outgoing;
using LabWatch.Intake.Pipeline;
using LabWatch.Lab.Secrets;
using Microsoft.Extensions.Logging;
using MQTTnet;

namespace LabWatch.Intake.Brokers.External;

/// <summary>
/// The one loop that owns the link to the broker: connects, tests the link, closes it, waits and connects again. Nothing else connects.
/// </summary>
internal sealed class BrokerSupervisor(
    ExternalBrokerOptions options,
    BrokerIdentity identity,
    NamedSecrets secrets,
    StateBoard board,
    ServiceState state,
    MessageIntake intake,
    IntakeQueue queue,
    CommitSignal signal,
    LinkStatus status,
    IntakeCounters counters,
    TimeProvider clock,
    ILogger<BrokerSupervisor> logger)
{
    private static readonly TimeSpan FirstRetry = TimeSpan.FromMilliseconds(250);
    private static readonly TimeSpan OverflowPoll = TimeSpan.FromMilliseconds(50);
    private readonly Backoff _backoff = new(FirstRetry, options.LongestRetry, Random.Shared);
    private readonly TakeoverGuard _takeovers = new(options.TakenOverPause, clock);
    private volatile BrokerConnection? _connection;
    private volatile bool _refusing;
    private bool _hadSession;

    /// <summary>Keeps the link up until cancelled; then sends what acknowledgements there are and leaves, the session kept.</summary>
    public async Task RunAsync(CancellationToken stop)
    {
        while (!stop.IsCancellationRequested)
        {
            try
            {
                await ServeOnceAsync(stop);
            }
            catch (OperationCanceledException) when (stop.IsCancellationRequested)
            {
                break;
            }
            catch (Exception exception)
            {
                // The outermost loop of the link: whatever went wrong, it is made again.
                await WaitAsync(exception.GetBaseException().Message, stop);
            }
        }

        status.Set(BrokerLinkState.None, false, null);
    }

    /// <summary>Takes no more messages from now on, while those taken are finished.</summary>
    public void Refuse()
    {
        _refusing = true;
        _connection?.Refuse();
    }

    private async Task ServeOnceAsync(CancellationToken stop)
    {
        Task changed = signal.Changed;
        bool durable = !signal.Stopped && !_takeovers.Pausing;
        status.Set(_takeovers.Pausing ? BrokerLinkState.TakenOver : BrokerLinkState.Connecting, false, status.Note);
        await using var connection = new BrokerConnection(options, identity, secrets, board, state, intake, counters, clock, logger, durable);
        MqttClientConnectResult result = await connection.OpenAsync(stop);
        Announce(connection, result, durable);
        long opened = clock.GetTimestamp();
        LinkEnd end = await WatchAsync(connection, changed, stop);
        if (end == LinkEnd.Stopped)
        {
            await connection.FlushAsync();
            await connection.SayStoppedAsync();
        }

        _connection = null;
        await connection.DisposeAsync();
        await RecoverAsync(end, connection.Reason, durable, clock.GetElapsedTime(opened), stop);
    }

    private void Announce(BrokerConnection connection, MqttClientConnectResult result, bool durable)
    {
        counters.Connected();
        string id = durable ? identity.ClientId : identity.WatchClientId;
        IntakeLog.Connected(logger, options.Host, options.Port, id, result.IsSessionPresent);
        status.Set(
            durable ? BrokerLinkState.Connected : _takeovers.Pausing ? BrokerLinkState.TakenOver : BrokerLinkState.WatchingOnly,
            result.IsSessionPresent,
            durable ? CheckSession(result) : status.Note);
        _connection = connection;
        if (_refusing)
        {
            connection.Refuse();
        }
    }

    /// <summary>What is wrong with the session that the broker granted; null where it is as asked. A broker that states no expiry (read as 0) grants what was asked.</summary>
    private string? CheckSession(MqttClientConnectResult result)
    {
        uint asked = LinkOptions.ExpirySeconds(options);
        bool lost = _hadSession && !result.IsSessionPresent;
        _hadSession = true;
        if (lost)
        {
            IntakeLog.SessionLost(logger, identity.ClientId);
            return "The broker had not kept the session; what was sent meanwhile may be lost.";
        }

        if (result.SessionExpiryInterval is { } granted and > 0 && granted < asked)
        {
            IntakeLog.SessionExpiryShort(logger, granted, asked);
            return FormattableString.Invariant($"The broker keeps the session for {granted} s only.");
        }

        return null;
    }

    private async Task<LinkEnd> WatchAsync(BrokerConnection connection, Task changed, CancellationToken stop)
    {
        Task pauseOver = _takeovers.Pausing ? Task.Delay(_takeovers.Remaining, clock, stop) : new TaskCompletionSource().Task;
        while (true)
        {
            Task tick = Task.Delay(options.PingEvery, clock, stop);
            Task first = await Task.WhenAny(connection.Ended, changed, pauseOver, tick);
            if (stop.IsCancellationRequested)
            {
                return LinkEnd.Stopped;
            }

            if (first == connection.Ended)
            {
                return await connection.Ended;
            }

            if (first != tick)
            {
                return LinkEnd.KindChanged;
            }

            if (!await connection.AnswersAsync(stop))
            {
                return LinkEnd.Dead;
            }

            if (connection.Silence > options.QuietLimit)
            {
                return LinkEnd.Quiet;
            }
        }
    }

    private async Task RecoverAsync(LinkEnd end, string? reason, bool durable, TimeSpan lived, CancellationToken stop)
    {
        if (_takeovers.Note(end, durable, lived))
        {
            IntakeLog.SessionTakenOver(logger, identity.ClientId, options.TakenOverPause.TotalSeconds);
            status.Set(BrokerLinkState.TakenOver, false, "Another client has taken the session.");
            return;
        }

        if (lived > TakeoverGuard.ShortLife)
        {
            _backoff.Reset();
        }

        switch (end)
        {
            case LinkEnd.Stopped or LinkEnd.KindChanged:
                break;
            case LinkEnd.Overflow:
                while (queue.IsHalfFull && !signal.Stopped)
                {
                    await Task.Delay(OverflowPoll, clock, stop);
                }

                break;
            case LinkEnd.Quiet:
                await WaitAsync("No message has come for too long.", stop);
                break;
            default:
                await WaitAsync(reason ?? end.ToString(), stop);
                break;
        }
    }

    private async Task WaitAsync(string reason, CancellationToken stop)
    {
        TimeSpan wait = _backoff.Next();
        IntakeLog.LinkEnded(logger, options.Host, options.Port, reason, wait.TotalSeconds);
        status.Set(_takeovers.Pausing ? BrokerLinkState.TakenOver : BrokerLinkState.Connecting, false, reason);
        try
        {
            await Task.Delay(wait, clock, stop);
        }
        catch (OperationCanceledException) when (stop.IsCancellationRequested)
        {
            // The loop sees it.
        }
    }
}
