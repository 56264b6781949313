using System.Buffers;
using System.Collections.Concurrent;
using LabWatch.Intake.Diagnostics;
using LabWatch.Intake.Options;
using LabWatch.Intake.Outgoing;
using LabWatch.Intake.Pipeline;
using LabWatch.Lab.Findings;
using Microsoft.Extensions.Logging;
using MQTTnet;
using MQTTnet.Diagnostics.Logger;
using MQTTnet.Protocol;
using MQTTnet.Server;

namespace LabWatch.Intake.Brokers.Embedded;

/// <summary>
/// The broker inside this process. A message is acknowledged to the device when it is durable; where that takes too long it is refused, so
/// that the device keeps it. The taps have seen it before. Messages come in by <see cref="DeviceLink"/>; the server library does the rest:
/// sessions, subscriptions, delivery to subscribers.
/// </summary>
internal sealed class EmbeddedBroker : IAsyncDisposable
{
    private static readonly TimeSpan SweepEvery = TimeSpan.FromMilliseconds(100);
    private static readonly TimeSpan SaveEvery = TimeSpan.FromSeconds(1);
    private static readonly TimeSpan ConnectWithin = TimeSpan.FromSeconds(10);
    private readonly EmbeddedBrokerOptions _options;
    private readonly DeviceDoor _door;
    private readonly StateBoard _board;
    private readonly ServiceState _state;
    private readonly MessageIntake _intake;
    private readonly ILogger<EmbeddedBroker> _logger;
    private readonly DeviceDesk _desk;
    private readonly ListenerAdapter _listener;
    private readonly RetainedMessages _retained;
    private readonly TimeProvider _clock;
    private readonly ConcurrentDictionary<string, string?> _owners = new(StringComparer.Ordinal);
    private readonly CancellationTokenSource _stopped = new();
    private MqttServer? _server;
    private SubscriberFeed? _feed;
    private Task _feeding = Task.CompletedTask;
    private ITimer? _sweep;
    private ITimer? _save;

    public EmbeddedBroker(
        EmbeddedBrokerOptions options,
        string retainedFile,
        DeviceDoor door,
        StateBoard board,
        ServiceState state,
        IBrokerCertificate? certificate,
        MessageIntake intake,
        IntakeQueue queue,
        IntakeCounters counters,
        TimeProvider clock,
        ILogger<EmbeddedBroker> logger)
    {
        _options = options;
        _door = door;
        _board = board;
        _state = state;
        _intake = intake;
        _clock = clock;
        _logger = logger;
        _desk = new DeviceDesk(options, intake, queue, counters, clock, logger);
        _listener = new ListenerAdapter(options, certificate, _desk);
        _retained = new RetainedMessages(retainedFile, logger);
        if (door.Accounts is { } accounts)
        {
            accounts.Revoked += CutOff;
        }
    }

    /// <summary>Port that it listens on; null while it does not.</summary>
    public int? Port => _listener.EndPoint?.Port;

    /// <summary>Starts listening. Throws <see cref="System.Net.Sockets.SocketException"/> where the port cannot be had.</summary>
    public async Task StartAsync()
    {
        MqttServerOptions serverOptions = new MqttServerOptionsBuilder()
            .WithoutDefaultEndpoint()
            .WithPersistentSessions(true)
            .WithDefaultCommunicationTimeout(ConnectWithin)
            .WithMaxPendingMessagesPerClient(_options.MaximumPendingMessages)
            .WithPendingMessagesOverflowStrategy(MqttPendingMessagesOverflowStrategy.DropOldestQueuedMessage)
            .Build();
        _server = new MqttServerFactory().CreateMqttServer(serverOptions, [_listener], MqttNetNullLogger.Instance);
        _server.ValidatingConnectionAsync += OnConnecting;
        _server.InterceptingPublishAsync += OnPublish;
        _server.InterceptingSubscriptionAsync += OnSubscribing;
        _server.LoadingRetainedMessageAsync += OnLoadingRetained;
        _server.RetainedMessageChangedAsync += OnRetainedChanged;
        _server.SessionDeletedAsync += OnSessionDeleted;
        _feed = new SubscriberFeed(_server, _retained);
        _desk.Forward = _feed.Add;
        await _server.StartAsync();
        _feeding = Task.WhenAll(Task.Run(_feed.RunAsync), Task.Run(() => FollowBoardAsync(_feed, _stopped.Token)));
        _feed.Add(Retained(_state.Topic, _state.Message(ServiceState.Online)));
        _sweep = _clock.CreateTimer(_ => Sweep(), null, SweepEvery, SweepEvery);
        _save = _clock.CreateTimer(_ => _retained.Save(), null, SaveEvery, SaveEvery);
        IntakeLog.EmbeddedStarted(_logger, _options.Address, _listener.EndPoint!.Port);
    }

    /// <summary>Refuses every new message from now on, while those under way are finished.</summary>
    public void Refuse() => _desk.Refuse();

