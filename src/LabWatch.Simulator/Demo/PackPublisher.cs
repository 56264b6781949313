using MQTTnet;
using MQTTnet.Formatter;
using MQTTnet.Protocol;

namespace LabWatch.Simulator.Demo;

/// <summary>
/// Connections to the broker with a bounded number of packs in flight at QoS 1. A pack that the broker refuses is sent again after a pause; a lost
/// connection ends the session with an exception, and whoever uses it starts again from what was acknowledged. Over one connection packs go in order; over
/// several they go side by side, because a broker that acknowledges after its commit takes the packs of one connection one by one.
/// </summary>
internal sealed class PackPublisher : IAsyncDisposable
{
    private const int WindowOfOne = 20;
    private const int WindowOfEach = 2;

    private static readonly TimeSpan PauseAfterRefusal = TimeSpan.FromMilliseconds(250);

    private readonly IMqttClient[] _clients;
    private readonly SemaphoreSlim _slots;
    private readonly TimeProvider _clock;
    private int _turn;

    private PackPublisher(int connections, TimeProvider clock)
    {
        MqttClientFactory factory = new();
        _clients = [.. Enumerable.Range(0, connections).Select(_ => factory.CreateMqttClient())];
        _slots = new SemaphoreSlim(connections == 1 ? WindowOfOne : WindowOfEach * connections);
        _clock = clock;
    }

    /// <summary>Connects; throws where the broker cannot be reached or does not accept.</summary>
    /// <param name="options">Where the broker is.</param>
    /// <param name="clientId">Client id of one connection, or the beginning of the ids of several.</param>
    /// <param name="connections">Number of connections, 1 or more.</param>
    /// <param name="clock">Times the pause after a refusal.</param>
    /// <param name="cancellation">Ends the attempt.</param>
    public static async Task<PackPublisher> ConnectAsync(DemoOptions options, string clientId, int connections, TimeProvider clock, CancellationToken cancellation)
    {
        PackPublisher publisher = new(connections, clock);
        try
        {
            for (int i = 0; i < connections; i++)
            {
                await Connect(publisher._clients[i], options, connections == 1 ? clientId : $"{clientId}-{i + 1}", cancellation);
            }

            return publisher;
        }
        catch
        {
            await publisher.DisposeAsync();
            throw;
        }
    }

    /// <summary>Waits for a free place in the window and starts to send, from one caller at a time; the inner task ends when the pack has been acknowledged.</summary>
    public async Task<Task> SendAsync(string topic, byte[] payload, CancellationToken cancellation)
    {
        await _slots.WaitAsync(cancellation);
        IMqttClient client = _clients[_turn];
        _turn = (_turn + 1) % _clients.Length;
        return Deliver(client, topic, payload, cancellation);
    }

    /// <inheritdoc/>
    public async ValueTask DisposeAsync()
    {
        await Task.WhenAll(_clients.Select(Leave));
        _slots.Dispose();
    }

    private static async Task Connect(IMqttClient client, DemoOptions options, string clientId, CancellationToken cancellation)
    {
        MqttClientOptions connect = new MqttClientOptionsBuilder()
            .WithTcpServer(options.Host, options.Port)
            .WithClientId(clientId)
            .WithProtocolVersion(MqttProtocolVersion.V500)
            .WithCleanStart()
            .WithKeepAlivePeriod(TimeSpan.FromSeconds(15))
            .WithTimeout(TimeSpan.FromSeconds(10))
            .Build();
        MqttClientConnectResult result = await client.ConnectAsync(connect, cancellation);
        if (result.ResultCode != MqttClientConnectResultCode.Success)
        {
            throw new IOException($"The broker did not accept the demo's connection: {result.ResultCode}.");
        }
    }

    private async Task Leave(IMqttClient client)
    {
        try
        {
            if (client.IsConnected)
            {
                using CancellationTokenSource limit = new(TimeSpan.FromSeconds(2), _clock);
                await client.DisconnectAsync(new MqttClientDisconnectOptions(), limit.Token);
            }
        }
        catch (Exception error) when (error is MQTTnet.Exceptions.MqttCommunicationException or OperationCanceledException or IOException)
        {
            // The connection is given up in any case.
        }

        client.Dispose();
    }

    private async Task Deliver(IMqttClient client, string topic, byte[] payload, CancellationToken cancellation)
    {
        try
        {
            MqttApplicationMessage message = new() { Topic = topic, PayloadSegment = payload, QualityOfServiceLevel = MqttQualityOfServiceLevel.AtLeastOnce };
            MqttClientPublishResult result = await client.PublishAsync(message, cancellation);
            while (!IsTaken(result))
            {
                await Task.Delay(PauseAfterRefusal, _clock, cancellation);
                result = await client.PublishAsync(message, cancellation);
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
