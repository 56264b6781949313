using LabWatch.Intake.Diagnostics;
using LabWatch.Intake.Options;
using LabWatch.Lab.Time;
using LabWatch.SystemTests.Reliability;
using LabWatch.SystemTests.Service;

namespace LabWatch.SystemTests.Intake;

/// <summary>What the faults of a broker outside do to readings, with a device that sends again what was not acknowledged.</summary>
public sealed class BrokerFaultTests : IDisposable
{
    private const string Part = "external broker (mosquitto)";
    private static readonly TimeSpan Patience = TimeSpan.FromSeconds(120);
    private readonly TemporaryDirectory _data = new();

    private static CancellationToken Stop => TestContext.Current.CancellationToken;

    public BrokerFaultTests() => Assert.SkipWhen(MosquittoBroker.MissingReason is not null, MosquittoBroker.MissingReason ?? string.Empty);

    public void Dispose() => _data.Dispose();

    [Fact]
    public async Task A_broker_that_hangs_under_load_loses_and_doubles_nothing()
    {
        int rounds = TestLength.Of(shortForm: 1, longForm: 30);
        await RunAsync(
            "paused under load",
            $"{rounds} pauses of 2 to 8 s",
            rounds,
            [],
            async (broker, random) =>
            {
                await broker.PauseAsync(Stop);
                await Task.Delay(TimeSpan.FromSeconds(2 + (random.NextDouble() * TestLength.Of(1, 6))), TimeProvider.System, Stop);
                await broker.ResumeAsync(Stop);
            });
    }

    [Fact]
    public async Task A_broker_that_is_restarted_under_load_loses_and_doubles_nothing()
    {
        int rounds = TestLength.Of(shortForm: 2, longForm: 50);
        await RunAsync(
            "restarted under load",
            $"{rounds} restarts",
            rounds,
            [],
            async (broker, random) =>
            {
                await broker.StopAsync(Stop);
                await Task.Delay(TimeSpan.FromSeconds(random.NextDouble()), TimeProvider.System, Stop);
                await broker.StartAsync(Stop);
            });
    }

    /// <summary>With the settings of docs/guide/mosquitto.md: what the broker acknowledged more than its saving interval before the kill survives it.</summary>
    [Fact]
    public async Task A_broker_that_is_killed_keeps_what_it_has_saved()
    {
        int rounds = TestLength.Of(shortForm: 1, longForm: 30);

        // A second by the settings; more where the machine is busy. What was acknowledged just before may be noted a little later.
        TimeSpan unsaved = TimeSpan.FromSeconds(5);
        TimeSpan noted = TimeSpan.FromSeconds(1);
        var kills = new List<(long Begun, long Done)>();
        await RunAsync(
            "killed under load",
            $"{rounds} kills, autosave_interval 1",
            rounds,
            ["allow_anonymous true", "autosave_interval 1", "max_inflight_messages 100"],
            async (broker, random) =>
            {
                await Task.Delay(TimeSpan.FromSeconds(random.NextDouble()), TimeProvider.System, Stop);
                long begun = TimeProvider.System.GetTimestamp();
                await broker.KillAsync(Stop);
                kills.Add((begun, TimeProvider.System.GetTimestamp()));
                await broker.StartAsync(Stop);
            },
            acknowledgedAt => kills.Any(kill =>
                TimeProvider.System.GetElapsedTime(acknowledgedAt, kill.Begun) < unsaved && TimeProvider.System.GetElapsedTime(kill.Done, acknowledgedAt) < noted));
    }

