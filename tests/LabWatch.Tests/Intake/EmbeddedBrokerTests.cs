using System.Globalization;
using LabWatch.Intake.Brokers.Embedded;
using LabWatch.Intake.Options;
using LabWatch.Readings;
using Microsoft.Extensions.Logging.Abstractions;
using MQTTnet;
using MQTTnet.Formatter;
using MQTTnet.Protocol;

namespace LabWatch.Tests.Intake;

/// <summary>The embedded broker over a socket on the loopback address, with a client as a device.</summary>
public class EmbeddedBrokerTests
{
    private static CancellationToken Stop => TestContext.Current.CancellationToken;

    [Theory]
    [InlineData(MqttProtocolVersion.V500)]
    [InlineData(MqttProtocolVersion.V311)]
    public async Task A_message_is_acknowledged_once_it_is_durable(MqttProtocolVersion version)
    {
        await using var rig = new PipelineRig();
        await using EmbeddedBroker broker = await StartAsync(rig);
        using IMqttClient device = await ConnectAsync(broker, version);
        rig.Store.Hang();
        Task<MqttClientPublishResult> publishing = PublishAsync(device, 1);
        await PipelineRig.UntilAsync(() => rig.Store.Appends.Count == 1);
        Assert.False(publishing.IsCompleted);
        Assert.Equal([1], rig.Tap.Values);
        rig.Store.GoOn();
        Assert.True((await publishing).IsSuccess);
        Assert.Equal([1], rig.Store.Values);
    }

    [Fact]
    public async Task A_commit_that_takes_too_long_is_refused_by_reason_code_on_mqtt_5_and_the_taps_have_seen_it()
    {
        await using var rig = new PipelineRig(spoolLimit: 10);
        await using EmbeddedBroker broker = await StartAsync(rig);
        using IMqttClient device = await ConnectAsync(broker, MqttProtocolVersion.V500);
        rig.Store.Failure = new StoreUnavailableException("gone");
        Task<MqttClientPublishResult> publishing = PublishAsync(device, 1);
        await rig.AdvanceUntilAsync(() => publishing.IsCompleted);
        Assert.Equal(MqttClientPublishReasonCode.QuotaExceeded, (await publishing).ReasonCode);
        Assert.Equal([1], rig.Tap.Values);
        Assert.True(device.IsConnected);
    }

    [Fact]
    public async Task A_commit_that_takes_too_long_closes_the_connection_on_mqtt_3_1_1()
    {
        await using var rig = new PipelineRig(spoolLimit: 10);
        await using EmbeddedBroker broker = await StartAsync(rig);
        using IMqttClient device = await ConnectAsync(broker, MqttProtocolVersion.V311);
        rig.Store.Failure = new StoreUnavailableException("gone");
        Task<MqttClientPublishResult> publishing = PublishAsync(device, 1);
        await rig.AdvanceUntilAsync(() => publishing.IsCompleted);
        await Assert.ThrowsAnyAsync<Exception>(() => publishing);
        await PipelineRig.UntilAsync(() => !device.IsConnected);
        Assert.Equal([1], rig.Tap.Values);
    }

    [Fact]
    public async Task The_wait_is_half_the_keep_alive_where_that_is_shorter()
    {
        await using var rig = new PipelineRig(spoolLimit: 10);
        await using EmbeddedBroker broker = await StartAsync(rig, new EmbeddedBrokerOptions { Port = 0, CommitWait = TimeSpan.FromSeconds(30) });
        using IMqttClient device = await ConnectAsync(broker, MqttProtocolVersion.V500, keepAliveSeconds: 6);
        rig.Store.Failure = new StoreUnavailableException("gone");
        DateTimeOffset before = rig.Clock.GetUtcNow();
        Task<MqttClientPublishResult> publishing = PublishAsync(device, 1);
        await rig.AdvanceUntilAsync(() => publishing.IsCompleted || rig.Clock.GetUtcNow() - before > TimeSpan.FromSeconds(25));
        Assert.Equal(MqttClientPublishReasonCode.QuotaExceeded, (await publishing).ReasonCode);
    }

