using System.Collections.Concurrent;
using System.Globalization;
using System.Security.Cryptography.X509Certificates;
using LabWatch.Intake.Accounts;
using LabWatch.Intake.Brokers.Embedded;
using LabWatch.Intake.Options;
using LabWatch.Intake.Outgoing;
using LabWatch.Intake.Payloads.Mapped;
using LabWatch.Readings;
using Microsoft.Extensions.Logging.Abstractions;
using MQTTnet;
using MQTTnet.Formatter;
using MQTTnet.Protocol;

namespace LabWatch.Tests.Intake;

/// <summary>The embedded broker over a socket on the loopback address, with a client as a device.</summary>
public class EmbeddedBrokerTests
{
    private StateBoard? _board;

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

    [Theory]
    [InlineData(MqttProtocolVersion.V500)]
    [InlineData(MqttProtocolVersion.V311)]
    public async Task Messages_of_one_device_share_commits_and_are_acknowledged_in_order(MqttProtocolVersion version)
    {
        await using var rig = new PipelineRig();
        await using EmbeddedBroker broker = await StartAsync(rig);
        using IMqttClient device = await ConnectAsync(broker, version);
        rig.Store.Hang();
        var order = new List<int>();
        Task[] publishing = [.. Enumerable.Range(1, 20).Select(async value =>
        {
            Assert.True((await PublishTimedAsync(device, value)).IsSuccess);
            lock (order)
            {
                order.Add(value);
            }
        })];
        await PipelineRig.UntilAsync(() => rig.Tap.Values.Count == 20);
        Assert.Empty(order);
        rig.Store.GoOn();
        await Task.WhenAll(publishing);
        Assert.Equal(20, rig.Store.Values.Count);
        Assert.InRange(rig.Store.Appends.Count, 1, 3);
    }

    [Fact]
    public async Task A_device_is_read_no_further_while_the_permitted_number_of_its_messages_waits()
    {
        await using var rig = new PipelineRig();
        await using EmbeddedBroker broker = await StartAsync(rig, new EmbeddedBrokerOptions { Port = 0, MaximumUnderWay = 5 });
        using IMqttClient slow = await ConnectAsync(broker, MqttProtocolVersion.V311);
        rig.Store.Hang();
        Task[] publishing = [.. Enumerable.Range(1, 20).Select(value => PublishTimedAsync(slow, value))];
        await PipelineRig.UntilAsync(() => rig.Tap.Values.Count == 5);
        using IMqttClient other = await ConnectAsync(broker, MqttProtocolVersion.V500);
        Task<MqttClientPublishResult> passing = PublishTimedAsync(other, 100);
        await PipelineRig.UntilAsync(() => rig.Tap.Values.Count == 6);
        rig.Store.GoOn();
        await Task.WhenAll(publishing);
        Assert.True((await passing).IsSuccess);
        Assert.Equal(21, rig.Store.Values.Count);
    }

    [Fact]
    public async Task A_device_that_sends_more_than_permitted_is_refused()
    {
        await using var rig = new PipelineRig();
        await using EmbeddedBroker broker = await StartAsync(rig, new EmbeddedBrokerOptions { Port = 0, MaximumMessagesPerSecond = 2 });
        using IMqttClient device = await ConnectAsync(broker, MqttProtocolVersion.V500);
        MqttClientPublishResult[] results = await Task.WhenAll(Enumerable.Range(1, 6).Select(value => PublishAsync(device, value)));
        Assert.Equal(4, results.Count(result => result.IsSuccess));
        Assert.Equal(2, results.Count(result => result.ReasonCode == MqttClientPublishReasonCode.QuotaExceeded));
        rig.Clock.Advance(TimeSpan.FromSeconds(1));
        Assert.True((await PublishAsync(device, 7)).IsSuccess);
    }

    [Fact]
    public async Task A_device_that_is_silent_for_one_and_a_half_times_its_keep_alive_is_let_go()
    {
        await using var rig = new PipelineRig();
        await using EmbeddedBroker broker = await StartAsync(rig);
        using IMqttClient device = await ConnectAsync(broker, MqttProtocolVersion.V500, keepAliveSeconds: 600);
        rig.Clock.Advance(TimeSpan.FromSeconds(890));
        Assert.True((await PublishAsync(device, 1)).IsSuccess);
        rig.Clock.Advance(TimeSpan.FromSeconds(910));
        await PipelineRig.UntilAsync(() => !device.IsConnected);
    }

    [Fact]
    public async Task A_quality_of_service_2_message_is_received_once_it_is_durable()
    {
        await using var rig = new PipelineRig();
        await using EmbeddedBroker broker = await StartAsync(rig);
        using IMqttClient device = await ConnectAsync(broker, MqttProtocolVersion.V311);
        MqttClientPublishResult result = await device.PublishStringAsync(IntakeLab.Topic, """[{"n":"well-2","v":3}]""", MqttQualityOfServiceLevel.ExactlyOnce, cancellationToken: Stop);
        Assert.True(result.IsSuccess);
        Assert.Equal([3], rig.Store.Values);
    }

