using LabWatch.Intake.Diagnostics;
using LabWatch.Intake.Options;
using LabWatch.Intake.Payloads;
using LabWatch.Intake.Pipeline;
using Microsoft.Extensions.Logging;
using MQTTnet;
using MQTTnet.Diagnostics.Logger;
using MQTTnet.Formatter;
using MQTTnet.Protocol;
using MQTTnet.Server;

namespace LabWatch.Intake.Brokers.Embedded;

/// <summary>
/// The broker inside this process. A message is acknowledged to the device when it is durable; where that takes too long it is refused, so
/// that the device keeps it. The taps have seen it before.
/// </summary>
internal sealed class EmbeddedBroker(
    EmbeddedBrokerOptions options,
    string root,
    MessageIntake intake,
    IntakeQueue queue,
    IntakeCounters counters,
    TimeProvider clock,
    ILogger<EmbeddedBroker> logger) : IAsyncDisposable
{
    private const string ProtocolKey = "labwatch.protocol";
    private const string WaitKey = "labwatch.wait";
    private readonly ListenerAdapter _listener = new(options);
    private MqttServer? _server;
    private volatile bool _refusing;

    /// <summary>Port that it listens on; null while it does not.</summary>
    public int? Port => _listener.EndPoint?.Port;

    /// <summary>Starts listening. Throws <see cref="System.Net.Sockets.SocketException"/> where the port cannot be had.</summary>
    public async Task StartAsync()
    {
        MqttServerOptions serverOptions = new MqttServerOptionsBuilder()
            .WithoutDefaultEndpoint()
            .WithPersistentSessions(true)
            .WithMaxPendingMessagesPerClient(options.MaximumPendingMessages)
            .WithPendingMessagesOverflowStrategy(MqttPendingMessagesOverflowStrategy.DropOldestQueuedMessage)
            .Build();
        _server = new MqttServerFactory().CreateMqttServer(serverOptions, [_listener], MqttNetNullLogger.Instance);
        _server.ValidatingConnectionAsync += OnConnecting;
        _server.InterceptingPublishAsync += OnPublishAsync;
        await _server.StartAsync();
        IntakeLog.EmbeddedStarted(logger, options.Address, _listener.EndPoint!.Port);
    }

    /// <summary>Refuses every new message from now on, while those under way are finished.</summary>
    public void Refuse() => _refusing = true;

    /// <summary>Ends all connections.</summary>
    public async Task StopAsync()
    {
        if (_server is { } server)
        {
            _server = null;
            await server.StopAsync(new MqttServerStopOptions());
            server.Dispose();
        }
    }

    /// <inheritdoc/>
    public async ValueTask DisposeAsync()
    {
        await StopAsync();
        _listener.Dispose();
    }

    private Task OnConnecting(ValidatingConnectionEventArgs e)
    {
        TimeSpan half = TimeSpan.FromSeconds((e.KeepAlivePeriod ?? 0) / 2.0);
        e.SessionItems[ProtocolKey] = e.ProtocolVersion;
        e.SessionItems[WaitKey] = half > TimeSpan.Zero && half < options.CommitWait ? half : options.CommitWait;
        if (_refusing)
        {
            e.ReasonCode = MqttConnectReasonCode.ServerUnavailable;
        }

        return Task.CompletedTask;
    }

    private async Task OnPublishAsync(InterceptingPublishEventArgs e)
    {
        try
        {
            await TakeAsync(e);
        }
        catch (Exception exception)
        {
            // A defect in here would end the device's connection without a word; the device keeps the message and the log says why.
            IntakeLog.EmbeddedFailed(logger, exception, Lab.Findings.Finding.Quote(e.ClientId) ?? string.Empty);
            Refuse(e, MqttPubAckReasonCode.UnspecifiedError, "The message could not be processed.");
        }
    }

    private async Task TakeAsync(InterceptingPublishEventArgs e)
    {
        MqttApplicationMessage message = e.ApplicationMessage;
        if (!TopicMap.IsUnderRoot(message.Topic, root))
        {
            Refuse(e, MqttPubAckReasonCode.NotAuthorized, "The topic lies outside the root.");
            return;
        }

        // The broker keeps a retained message for later subscribers; to us it is a message sent now.
        var delivery = new AwaitedDelivery();
        if (_refusing || !intake.TryAccept(message.Topic, message.Payload, retained: false, delivery))
        {
            Refuse(e, MqttPubAckReasonCode.QuotaExceeded, "Messages cannot be taken at present.");
            return;
        }

        bool awaited = message.QualityOfServiceLevel != MqttQualityOfServiceLevel.AtMostOnce;
        if ((awaited || queue.IsHalfFull) && !await IsDurableAsync(delivery, WaitOf(e)) && awaited)
        {
            Refuse(e, MqttPubAckReasonCode.QuotaExceeded, "The message could not be made durable in time.");
        }
        else if (awaited)
        {
            counters.Acknowledged(1);
        }
    }

    /// <summary>Waits without the event's token: a device that leaves must not take the commit with it.</summary>
    private async Task<bool> IsDurableAsync(AwaitedDelivery delivery, TimeSpan wait)
    {
        try
        {
            return await delivery.Outcome.WaitAsync(wait, clock, CancellationToken.None) == DeliveryOutcome.Durable;
        }
        catch (TimeoutException)
        {
            return false;
        }
    }

    private TimeSpan WaitOf(InterceptingPublishEventArgs e) =>
        e.SessionItems?[WaitKey] is TimeSpan wait ? wait : options.CommitWait;

    /// <summary>
    /// Refuses by reason code on MQTT 5. On 3.1.1 an acknowledgement has no reason code and reads as success, so the connection is closed
    /// instead, before any acknowledgement.
    /// </summary>
    private void Refuse(InterceptingPublishEventArgs e, MqttPubAckReasonCode code, string reason)
    {
        counters.Refused();
        IntakeLog.EmbeddedRefused(logger, Lab.Findings.Finding.Quote(e.ClientId) ?? string.Empty, reason);
        e.ProcessPublish = false;
        e.Response.ReasonCode = code;
        e.Response.ReasonString = reason;
        e.CloseConnection = e.SessionItems?[ProtocolKey] is not MqttProtocolVersion.V500
            && e.ApplicationMessage.QualityOfServiceLevel != MqttQualityOfServiceLevel.AtMostOnce;
    }
}
