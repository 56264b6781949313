using System.Diagnostics;
using LabWatch.Lab.Assessments;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Time;
using LabWatch.Readings;

namespace LabWatch.Benchmarks.Assessments;

/// <summary>A store with the time that is spent in reading windows and in looking up hours.</summary>
internal sealed class TimedStore(IReadingStore inner) : IReadingStore
{
    private long _reading;
    private long _hours;
    private int _reads;

    public TimeSpan Reading => Stopwatch.GetElapsedTime(0, Interlocked.Read(ref _reading));

    public TimeSpan Hours => Stopwatch.GetElapsedTime(0, Interlocked.Read(ref _hours));

    public int Reads => _reads;

    public void Reset() => (_reading, _hours, _reads) = (0, 0, 0);

    public async ValueTask<ReadingWindow> ReadAsync(SourceKey source, IReadOnlyCollection<string>? channels, TimeWindow window, CancellationToken cancellationToken)
    {
        long start = Stopwatch.GetTimestamp();
        ReadingWindow answer = await inner.ReadAsync(source, channels, window, cancellationToken);
        Interlocked.Add(ref _reading, Stopwatch.GetTimestamp() - start);
        Interlocked.Increment(ref _reads);
        return answer;
    }

    public async ValueTask<IReadOnlyList<SourceHourRead>> HoursAsync(SourceKey source, TimeWindow window, CancellationToken cancellationToken)
    {
        long start = Stopwatch.GetTimestamp();
        IReadOnlyList<SourceHourRead> answer = await inner.HoursAsync(source, window, cancellationToken);
        Interlocked.Add(ref _hours, Stopwatch.GetTimestamp() - start);
        return answer;
    }

    public ValueTask<AppendResult> AppendAsync(IReadOnlyList<ReadingPack> packs, CancellationToken cancellationToken) => inner.AppendAsync(packs, cancellationToken);

    public ValueTask<IReadOnlyList<ReadingSummary>> ReduceAsync(ChannelKey channel, TimeWindow window, TimeSpan bucket, CancellationToken cancellationToken) =>
        inner.ReduceAsync(channel, window, bucket, cancellationToken);

    public ValueTask<IReadOnlyList<Reading>> NewestAsync(SourceKey source, CancellationToken cancellationToken) => inner.NewestAsync(source, cancellationToken);

    public ValueTask<ChangedHours> ChangesAsync(long afterChange, CancellationToken cancellationToken) => inner.ChangesAsync(afterChange, cancellationToken);

    public ValueTask<IReadOnlyList<SealedHour>> SealedHoursAsync(long afterSeal, int count, CancellationToken cancellationToken) =>
        inner.SealedHoursAsync(afterSeal, count, cancellationToken);

    public ValueTask DisposeAsync() => inner.DisposeAsync();
}
