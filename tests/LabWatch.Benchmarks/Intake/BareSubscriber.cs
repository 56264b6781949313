using MQTTnet;
using MQTTnet.Protocol;

namespace LabWatch.Benchmarks.Intake;

/// <summary>A client that does nothing with a message but acknowledge it.</summary>
internal sealed class BareSubscriber(int port) : ISubscriber
{
    private readonly IMqttClient _client = new MqttClientFactory().CreateMqttClient();
    private long _done;

    public long Done => Interlocked.Read(ref _done);

    public async Task StartAsync()
    {
        _client.ApplicationMessageReceivedAsync += _ =>
        {
            Interlocked.Increment(ref _done);
            return Task.CompletedTask;
        };
        await _client.ConnectAsync(
            new MqttClientOptionsBuilder()
                .WithTcpServer("127.0.0.1", port)
                .WithClientId("bare")
                .WithCleanStart(false)
                .WithSessionExpiryInterval(3_600)
                .WithReceiveMaximum(1_000)
                .Build());
        await _client.SubscribeAsync("lab/#", MqttQualityOfServiceLevel.AtLeastOnce);
    }

    public override string ToString() => $"bare, {Done} received";

    public Task StopAsync() => _client.DisconnectAsync(new MqttClientDisconnectOptionsBuilder().WithSessionExpiryInterval(3_600).Build());

    public ValueTask DisposeAsync()
    {
        _client.Dispose();
        return ValueTask.CompletedTask;
    }
}