    [Fact]
    public async Task Retained_messages_reach_later_subscribers_also_after_a_restart()
    {
        await using var rig = new PipelineRig();
        await using (EmbeddedBroker first = await StartAsync(rig))
        {
            using IMqttClient device = await ConnectAsync(first, MqttProtocolVersion.V500);
            Assert.True((await device.PublishStringAsync(IntakeLab.Topic, """[{"n":"well-2","v":3}]""", MqttQualityOfServiceLevel.AtLeastOnce, retain: true, cancellationToken: Stop)).IsSuccess);
            Assert.Equal("""[{"n":"well-2","v":3}]""", await RetainedAsync(first));
        }

        await using EmbeddedBroker second = await StartAsync(rig);
        Assert.Equal("""[{"n":"well-2","v":3}]""", await RetainedAsync(second));
    }

    [Fact]
    public async Task A_device_with_an_account_publishes_for_its_source_alone_until_it_is_taken_back()
    {
        await using var rig = new PipelineRig();
        DeviceAccountFile accounts = new(Path.Combine(rig.Directory, "devices.json"));
        string password = accounts.Add("fir-logger", IntakeLab.Fir, "ann", DecodingBench.Arrival)!;
        await using EmbeddedBroker broker = await StartAsync(rig, accounts: accounts, requireAccounts: true);
        using IMqttClient device = await ConnectAsync(broker, MqttProtocolVersion.V500, change: options => options.WithCredentials("fir-logger", password));
        Assert.True((await PublishAsync(device, 1)).IsSuccess);
        Assert.Equal(MqttClientPublishReasonCode.NotAuthorized, (await PublishAsync(device, 2, "lab/hollin-vale/rowan")).ReasonCode);
        Assert.Equal(MqttClientSubscribeResultCode.NotAuthorized, (await device.SubscribeAsync("lab/#", cancellationToken: Stop)).Items.Single().ResultCode);
        await Assert.ThrowsAnyAsync<Exception>(() => ConnectOrThrowAsync(broker, options => options.WithCredentials("fir-logger", "wrong")));
        await Assert.ThrowsAnyAsync<Exception>(() => ConnectOrThrowAsync(broker, options => options));
        Assert.True(accounts.Revoke("fir-logger", DecodingBench.Arrival));
        await PipelineRig.UntilAsync(() => !device.IsConnected);
        await Assert.ThrowsAnyAsync<Exception>(() => ConnectOrThrowAsync(broker, options => options.WithCredentials("fir-logger", password)));
    }

    [Fact]
    public async Task Over_tls_the_device_sees_the_certificate_and_one_that_trusts_another_goes_away()
    {
        using var certificates = new TestCertificates();
        await using var rig = new PipelineRig();
        await using EmbeddedBroker broker = await StartAsync(rig, new EmbeddedBrokerOptions { Port = 0, Tls = true }, certificate: certificates);
        using IMqttClient device = await ConnectAsync(broker, MqttProtocolVersion.V500, change: options => options.WithTlsOptions(tls => tls.WithTrustChain(certificates.Authorities).WithTargetHost("localhost").WithRevocationMode(X509RevocationMode.NoCheck)));
        Assert.True((await PublishAsync(device, 1)).IsSuccess);
        using var others = new TestCertificates();
        await Assert.ThrowsAnyAsync<Exception>(() => ConnectOrThrowAsync(broker, options => options.WithTlsOptions(tls => tls.WithTrustChain(others.Authorities).WithTargetHost("localhost").WithRevocationMode(X509RevocationMode.NoCheck))));
        await Assert.ThrowsAnyAsync<Exception>(() => ConnectOrThrowAsync(broker, options => options.WithTimeout(TimeSpan.FromSeconds(2))));
    }

    [Fact]
    public async Task A_device_without_a_certificate_of_the_authority_is_turned_away_where_one_is_asked_for()
    {
        using var certificates = new TestCertificates();
        await using var rig = new PipelineRig();
        string authorities = Path.Combine(rig.Directory, "authority.pem");
        File.WriteAllText(authorities, certificates.AuthorityPem);
        await using EmbeddedBroker broker = await StartAsync(rig, new EmbeddedBrokerOptions { Port = 0, Tls = true, ClientAuthorities = authorities }, certificate: certificates);
        using IMqttClient device = await ConnectAsync(broker, MqttProtocolVersion.V311, change: options => options.WithTlsOptions(tls => tls
            .WithTrustChain(certificates.Authorities).WithTargetHost("localhost").WithRevocationMode(X509RevocationMode.NoCheck).WithClientCertificates([certificates.Client])));
        Assert.True((await PublishAsync(device, 1)).IsSuccess);
        await Assert.ThrowsAnyAsync<Exception>(async () =>
        {
            using IMqttClient without = await ConnectOrThrowAsync(broker, options => options.WithTlsOptions(tls => tls.WithTrustChain(certificates.Authorities).WithTargetHost("localhost").WithRevocationMode(X509RevocationMode.NoCheck)));
            await PublishAsync(without, 2);
        });
    }

