using System.Buffers;
using System.Collections.Concurrent;
using System.Globalization;
using System.Text;
using LabWatch.Intake.Diagnostics;
using LabWatch.Intake.Payloads;
using LabWatch.Intake.Payloads.Mapped;
using LabWatch.Intake.Pipeline;
using LabWatch.Intake.Spool;
using LabWatch.Lab.Readings;
using Microsoft.Extensions.Logging.Abstractions;
using Microsoft.Extensions.Time.Testing;

namespace LabWatch.Tests.Intake;

/// <summary>The pipeline without a broker, on a clock that stands still until it is advanced.</summary>
internal sealed class PipelineRig : IAsyncDisposable
{
    private static readonly TimeSpan Patience = TimeSpan.FromSeconds(20);
    private readonly TemporaryDirectory? _ownDirectory;
    private readonly CancellationTokenSource _stopDrain = new();
    private readonly ConcurrentQueue<string> _acknowledged = new();
    private readonly StoreLane _lane;
    private readonly SpoolDrain _drain;
    private readonly Task _draining;
    private long _next;

    public PipelineRig(string? spoolDirectory = null, long spoolLimit = 1 << 20, FakeStore? store = null, params IReadingTap[] moreTaps)
    {
        _ownDirectory = spoolDirectory is null ? new TemporaryDirectory() : null;
        Store = store ?? new FakeStore();
        Queue = new IntakeQueue(10_000, 10 << 20);
        Directory = spoolDirectory ?? _ownDirectory!.Path;
        Spool = new IntakeSpool(Directory, spoolLimit, 2_000);
        _lane = new StoreLane(Store, Quarantine, "lab", Counters);
        var options = new CommitterOptions();
        _drain = new SpoolDrain(Spool, _lane, options, Clock, NullLogger<SpoolDrain>.Instance);
        var committer = new Committer(Queue, _lane, Spool, _drain, Signal, Counters, options, Clock, NullLogger<Committer>.Instance);
        Intake = new MessageIntake(
            new PayloadDecoder(new IntakeLab(), "lab", new PayloadLimits(), new ReadingTimeRule(), new MappingTable([])),
            [.. moreTaps, Tap],
            Queue,
            Counters,
            new ReadingTimeRule(),
            Clock,
            NullLogger<MessageIntake>.Instance);
        _draining = Task.Run(() => _drain.RunAsync(_stopDrain.Token));
        Committing = Task.Run(() => committer.RunAsync(StopCommitter.Token));
    }

    public FakeTimeProvider Clock { get; } = new(DecodingBench.Arrival.ToDateTimeOffset());

    public FakeStore Store { get; }

    public FakeQuarantine Quarantine { get; } = new();

    public RecordingTap Tap { get; } = new();

    public IntakeQueue Queue { get; }

    /// <summary>Where the spool lies.</summary>
    public string Directory { get; }

    public IntakeSpool Spool { get; }

    public CommitSignal Signal { get; } = new();

    public IntakeCounters Counters { get; } = new();

    public MessageIntake Intake { get; }

    public CancellationTokenSource StopCommitter { get; } = new();

    public Task Committing { get; }

    /// <summary>Names of the messages that were acknowledged, in that order.</summary>
    public IReadOnlyList<string> Acknowledged => [.. _acknowledged];

    /// <summary>Sends one reading of its own time, named by its value.</summary>
    public bool Send(int value) => SendText(value.ToString(CultureInfo.InvariantCulture), Pack(value, Interlocked.Increment(ref _next)));

    public bool SendText(string name, string payload) =>
        Intake.TryAccept(IntakeLab.Topic, new ReadOnlySequence<byte>(Encoding.UTF8.GetBytes(payload)), false, new Delivery(this, name));

    public static string Pack(int value, long microsecond) =>
        string.Create(CultureInfo.InvariantCulture, $$"""[{"n":"well-2","t":{{(DecodingBench.Arrival.Microseconds - 1_000_000 + microsecond) / 1_000_000m}},"v":{{value}}}]""");

    /// <summary>Waits for a condition while the clock stands.</summary>
    public static async Task UntilAsync(Func<bool> condition)
    {
        long start = TimeProvider.System.GetTimestamp();
        while (!condition())
        {
            Assert.True(TimeProvider.System.GetElapsedTime(start) < Patience, "The condition did not come true.");
            await Task.Delay(TimeSpan.FromMilliseconds(1), TimeProvider.System);
        }
    }

    /// <summary>Waits for a condition while the clock goes on.</summary>
    public Task AdvanceUntilAsync(Func<bool> condition) =>
        UntilAsync(() =>
        {
            if (condition())
            {
                return true;
            }

            Clock.Advance(TimeSpan.FromMilliseconds(100));
            return false;
        });

    public async ValueTask DisposeAsync()
    {
        Store.Failure = null;
        Quarantine.Failure = null;
        Store.GoOn();
        Queue.Close();
        await StopCommitter.CancelAsync();
        await _stopDrain.CancelAsync();
        await Committing;
        await _draining;
        _drain.Dispose();
        Spool.Dispose();
        _lane.Dispose();
        Counters.Dispose();
        StopCommitter.Dispose();
        _stopDrain.Dispose();
        _ownDirectory?.Dispose();
    }

    private sealed class Delivery(PipelineRig rig, string name) : IDelivery
    {
        public void Complete(DeliveryOutcome outcome) => rig._acknowledged.Enqueue(outcome == DeliveryOutcome.Durable ? name : $"abandoned {name}");
    }
}
