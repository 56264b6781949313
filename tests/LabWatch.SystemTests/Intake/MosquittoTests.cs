using System.Diagnostics;
using LabWatch.Intake.Diagnostics;
using LabWatch.Intake.Options;

namespace LabWatch.SystemTests.Intake;

/// <summary>The intake against a real broker over a real socket, with the real store.</summary>
public sealed class MosquittoTests : IDisposable
{
    private readonly TemporaryDirectory _data = new();

    private static CancellationToken Stop => TestContext.Current.CancellationToken;

    public MosquittoTests() => Assert.SkipWhen(MosquittoBroker.MissingReason is not null, MosquittoBroker.MissingReason ?? string.Empty);

    public void Dispose() => _data.Dispose();

    [Theory]
    [InlineData(false)]
    [InlineData(true)]
    public async Task What_is_published_while_the_service_is_away_arrives_after_it_is_back(bool mqtt311)
    {
        using MosquittoBroker broker = await StartBrokerAsync();
        using Device device = await ConnectAsync(broker);
        await using (IntakeHost first = await StartIntakeAsync(broker.Port, mqtt311))
        {
            await first.UntilLinkAsync(BrokerLinkState.Connected, Stop);
            Assert.False(first.State.SessionPresent);
            await device.PublishAsync(20, Stop);
            await first.UntilStoredAsync(20, Stop);
            await Poll.UntilAsync("all are acknowledged", () => Task.FromResult(first.State.Totals.Acknowledged == 20), TimeSpan.FromSeconds(120), Stop);
            await first.StopAsync(Stop);
        }

        await device.PublishAsync(30, Stop);
        await using IntakeHost second = await StartIntakeAsync(broker.Port, mqtt311);
        await second.UntilStoredAsync(50, Stop);
        Assert.True(second.State.SessionPresent);
        await AssertStoredOnceAsync(second, 50);
        Assert.Equal(0, second.Store.Duplicates);
    }

    [Fact]
    public async Task What_was_not_acknowledged_is_delivered_again_and_stored_once()
    {
        using MosquittoBroker broker = await StartBrokerAsync();
        using Device device = await ConnectAsync(broker);
        await using (IntakeHost first = await StartIntakeAsync(broker.Port, change: options => options with { StopBudget = TimeSpan.Zero }))
        {
            await first.UntilLinkAsync(BrokerLinkState.Connected, Stop);
            await device.PublishAsync(10, Stop);
            await first.UntilStoredAsync(10, Stop);

            // The spool's folder is gone and the store is off: nothing can be acknowledged.
            Directory.Delete(Path.Combine(_data.Path, "spool"), recursive: true);
            first.Store.IsOff = true;
            await device.PublishAsync(40, Stop);
            await Poll.UntilAsync("commits stop", () => Task.FromResult(first.State.CommitsStopped), TimeSpan.FromSeconds(120), Stop);
            Assert.Equal(10, first.State.Totals.Acknowledged);
            await first.StopAsync(Stop);
        }

        await using IntakeHost second = await StartIntakeAsync(broker.Port);
        await second.UntilStoredAsync(50, Stop);
        await AssertStoredOnceAsync(second, 50);
    }

    [Theory]
    [InlineData(false)]
    [InlineData(true)]
    public async Task A_broker_that_is_restarted_loses_and_doubles_nothing(bool mqtt311)
    {
        using MosquittoBroker broker = await StartBrokerAsync();
        await using IntakeHost intake = await StartIntakeAsync(broker.Port, mqtt311);
        await intake.UntilLinkAsync(BrokerLinkState.Connected, Stop);
        using (Device device = await ConnectAsync(broker))
        {
            await device.PublishAsync(25, Stop);
        }

        await broker.StopAsync(Stop);
        await Poll.UntilAsync("the loss is noticed", () => Task.FromResult(intake.State.Link == BrokerLinkState.Connecting), TimeSpan.FromSeconds(120), Stop);
        await broker.StartAsync(Stop);
        await intake.UntilLinkAsync(BrokerLinkState.Connected, Stop);
        Assert.True(intake.State.SessionPresent);
        using Device again = await ConnectAsync(broker);
        await again.PublishAsync(25, Stop);
        await intake.UntilStoredAsync(50, Stop);
        Assert.Equal(50, (await intake.StoredAsync(Stop)).Length);
    }