    [Fact]
    public async Task The_state_of_the_service_and_of_sources_is_retained_for_subscribers()
    {
        await using var rig = new PipelineRig();
        await using EmbeddedBroker broker = await StartAsync(rig);
        _board!.Tell("hollin-vale/fir/state", """{"state":"ready"}"""u8.ToArray());
        using IMqttClient reader = await ConnectAsync(broker, MqttProtocolVersion.V500);
        var received = new ConcurrentDictionary<string, string>();
        reader.ApplicationMessageReceivedAsync += e =>
        {
            received[e.ApplicationMessage.Topic] = e.ApplicationMessage.ConvertPayloadToString();
            return Task.CompletedTask;
        };
        await reader.SubscribeAsync("lab-out/#", MqttQualityOfServiceLevel.AtLeastOnce, Stop);
        await PipelineRig.UntilAsync(() => received.Count == 2);
        Assert.Equal("""{"state":"ready"}""", received["lab-out/hollin-vale/fir/state"]);
        Assert.Contains("online", received["lab-out/hollin-vale/service/one"], StringComparison.Ordinal);
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

    private static async Task<string> RetainedAsync(EmbeddedBroker broker)
    {
        using IMqttClient reader = await ConnectAsync(broker, MqttProtocolVersion.V500);
        var received = new TaskCompletionSource<string>(TaskCreationOptions.RunContinuationsAsynchronously);
        reader.ApplicationMessageReceivedAsync += e =>
        {
            received.TrySetResult(e.ApplicationMessage.ConvertPayloadToString());
            return Task.CompletedTask;
        };
        await reader.SubscribeAsync("lab/#", MqttQualityOfServiceLevel.AtLeastOnce, Stop);
        return await received.Task.WaitAsync(TimeSpan.FromSeconds(60), TimeProvider.System, Stop);
    }

    private async Task<EmbeddedBroker> StartAsync(
        PipelineRig rig, EmbeddedBrokerOptions? options = null, DeviceAccountFile? accounts = null, bool requireAccounts = false, IBrokerCertificate? certificate = null)
    {
        var intake = new IntakeOptions { InstallationId = "one", SpoolDirectory = rig.Directory };
        var broker = new EmbeddedBroker(
            options ?? new EmbeddedBrokerOptions { Port = 0 },
            Path.Combine(rig.Directory, "retained.json"),
            new DeviceDoor("lab-out", requireAccounts, accounts, "lab", new MappingTable([]), new IntakeLab()),
            _board = new StateBoard(intake),
            new ServiceState(intake, new IntakeLab(), rig.Clock),
            certificate,
            rig.Intake, rig.Queue, rig.Counters, rig.Clock, NullLogger<EmbeddedBroker>.Instance);
        await broker.StartAsync();
        return broker;
    }

    private static async Task<IMqttClient> ConnectOrThrowAsync(EmbeddedBroker broker, Func<MqttClientOptionsBuilder, MqttClientOptionsBuilder> change)
    {
        IMqttClient client = await ConnectAsync(broker, MqttProtocolVersion.V500, change: change);
        return client.IsConnected ? client : throw new InvalidOperationException("The connection was refused.");
    }

    private static async Task<IMqttClient> ConnectAsync(
        EmbeddedBroker broker, MqttProtocolVersion version, int keepAliveSeconds = 60, Func<MqttClientOptionsBuilder, MqttClientOptionsBuilder>? change = null)
    {
        IMqttClient client = new MqttClientFactory().CreateMqttClient();
        MqttClientOptionsBuilder options = new MqttClientOptionsBuilder()
            .WithTcpServer("127.0.0.1", broker.Port)
            .WithClientId(Guid.NewGuid().ToString("N"))
            .WithProtocolVersion(version)
            .WithKeepAlivePeriod(TimeSpan.FromSeconds(keepAliveSeconds))
            .WithTimeout(TimeSpan.FromSeconds(60));
        await client.ConnectAsync((change?.Invoke(options) ?? options).Build(), Stop);
        return client;
    }

    private static Task<MqttClientPublishResult> PublishTimedAsync(IMqttClient device, int value) =>
        device.PublishStringAsync(IntakeLab.Topic, PipelineRig.Pack(value, value), MqttQualityOfServiceLevel.AtLeastOnce, cancellationToken: Stop);

    private static Task<MqttClientPublishResult> PublishAsync(IMqttClient device, int value, string topic = IntakeLab.Topic) =>
        device.PublishStringAsync(
            topic,
            string.Create(CultureInfo.InvariantCulture, $$"""[{"n":"well-2","v":{{value}}}]"""),
            MqttQualityOfServiceLevel.AtLeastOnce,
            cancellationToken: Stop);
}
