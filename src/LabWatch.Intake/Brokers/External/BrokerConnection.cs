using LabWatch.Intake.Diagnostics;
using LabWatch.Intake.Options;
using LabWatch.Intake.Outgoing;
using LabWatch.Intake.Pipeline;
using LabWatch.Lab.Secrets;
using Microsoft.Extensions.Logging;
using MQTTnet;
using MQTTnet.Diagnostics.Logger;
using MQTTnet.Protocol;

namespace LabWatch.Intake.Brokers.External;

/// <summary>
/// One connection to the broker, from connecting to its end, with a client of its own; never used twice. A durable one has the persistent
/// session, stores and acknowledges; the other one only watches.
/// </summary>
internal sealed class BrokerConnection : IAsyncDisposable
{
    private const int BacklogLimit = 2_000;
    private const long BacklogLimitBytes = 16L << 20;
    private readonly ExternalBrokerOptions _options;
    private readonly BrokerIdentity _identity;
    private readonly NamedSecrets _secrets;
    private readonly ServiceState _state;
    private readonly StatePublisher _publisher;
    private readonly MessageIntake _intake;
    private readonly TimeProvider _clock;
    private readonly bool _durable;
    private readonly ReceiveBacklog _backlog = new(BacklogLimit, BacklogLimitBytes);
    private readonly TaskCompletionSource<LinkEnd> _ended = new(TaskCreationOptions.RunContinuationsAsynchronously);
    private readonly AcknowledgementLane _acknowledgements;
    private readonly IMqttClient _client;
    private Task _acknowledging = Task.CompletedTask;
    private Task _publishing = Task.CompletedTask;
    private long _lastMessage;
    private int _disposed;
    private volatile bool _taking;
    private volatile string? _reason;

    public BrokerConnection(
        ExternalBrokerOptions options,
        BrokerIdentity identity,
        NamedSecrets secrets,
        StateBoard board,
        ServiceState state,
        MessageIntake intake,
        IntakeCounters counters,
        TimeProvider clock,
        ILogger logger,
        bool durable)
    {
        _options = options;
        _identity = identity;
        _secrets = secrets;
        _state = state;
        _intake = intake;
        _clock = clock;
        _durable = _taking = durable;
        _acknowledgements = new AcknowledgementLane(counters, logger);
        _client = new MqttClientFactory().CreateMqttClient(MqttNetNullLogger.Instance, new BoundedAdapterFactory(_backlog));
        _client.ApplicationMessageReceivedAsync += OnMessage;
        _client.DisconnectedAsync += OnDisconnected;
        _lastMessage = clock.GetTimestamp();
        _publisher = new StatePublisher(_client, board, options.AnswerWithin, clock, logger);
    }

    /// <summary>Ends with the reason when the connection is no longer of use.</summary>
    public Task<LinkEnd> Ended => _ended.Task;

    /// <summary>What the broker or the network said at the end; null where nothing was said.</summary>
    public string? Reason => _reason;

    /// <summary>Time since the last message, or since the connection was made.</summary>
    public TimeSpan Silence => _clock.GetElapsedTime(Volatile.Read(ref _lastMessage));

    /// <summary>Connects and subscribes. Throws where either fails. The subscription is renewed even when the session was kept: it costs nothing and mends a lost one.</summary>
    public async Task<MqttClientConnectResult> OpenAsync(CancellationToken stop)
    {
        using var deadline = new CancellationTokenSource(_options.AnswerWithin * 2, _clock);
        using var either = CancellationTokenSource.CreateLinkedTokenSource(stop, deadline.Token);
        _acknowledging = AcknowledgeAsync();
        MqttClientConnectResult result = await _client.ConnectAsync(LinkOptions.Connect(_options, _identity, _secrets, _state, _durable), either.Token);
        if (result.ResultCode != MqttClientConnectResultCode.Success)
        {
            throw new LinkFailedException($"The broker refused the connection: {result.ResultCode} {result.ReasonString}".TrimEnd());
        }

        MqttClientSubscribeResult subscribed = await _client.SubscribeAsync(LinkOptions.Subscribe(_options, _identity, _durable), either.Token);
        MqttClientSubscribeResultItem? refused = subscribed.Items.FirstOrDefault(item =>
            item.ResultCode > MqttClientSubscribeResultCode.GrantedQoS2 || (_durable && item.ResultCode == MqttClientSubscribeResultCode.GrantedQoS0));
        if (refused is not null)
        {
            throw new LinkFailedException($"The broker refused the subscription to {refused.TopicFilter.Topic}: {refused.ResultCode}.");
        }

        if (_options.PublishState)
        {
            _publishing = _publisher.RunAsync(_state.Topic, _state.Message(_durable ? ServiceState.Online : ServiceState.WatchingOnly), Ended);
        }

        return result;
    }