    /// <summary>Ends all connections.</summary>
    public async Task StopAsync()
    {
        if (_server is { } server)
        {
            _server = null;
            _feed!.Add(Retained(_state.Topic, _state.Message(ServiceState.Stopped)));
            await _stopped.CancelAsync();
            _feed.Close();
            await _feeding;
            await server.StopAsync(new MqttServerStopOptions());
            server.Dispose();
            await _sweep!.DisposeAsync();
            await _save!.DisposeAsync();
            _retained.Save();
        }
    }

    /// <inheritdoc/>
    public async ValueTask DisposeAsync()
    {
        await StopAsync();
        if (_door.Accounts is { } accounts)
        {
            accounts.Revoked -= CutOff;
        }

        _listener.Dispose();
        _stopped.Dispose();
    }

    private static MqttApplicationMessage Retained(string topic, byte[] payload) =>
        new() { Topic = topic, Payload = new ReadOnlySequence<byte>(payload), QualityOfServiceLevel = MqttQualityOfServiceLevel.AtLeastOnce, Retain = true };

    private async Task FollowBoardAsync(SubscriberFeed feed, CancellationToken stop)
    {
        long sent = 0;
        while (!stop.IsCancellationRequested)
        {
            Task changed = _board.Changed;
            foreach (StateMessage message in _board.After(sent))
            {
                feed.Add(Retained(message.Topic, message.Payload));
                sent = message.Version;
            }

            await changed.WaitAsync(stop).ConfigureAwait(ConfigureAwaitOptions.SuppressThrowing);
        }
    }

    private void CutOff(string account)
    {
        foreach (DeviceLink link in _listener.Links.Where(link => link.BelongsTo(account)))
        {
            link.Abort();
        }
    }

    private void Sweep()
    {
        foreach (DeviceLink link in _listener.Links)
        {
            link.Sweep();
        }
    }

    private Task OnConnecting(ValidatingConnectionEventArgs e)
    {
        var link = (DeviceLink)e.ChannelAdapter;
        DeviceRights? rights = _door.Open(e.UserName, e.RawPassword);
        (MqttConnectReasonCode Code, string Reason)? refusal =
            _desk.IsRefusing ? (MqttConnectReasonCode.ServerUnavailable, "The service stops.")
            : rights is null ? (MqttConnectReasonCode.BadUserNameOrPassword, "There is no such account, or the password is wrong.")
            : _owners.TryGetValue(e.ClientId, out string? owner) && owner != rights.Account ? (MqttConnectReasonCode.ClientIdentifierNotValid, "The client id belongs to another account.")
            : _owners.Count >= _options.MaximumSessions && !_owners.ContainsKey(e.ClientId) ? (MqttConnectReasonCode.QuotaExceeded, "There are as many sessions as permitted.")
            : link.WillTopic is { } will && !rights.MayPublish(will) ? (MqttConnectReasonCode.NotAuthorized, "The topic of the will is not one that this device may publish to.")
            : null;
        if (refusal is { } no)
        {
            _desk.Counters.TurnedAway();
            IntakeLog.DeviceTurnedAway(_logger, Finding.Quote(e.ClientId) ?? string.Empty, e.RemoteEndPoint?.ToString() ?? string.Empty, no.Reason);
            e.ReasonCode = no.Code;
            e.ReasonString = no.Reason;
        }
        else
        {
            _owners[e.ClientId] = rights!.Account;
            link.Admit(rights);
        }

        return Task.CompletedTask;
    }

    private Task OnSessionDeleted(SessionDeletedEventArgs e)
    {
        _owners.TryRemove(e.Id, out _);
        return Task.CompletedTask;
    }

    /// <summary>What reaches the broker by itself: messages of the feed, and the wills of devices that are gone, which are taken in like messages.</summary>
    private Task OnPublish(InterceptingPublishEventArgs e)
    {
        if (e.SessionItems?.Contains(SubscriberFeed.Mark) != true)
        {
            MqttApplicationMessage will = e.ApplicationMessage;
            e.ProcessPublish = _intake.TryAccept(will.Topic, will.Payload, retained: false, NoDelivery.Instance);
            will.Retain = will.Retain && e.ProcessPublish && _retained.TryKeep(will.Topic, will.Payload.Length);
        }

        return Task.CompletedTask;
    }

    private Task OnSubscribing(InterceptingSubscriptionEventArgs e)
    {
        bool permitted = _listener.Links.Any(link => link.ClientId == e.ClientId && link.MaySubscribe(e.TopicFilter.Topic));
        if (permitted)
        {
            _feed!.HasSubscribers = true;
        }
        else
        {
            e.ProcessSubscription = false;
            e.Response.ReasonCode = MqttSubscribeReasonCode.NotAuthorized;
        }

        return Task.CompletedTask;
    }

    private Task OnLoadingRetained(LoadingRetainedMessagesEventArgs e)
    {
        e.LoadedRetainedMessages = [.. _retained.Load()];
        return Task.CompletedTask;
    }

    private Task OnRetainedChanged(RetainedMessageChangedEventArgs e)
    {
        _retained.Changed(e.StoredRetainedMessages);
        return Task.CompletedTask;
    }
}
