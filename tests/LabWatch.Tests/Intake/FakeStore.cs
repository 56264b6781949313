using LabWatch.Lab.Assessments;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Time;
using LabWatch.Readings;

namespace LabWatch.Tests.Intake;

/// <summary>A store in memory that keeps the rules of the port and can be told to hang, to fail, or to choke on one value.</summary>
internal sealed class FakeStore : IReadingStore
{
    private readonly Lock _lock = new();
    private readonly Dictionary<(SourceKey, string, long), double> _values = [];
    private readonly List<int> _appends = [];
    private readonly List<double> _order = [];
    private TaskCompletionSource? _hang;
    private int _inside;

    /// <summary>Thrown by every append where set.</summary>
    public Exception? Failure { get; set; }

    /// <summary>An append that holds this value throws a defect.</summary>
    public double? Poison { get; set; }

    /// <summary>Whether two appends ever ran at once.</summary>
    public bool Overlapped { get; private set; }

    /// <summary>Sizes of the appends that were begun, in packs.</summary>
    public IReadOnlyList<int> Appends
    {
        get
        {
            lock (_lock)
            {
                return [.. _appends];
            }
        }
    }

    /// <summary>Values in the order in which they were accepted.</summary>
    public IReadOnlyList<double> Values
    {
        get
        {
            lock (_lock)
            {
                return [.. _order];
            }
        }
    }

    public void Hang() => _hang = new TaskCompletionSource(TaskCreationOptions.RunContinuationsAsynchronously);

    public void GoOn()
    {
        _hang?.TrySetResult();
        _hang = null;
    }

    public async ValueTask<AppendResult> AppendAsync(IReadOnlyList<ReadingPack> packs, CancellationToken cancellationToken)
    {
        Overlapped |= Interlocked.Increment(ref _inside) > 1;
        try
        {
            lock (_lock)
            {
                _appends.Add(packs.Count);
            }

            if (_hang is { } hang)
            {
                await hang.Task.WaitAsync(cancellationToken);
            }

            if (Failure is { } failure)
            {
                throw failure;
            }

            if (packs.Any(pack => pack.Readings.Any(reading => reading.Value == Poison)))
            {
                throw new InvalidOperationException("This value cannot be stored.");
            }

            lock (_lock)
            {
                return Keep(packs);
            }
        }
        finally
        {
            Interlocked.Decrement(ref _inside);
        }
    }

    public ValueTask<ReadingWindow> ReadAsync(SourceKey source, IReadOnlyCollection<string>? channels, TimeWindow window, CancellationToken cancellationToken) =>
        throw new NotSupportedException();

    public ValueTask<IReadOnlyList<ReadingSummary>> ReduceAsync(ChannelKey channel, TimeWindow window, TimeSpan bucket, CancellationToken cancellationToken) =>
        throw new NotSupportedException();

    public ValueTask<IReadOnlyList<Reading>> NewestAsync(SourceKey source, CancellationToken cancellationToken) => throw new NotSupportedException();

    public ValueTask<IReadOnlyList<SourceHourRead>> HoursAsync(SourceKey source, TimeWindow window, CancellationToken cancellationToken) =>
        throw new NotSupportedException();

    public ValueTask<ChangedHours> ChangesAsync(long afterChange, CancellationToken cancellationToken) => throw new NotSupportedException();

    public ValueTask<IReadOnlyList<SealedHour>> SealedHoursAsync(long afterSeal, int count, CancellationToken cancellationToken) =>
        throw new NotSupportedException();

    public ValueTask DisposeAsync() => ValueTask.CompletedTask;

    private AppendResult Keep(IReadOnlyList<ReadingPack> packs)
    {
        int accepted = 0;
        int duplicates = 0;
        var conflicts = new List<ReadingConflict>();
        foreach (ReadingPack pack in packs)
        {
            foreach (Reading reading in pack.Readings)
            {
                if (_values.TryAdd((pack.Source, reading.Channel, reading.Time.Microseconds), reading.Value))
                {
                    accepted++;
                    _order.Add(reading.Value);
                }
                else if (_values[(pack.Source, reading.Channel, reading.Time.Microseconds)].Equals(reading.Value))
                {
                    duplicates++;
                }
                else
                {
                    conflicts.Add(new ReadingConflict(pack.Source, pack.Arrival, reading, _values[(pack.Source, reading.Channel, reading.Time.Microseconds)]));
                }
            }
        }

        return new AppendResult(accepted, duplicates, conflicts);
    }
}