    [Fact]
    public async Task With_the_store_off_taps_see_everything_and_the_spool_takes_it()
    {
        using MosquittoBroker broker = await StartBrokerAsync();
        using Device device = await ConnectAsync(broker);
        await using IntakeHost intake = await StartIntakeAsync(broker.Port);
        await intake.UntilLinkAsync(BrokerLinkState.Connected, Stop);
        intake.Store.IsOff = true;

        // More than the 20 messages that the broker sends without an acknowledgement.
        await device.PublishAsync(200, Stop);
        await Poll.UntilAsync("the tap has seen all", () => Task.FromResult(intake.Seen.Count == 200), TimeSpan.FromSeconds(120), Stop);
        await Poll.UntilAsync("all is acknowledged", () => Task.FromResult(intake.State.Totals.Acknowledged == 200), TimeSpan.FromSeconds(120), Stop);
        Assert.Empty(await intake.StoredAsync(Stop));
        intake.Store.IsOff = false;
        await intake.UntilStoredAsync(200, Stop);
        await AssertStoredOnceAsync(intake, 200);
        await Poll.UntilAsync("the spool is empty", () => Task.FromResult(intake.State.SpoolBytes == 0), TimeSpan.FromSeconds(120), Stop);
    }

    [Fact]
    public async Task With_store_and_spool_off_taps_are_fed_without_a_session_and_the_broker_keeps_the_rest()
    {
        using MosquittoBroker broker = await StartBrokerAsync();
        using Device device = await ConnectAsync(broker);
        await using IntakeHost intake = await StartIntakeAsync(broker.Port);
        await intake.UntilLinkAsync(BrokerLinkState.Connected, Stop);
        string spool = Path.Combine(_data.Path, "spool");
        Directory.Delete(spool, recursive: true);
        intake.Store.IsOff = true;
        await device.PublishAsync(100, Stop);
        await intake.UntilLinkAsync(BrokerLinkState.WatchingOnly, Stop);
        await device.PublishAsync(50, Stop);
        await Poll.UntilAsync("the tap sees what is new", () => Task.FromResult(intake.Seen.ContainsKey(150)), TimeSpan.FromSeconds(120), Stop);
        Assert.Equal(0, intake.State.Totals.Acknowledged);

        intake.Store.IsOff = false;
        await intake.UntilLinkAsync(BrokerLinkState.Connected, Stop);
        await intake.UntilStoredAsync(150, Stop);
        await AssertStoredOnceAsync(intake, 150);
    }

    [Fact]
    public async Task A_link_that_only_looks_alive_is_made_anew()
    {
        using MosquittoBroker broker = await StartBrokerAsync();
        using Device device = await ConnectAsync(broker);
        using var proxy = new FreezableProxy(broker.Port);
        await using IntakeHost intake = await StartIntakeAsync(proxy.Port);
        await intake.UntilLinkAsync(BrokerLinkState.Connected, Stop);
        await device.PublishAsync(5, Stop);
        await intake.UntilStoredAsync(5, Stop);
        proxy.Freeze();
        await device.PublishAsync(5, Stop);
        await intake.UntilLinkAsync(BrokerLinkState.Connecting, Stop);
        proxy.Thaw();
        await intake.UntilStoredAsync(10, Stop);
        await AssertStoredOnceAsync(intake, 10);
    }