    /// <summary>Says at the broker that the service leaves on purpose.</summary>
    public async Task SayStoppedAsync()
    {
        if (_options.PublishState)
        {
            await _publisher.PublishAsync(_state.Topic, _state.Message(ServiceState.Stopped));
        }
    }

    /// <summary>Whether the broker answers a ping in time. The client's own view of the link is not trusted.</summary>
    public async Task<bool> AnswersAsync(CancellationToken stop)
    {
        try
        {
            await _client.PingAsync(stop).WaitAsync(_options.AnswerWithin, _clock, stop);
            return true;
        }
        catch (Exception exception) when (!stop.IsCancellationRequested)
        {
            _reason = exception.Message;
            return false;
        }
    }

    /// <summary>Takes no more messages; those taken are still acknowledged.</summary>
    public void Refuse() => _taking = false;

    /// <summary>Sends what acknowledgements there are, within the deadline for answers.</summary>
    public async Task FlushAsync()
    {
        _acknowledgements.Finish();
        await Task.WhenAny(_acknowledging, Task.Delay(_options.AnswerWithin, _clock));
    }

    /// <summary>Drops what was not acknowledged and says good-bye, so that the broker keeps the session.</summary>
    public async ValueTask DisposeAsync()
    {
        if (Interlocked.Exchange(ref _disposed, 1) == 1)
        {
            return;
        }

        _taking = false;
        _ended.TrySetResult(LinkEnd.Stopped);
        _acknowledgements.Close();
        await _acknowledging;
        await _publishing;
        using var deadline = new CancellationTokenSource(_options.AnswerWithin, _clock);
        try
        {
            await _client.DisconnectAsync(LinkOptions.Disconnect(_options, _durable), deadline.Token).WaitAsync(deadline.Token);
        }
        catch (Exception exception)
        {
            // The link is gone or hangs: the broker finds out by its keep-alive.
            _reason ??= exception.Message;
        }

        _client.Dispose();
        _acknowledgements.Dispose();
    }

    private async Task AcknowledgeAsync()
    {
        if (!await _acknowledgements.RunAsync())
        {
            // Without acknowledgements the broker stops sending; a new connection delivers again what is open.
            _taking = false;
            _ended.TrySetResult(LinkEnd.Lost);
        }
    }

    private Task OnMessage(MqttApplicationMessageReceivedEventArgs e)
    {
        _backlog.Remove(e.ApplicationMessage.Payload.Length);
        e.AutoAcknowledge = false;
        Volatile.Write(ref _lastMessage, _clock.GetTimestamp());
        MqttApplicationMessage message = e.ApplicationMessage;
        if (!_taking)
        {
            _intake.Observe(message.Topic, message.Payload, message.Retain);
            return Task.CompletedTask;
        }

        IDelivery delivery = message.QualityOfServiceLevel == MqttQualityOfServiceLevel.AtMostOnce
            ? NoDelivery.Instance
            : new BrokerDelivery(_acknowledgements, e);
        if (!_intake.TryAccept(message.Topic, message.Payload, message.Retain, delivery))
        {
            // Nothing after this one may be acknowledged before it, so the connection has done its work.
            _taking = false;
            _ended.TrySetResult(LinkEnd.Overflow);
        }

        return Task.CompletedTask;
    }

    private Task OnDisconnected(MqttClientDisconnectedEventArgs e)
    {
        // Only notes it: the supervisor alone connects.
        _reason ??= e.Exception?.Message ?? e.ReasonString ?? e.Reason.ToString();
        _acknowledgements.Close();
        _ended.TrySetResult(e.Reason == MqttClientDisconnectReason.SessionTakenOver ? LinkEnd.TakenOver : LinkEnd.Lost);
        return Task.CompletedTask;
    }
}