    [Theory]
    [InlineData("elsewhere/hollin-vale/fir")]
    [InlineData("lab/$x/fir")]
    [InlineData("lab")]
    public async Task Publishing_outside_the_root_is_refused(string topic)
    {
        await using var rig = new PipelineRig();
        await using EmbeddedBroker broker = await StartAsync(rig);
        using IMqttClient device = await ConnectAsync(broker, MqttProtocolVersion.V500);
        MqttClientPublishResult result = await PublishAsync(device, 1, topic);
        Assert.Equal(MqttClientPublishReasonCode.NotAuthorized, result.ReasonCode);
        Assert.Empty(rig.Tap.Values);
        Assert.Empty(rig.Quarantine.Messages);
    }

    [Fact]
    public async Task Malformed_payloads_are_acknowledged_from_quarantine()
    {
        await using var rig = new PipelineRig();
        await using EmbeddedBroker broker = await StartAsync(rig);
        using IMqttClient device = await ConnectAsync(broker, MqttProtocolVersion.V500);
        MqttClientPublishResult result = await device.PublishStringAsync(IntakeLab.Topic, "{", MqttQualityOfServiceLevel.AtLeastOnce, cancellationToken: Stop);
        Assert.True(result.IsSuccess);
        Assert.Single(rig.Quarantine.Messages);
    }

    [Fact]
    public async Task A_packet_over_the_limit_ends_the_connection_and_the_broker_goes_on()
    {
        await using var rig = new PipelineRig();
        await using EmbeddedBroker broker = await StartAsync(rig, new EmbeddedBrokerOptions { Port = 0, MaximumPacketBytes = 2_000 });
        using IMqttClient hostile = await ConnectAsync(broker, MqttProtocolVersion.V500);
        await Assert.ThrowsAnyAsync<Exception>(() =>
            hostile.PublishStringAsync(IntakeLab.Topic, new string(' ', 3_000), MqttQualityOfServiceLevel.AtLeastOnce, cancellationToken: Stop));
        using IMqttClient device = await ConnectAsync(broker, MqttProtocolVersion.V500);
        Assert.True((await PublishAsync(device, 1)).IsSuccess);
    }

    [Fact]
    public async Task Stopping_refuses_new_messages()
    {
        await using var rig = new PipelineRig();
        await using EmbeddedBroker broker = await StartAsync(rig);
        using IMqttClient device = await ConnectAsync(broker, MqttProtocolVersion.V500);
        broker.Refuse();
        Assert.Equal(MqttClientPublishReasonCode.QuotaExceeded, (await PublishAsync(device, 1)).ReasonCode);
        await broker.StopAsync();
        Assert.Null(broker.Port);
    }

    private static async Task<EmbeddedBroker> StartAsync(PipelineRig rig, EmbeddedBrokerOptions? options = null)
    {
        var broker = new EmbeddedBroker(
            options ?? new EmbeddedBrokerOptions { Port = 0 }, "lab", rig.Intake, rig.Queue, rig.Counters, rig.Clock, NullLogger<EmbeddedBroker>.Instance);
        await broker.StartAsync();
        return broker;
    }

    private static async Task<IMqttClient> ConnectAsync(EmbeddedBroker broker, MqttProtocolVersion version, int keepAliveSeconds = 60)
    {
        IMqttClient client = new MqttClientFactory().CreateMqttClient();
        await client.ConnectAsync(
            new MqttClientOptionsBuilder()
                .WithTcpServer("127.0.0.1", broker.Port)
                .WithClientId(Guid.NewGuid().ToString("N"))
                .WithProtocolVersion(version)
                .WithKeepAlivePeriod(TimeSpan.FromSeconds(keepAliveSeconds))
                .WithTimeout(TimeSpan.FromSeconds(20))
                .Build(),
            Stop);
        return client;
    }

    private static Task<MqttClientPublishResult> PublishAsync(IMqttClient device, int value, string topic = IntakeLab.Topic) =>
        device.PublishStringAsync(
            topic,
            string.Create(CultureInfo.InvariantCulture, $$"""[{"n":"well-2","v":{{value}}}]"""),
            MqttQualityOfServiceLevel.AtLeastOnce,
            cancellationToken: Stop);
}