    [Fact]
    public async Task A_slow_store_neither_loses_readings_nor_fills_the_memory()
    {
        int messages = TestLength.Of(shortForm: 3_000, longForm: 100_000);
        using var broker = new MosquittoBroker();
        await broker.StartAsync(Stop);
        const int Queue = 500;
        await using IntakeHost intake = await StartAsync(broker, options => options with { QueueLimit = Queue, SpoolLimitBytes = 1 << 20, SpoolFileBytes = 64 << 10 });
        intake.Store.Delay = TimeSpan.FromMilliseconds(20);
        long before = GC.GetTotalMemory(forceFullCollection: true);
        long most = 0;
        int longest = 0;
        await using var device = new PersistentDevice(broker.Port, IntakeHost.Topic, "power", First(), "W");
        device.Start();
        await Poll.UntilAsync(
            "all is acknowledged by the broker",
            () =>
            {
                longest = Math.Max(longest, intake.State.QueueLength);
                most = Math.Max(most, GC.GetTotalMemory(forceFullCollection: false) - before);
                return Task.FromResult(device.Acknowledged.Count >= messages);
            },
            Patience * 5,
            Stop);
        await device.FinishAsync(Patience);
        intake.Store.Delay = TimeSpan.Zero;
        await intake.UntilStoredAsync(device.Acknowledged.Count, Stop);
        (int lost, int doubled) = await CountAsync(intake, device, _ => false);
        ReliabilityReport.Record("intake", "store slower than the devices", $"{messages} messages, 20 ms an append", $"at most {longest} messages in the queue", device.Acknowledged.Count, lost, doubled);
        Assert.Equal((0, 0), (lost, doubled));
        Assert.InRange(longest, 0, Queue);
        Assert.InRange(most, long.MinValue, 300L << 20);
    }

    private async Task RunAsync(
        string fault, string dose, int rounds, string[] settings, Func<MosquittoBroker, Random, Task> strike, Func<long, bool>? mayBeLost = null)
    {
        using var broker = new MosquittoBroker(settings);
        await broker.StartAsync(Stop);
        await using IntakeHost intake = await StartAsync(broker);
        var random = new Random(7);
        await using var device = new PersistentDevice(broker.Port, IntakeHost.Topic, "power", First(), "W");
        device.Start();
        for (int round = 0; round < rounds; round++)
        {
            int before = device.Acknowledged.Count;
            await Poll.UntilAsync("readings are acknowledged", () => Task.FromResult(device.Acknowledged.Count > before + 200), Patience, Stop);
            await strike(broker, random);
        }

        int last = device.Acknowledged.Count;
        await Poll.UntilAsync("readings are acknowledged again", () => Task.FromResult(device.Acknowledged.Count > last + 200), Patience, Stop);
        await device.FinishAsync(Patience);
        await intake.UntilLinkAsync(BrokerLinkState.Connected, Stop);
        int permitted = device.AcknowledgedAt.Values.Count(at => mayBeLost?.Invoke(at) == true);
        await intake.UntilStoredAsync(device.Acknowledged.Count - permitted, Stop);
        (int lost, int doubled) = (0, 0);
        await Poll.UntilAsync(
            "nothing is missing",
            async () =>
            {
                (lost, doubled) = await CountAsync(intake, device, at => mayBeLost?.Invoke(at) == true);
                return lost == 0;
            },
            TimeSpan.FromSeconds(60),
            Stop,
            () => $"{lost} are");
        int all = (await CountAsync(intake, device, _ => false)).Lost;
        string outcome = mayBeLost is null ? "every acknowledged reading is stored once"
            : $"of those acknowledged in the seconds before a kill, which the broker had not saved, {all} were lost by the broker; nothing older";
        ReliabilityReport.Record(Part, fault, dose, outcome, device.Acknowledged.Count, lost, doubled);
        Assert.Equal((0, 0), (lost, doubled));
    }

    private static long First() => (Instant.Now(TimeProvider.System) - TimeSpan.FromHours(2)).Microseconds;

    private static async Task<(int Lost, int Doubled)> CountAsync(IntakeHost intake, PersistentDevice device, Func<long, bool> mayBeLost)
    {
        long[] stored = await intake.StoredTimesAsync(Stop);
        HashSet<long> distinct = [.. stored];
        return (device.AcknowledgedAt.Count(reading => !distinct.Contains(reading.Key) && !mayBeLost(reading.Value)), stored.Length - distinct.Count);
    }

    private async Task<IntakeHost> StartAsync(MosquittoBroker broker, Func<IntakeOptions, IntakeOptions>? change = null)
    {
        var intake = new IntakeHost(
            _data.Path,
            new ExternalBrokerOptions
            {
                Host = "127.0.0.1",
                Port = broker.Port,
                PingEvery = TimeSpan.FromSeconds(1),
                AnswerWithin = TimeSpan.FromSeconds(1),
                LongestRetry = TimeSpan.FromSeconds(1),
            },
            change);
        await intake.StartAsync(Stop);
        await intake.UntilLinkAsync(BrokerLinkState.Connected, Stop);
        return intake;
    }
}
