using System.Globalization;
using LabWatch.Lab.Time;
using MQTTnet;
using MQTTnet.Protocol;

namespace LabWatch.SystemTests.Intake;

/// <summary>A device that publishes readings of rising value and time at QoS 1.</summary>
internal sealed class Device : IDisposable
{
    private readonly IMqttClient _client = new MqttClientFactory().CreateMqttClient();
    private readonly long _start = Instant.Now(TimeProvider.System).Microseconds - (30 * Instant.MicrosecondsPerSecond);
    private int _sent;

    public async Task ConnectAsync(int port, CancellationToken cancellationToken) =>
        await _client.ConnectAsync(
            new MqttClientOptionsBuilder().WithTcpServer("127.0.0.1", port).WithClientId("device").WithTimeout(TimeSpan.FromSeconds(120)).Build(), cancellationToken);

    public async Task PublishAsync(int count, CancellationToken cancellationToken)
    {
        for (int i = 0; i < count; i++)
        {
            _sent++;
            decimal time = (_start + (_sent * 1_000L)) / 1_000_000m;
            await _client.PublishStringAsync(
                IntakeHost.Topic,
                string.Create(CultureInfo.InvariantCulture, $$"""[{"n":"power","u":"W","t":{{time}},"v":{{_sent}}}]"""),
                MqttQualityOfServiceLevel.AtLeastOnce,
                cancellationToken: cancellationToken);
        }
    }

    public void Dispose() => _client.Dispose();
}
