using System.Globalization;
using System.Text;
using LabWatch.Lab.Time;
using MQTTnet;
using MQTTnet.Protocol;

namespace LabWatch.SystemTests.Service;

/// <summary>Publishes readings of the outer case of the sample lab's source, stamped now.</summary>
internal sealed class SurfaceDevice : IAsyncDisposable
{
    private readonly IMqttClient _client = new MqttClientFactory().CreateMqttClient();

    public static async Task<SurfaceDevice> ConnectAsync(int port, CancellationToken cancellationToken)
    {
        SurfaceDevice device = new();
        await device._client.ConnectAsync(new MqttClientOptionsBuilder().WithTcpServer("127.0.0.1", port).WithClientId("surface-device").Build(), cancellationToken);
        return device;
    }

    /// <summary>Publishes one reading and waits until it is acknowledged.</summary>
    /// <returns>Its device time, microseconds.</returns>
    public async Task<long> PublishAsync(double celsius, CancellationToken cancellationToken)
    {
        long time = Instant.Now(TimeProvider.System).Microseconds;
        string text = string.Create(CultureInfo.InvariantCulture, $"[{{\"n\":\"case\",\"u\":\"Cel\",\"t\":{time / 1_000_000}.{time % 1_000_000:D6},\"v\":{celsius:R}}}]");
        MqttClientPublishResult result = await _client.PublishAsync(
            new MqttApplicationMessageBuilder().WithTopic("lab/sample/fir").WithPayload(Encoding.UTF8.GetBytes(text)).WithQualityOfServiceLevel(MqttQualityOfServiceLevel.AtLeastOnce).Build(),
            cancellationToken);
        Assert.True(result.IsSuccess, result.ReasonString);
        return time;
    }

    public ValueTask DisposeAsync()
    {
        _client.Dispose();
        return ValueTask.CompletedTask;
    }
}
