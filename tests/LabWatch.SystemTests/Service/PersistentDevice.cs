using System.Collections.Concurrent;
using System.Globalization;
using System.Text;
using MQTTnet;
using MQTTnet.Protocol;

namespace LabWatch.SystemTests.Service;

/// <summary>
/// A device that publishes one reading a message with QoS 1, several in flight, and sends a message again until it is acknowledged, as a
/// good device does. It remembers what was acknowledged.
/// </summary>
internal sealed class PersistentDevice(int port, string topic, string channel, long firstMicroseconds, string unit = "Ohm") : IAsyncDisposable
{
    private const int InFlight = 16;
    private const long StepMicroseconds = 1_000;
    private static readonly TimeSpan Patience = TimeSpan.FromSeconds(10);
    private static readonly TimeSpan Pause = TimeSpan.FromMilliseconds(50);

    private readonly ConcurrentDictionary<long, double> _acknowledged = new();
    private readonly ConcurrentDictionary<long, long> _acknowledgedAt = new();
    private readonly CancellationTokenSource _stopping = new();
    private readonly SemaphoreSlim _link = new(1, 1);
    private readonly IMqttClient _client = new MqttClientFactory().CreateMqttClient();
    private long _next = -1;
    private Task _running = Task.CompletedTask;

    /// <summary>Device time in microseconds and value of every reading that the broker acknowledged.</summary>
    public IReadOnlyDictionary<long, double> Acknowledged => _acknowledged;

    /// <summary>Device time in microseconds, and monotonic time of the acknowledgement.</summary>
    public IReadOnlyDictionary<long, long> AcknowledgedAt => _acknowledgedAt;

    /// <summary>Begins to publish.</summary>
    public void Start() => _running = Task.WhenAll(Enumerable.Range(0, InFlight).Select(_ => Task.Run(PublishAsync)));

    /// <summary>Sends no new reading, sends those in flight again until they are acknowledged, and disconnects.</summary>
    public async Task FinishAsync(TimeSpan deadline)
    {
        await _stopping.CancelAsync();
        await _running.WaitAsync(deadline, TimeProvider.System);
        await _client.DisconnectAsync();
    }

    /// <inheritdoc/>
    public async ValueTask DisposeAsync()
    {
        await _stopping.CancelAsync();
        _client.Dispose();
        _stopping.Dispose();
        _link.Dispose();
    }

    private async Task PublishAsync()
    {
        while (!_stopping.IsCancellationRequested)
        {
            long number = Interlocked.Increment(ref _next);
            long time = firstMicroseconds + (number * StepMicroseconds);
            double value = 100 + (number % 1000 / 1000.0);
            while (!await TryPublishAsync(time, value))
            {
                await Task.Delay(Pause, TimeProvider.System, CancellationToken.None);
            }

            _acknowledgedAt[time] = TimeProvider.System.GetTimestamp();
            _acknowledged[time] = value;
        }
    }

    private async Task<bool> TryPublishAsync(long time, double value)
    {
        try
        {
            await ConnectAsync();
            string text = string.Create(CultureInfo.InvariantCulture, $"[{{\"n\":\"{channel}\",\"u\":\"{unit}\",\"t\":{time / 1_000_000}.{time % 1_000_000:D6},\"v\":{value:R}}}]");
            MqttApplicationMessage message = new MqttApplicationMessageBuilder()
                .WithTopic(topic).WithPayload(Encoding.UTF8.GetBytes(text)).WithQualityOfServiceLevel(MqttQualityOfServiceLevel.AtLeastOnce).Build();
            // The client can wait for ever for an answer that went down with a former connection.
            using CancellationTokenSource patience = new(Patience, TimeProvider.System);
            MqttClientPublishResult result = await _client.PublishAsync(message, patience.Token);
            return result.IsSuccess;
        }
        catch (Exception exception) when (exception is MQTTnet.Exceptions.MqttCommunicationException or MQTTnet.Exceptions.MqttConfigurationException or InvalidOperationException or OperationCanceledException or IOException or TimeoutException)
        {
            // The service is being killed: not acknowledged, so it is sent again.
            return false;
        }
    }

    private async Task ConnectAsync()
    {
        if (_client.IsConnected)
        {
            return;
        }

        await _link.WaitAsync();
        try
        {
            if (!_client.IsConnected)
            {
                using CancellationTokenSource patience = new(Patience, TimeProvider.System);
                await _client.ConnectAsync(new MqttClientOptionsBuilder().WithTcpServer("127.0.0.1", port).WithClientId("device").WithTimeout(TimeSpan.FromSeconds(3)).Build(), patience.Token);
            }
        }
        finally
        {
            _link.Release();
        }
    }
}
