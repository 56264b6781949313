using MQTTnet;
using MQTTnet.Formatter;
using MQTTnet.Protocol;

namespace LabWatch.Simulator.Demo;

/// <summary>
/// One connection to the broker with a bounded number of packs in flight at QoS 1, in order. A pack that the broker refuses is sent again after a pause;
/// a lost connection ends the session with an exception, and whoever uses it starts again from what was acknowledged.
/// </summary>
internal sealed class PackPublisher : IAsyncDisposable
{
    /// <summary>Most packs in flight.</summary>
    public const int Window = 20;

    private static readonly TimeSpan PauseAfterRefusal = TimeSpan.FromMilliseconds(250);

    private readonly IMqttClient _client = new MqttClientFactory().CreateMqttClient();
    private readonly SemaphoreSlim _slots = new(Window);
    private readonly TimeProvider _clock;

    private PackPublisher(TimeProvider clock) => _clock = clock;

    /// <summary>Connects; throws where the broker cannot be reached or does not accept.</summary>
    public static async Task<PackPublisher> ConnectAsync(DemoOptions options, string clientId, TimeProvider clock, CancellationToken cancellation)
    {
        PackPublisher publisher = new(clock);
        try
        {
            MqttClientOptions connect = new MqttClientOptionsBuilder()
                .WithTcpServer(options.Host, options.Port)
                .WithClientId(clientId)
                .WithProtocolVersion(MqttProtocolVersion.V500)
                .WithCleanStart()
                .WithKeepAlivePeriod(TimeSpan.FromSeconds(15))
                .WithTimeout(TimeSpan.FromSeconds(10))
                .Build();
            MqttClientConnectResult result = await publisher._client.ConnectAsync(connect, cancellation);
            return result.ResultCode == MqttClientConnectResultCode.Success
                ? publisher
                : throw new IOException($"The broker did not accept the demo's connection: {result.ResultCode}.");
        }
        catch
        {
            await publisher.DisposeAsync();
            throw;
        }
    }

    /// <summary>Waits for a free place in the window and starts to send; the inner task ends when the pack has been acknowledged.</summary>
    public async Task<Task> SendAsync(string topic, byte[] payload, CancellationToken cancellation)
    {
        await _slots.WaitAsync(cancellation);
        return Deliver(topic, payload, cancellation);
    }

    /// <inheritdoc/>
    public async ValueTask DisposeAsync()
    {
        try
        {
            if (_client.IsConnected)
            {
                using CancellationTokenSource limit = new(TimeSpan.FromSeconds(2), _clock);
                await _client.DisconnectAsync(new MqttClientDisconnectOptions(), limit.Token);
            }
        }
        catch (Exception error) when (error is MQTTnet.Exceptions.MqttCommunicationException or OperationCanceledException or IOException)
        {
            // The connection is given up in any case.
        }

        _client.Dispose();
        _slots.Dispose();
    }

    private async Task Deliver(string topic, byte[] payload, CancellationToken cancellation)
    {
        try
        {
            MqttApplicationMessage message = new() { Topic = topic, PayloadSegment = payload, QualityOfServiceLevel = MqttQualityOfServiceLevel.AtLeastOnce };
            MqttClientPublishResult result = await _client.PublishAsync(message, cancellation);
            while (!IsTaken(result))
            {
                await Task.Delay(PauseAfterRefusal, _clock, cancellation);
                result = await _client.PublishAsync(message, cancellation);
            }
        }
        finally
        {
            _slots.Release();
        }
    }

    // A broker without a subscriber has taken the message all the same (MQTT 5.0, section 3.4.2.1).
    private static bool IsTaken(MqttClientPublishResult result) =>
        result.ReasonCode is MqttClientPublishReasonCode.Success or MqttClientPublishReasonCode.NoMatchingSubscribers;
}