    [Fact]
    public async Task Two_installations_with_one_id_do_not_fight_for_ever_and_taps_of_both_go_on()
    {
        // This broker does not say that a session was taken; a series of short connections is the sign.
        using MosquittoBroker broker = await StartBrokerAsync();
        using Device device = await ConnectAsync(broker);
        using var otherData = new TemporaryDirectory();
        await using IntakeHost one = await StartIntakeAsync(broker.Port);
        await one.UntilLinkAsync(BrokerLinkState.Connected, Stop);
        await using IntakeHost other = await StartIntakeAsync(broker.Port, directory: otherData.Path);
        IntakeHost[] both = [one, other];
        await Poll.UntilAsync(
            "one gives way and watches, the other has the session",
            () => Task.FromResult(both.Select(host => host.State.Link).Order().SequenceEqual([BrokerLinkState.Connected, BrokerLinkState.TakenOver])),
            TimeSpan.FromSeconds(120),
            Stop);

        // The one that gives way watches without a session: what was published before it had subscribed does not reach it.
        await Poll.UntilAsync(
            "both taps see readings",
            async () =>
            {
                await device.PublishAsync(1, Stop);
                return both.All(host => host.Seen.Count >= 3);
            },
            TimeSpan.FromSeconds(120),
            Stop);
        Assert.Contains(both, host => host.State.LinkNote == "Another client has taken the session.");
    }

    [Fact]
    public async Task User_and_password_come_by_secret_name_and_a_wrong_one_is_reported()
    {
        using var files = new TemporaryDirectory();
        string passwords = files.At("passwords");
        await File.WriteAllTextAsync(passwords, "bench:open sesame\n", Stop);
        Assert.SkipUnless(File.Exists("/usr/bin/mosquitto_passwd"), "mosquitto_passwd is not installed.");
        using (Process hash = Process.Start("/usr/bin/mosquitto_passwd", ["-U", passwords]))
        {
            await hash.WaitForExitAsync(Stop);
        }

        if (OperatingSystem.IsLinux())
        {
            // The broker drops its privileges when started by root and must still read this.
            File.SetUnixFileMode(files.Path, (UnixFileMode)0x1FF);
            File.SetUnixFileMode(passwords, (UnixFileMode)0x1A4);
        }

        await File.WriteAllTextAsync(files.At("user"), "bench", Stop);
        await File.WriteAllTextAsync(files.At("password"), "wrong", Stop);
        using var broker = new MosquittoBroker("allow_anonymous false", $"password_file {passwords}");
        await broker.StartAsync(Stop);
        await using IntakeHost intake = await StartIntakeAsync(broker.Port, change: options => options with
        {
            SecretsDirectory = files.Path,
            ExternalBroker = options.ExternalBroker! with { UserSecret = "user", PasswordSecret = "password" },
        });
        await Poll.UntilAsync(
            "the refusal is reported",
            () => Task.FromResult(intake.State.LinkNote?.Contains("NotAuthorized", StringComparison.Ordinal) == true),
            TimeSpan.FromSeconds(120),
            Stop,
            () => intake.State.LinkNote ?? string.Empty);
        await File.WriteAllTextAsync(files.At("password"), "open sesame\n", Stop);
        await intake.UntilLinkAsync(BrokerLinkState.Connected, Stop);
    }

    private async Task<IntakeHost> StartIntakeAsync(int port, bool mqtt311 = false, Func<IntakeOptions, IntakeOptions>? change = null, string? directory = null)
    {
        var intake = new IntakeHost(
            directory ?? _data.Path,
            new ExternalBrokerOptions
            {
                Host = "127.0.0.1",
                Port = port,
                UseMqtt311 = mqtt311,
                PingEvery = TimeSpan.FromSeconds(1),
                AnswerWithin = TimeSpan.FromSeconds(3),
                LongestRetry = TimeSpan.FromSeconds(1),
            },
            change);
        await intake.StartAsync(Stop);
        return intake;
    }

    private static async Task<MosquittoBroker> StartBrokerAsync()
    {
        var broker = new MosquittoBroker();
        await broker.StartAsync(Stop);
        return broker;
    }

    private static async Task<Device> ConnectAsync(MosquittoBroker broker)
    {
        var device = new Device();
        await device.ConnectAsync(broker.Port, Stop);
        return device;
    }

    private static async Task AssertStoredOnceAsync(IntakeHost intake, int count) =>
        Assert.Equal(Enumerable.Range(1, count).Select(number => (double)number), await intake.StoredAsync(Stop));
}
