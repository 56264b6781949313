using LabWatch.Lab.Assessments;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Time;
using LabWatch.Readings;

namespace LabWatch.SystemTests.Intake;

/// <summary>The real store behind a switch: off, it fails as an engine does that is down.</summary>
internal sealed class SwitchableStore(IReadingStore inner) : IReadingStore
{
    private int _duplicates;

    public bool IsOff { get; set; }

    /// <summary>How long each append takes longer.</summary>
    public TimeSpan Delay { get; set; }

    /// <summary>Readings that came again with the same value.</summary>
    public int Duplicates => Volatile.Read(ref _duplicates);

    public async ValueTask<AppendResult> AppendAsync(IReadOnlyList<ReadingPack> packs, CancellationToken cancellationToken)
    {
        if (IsOff)
        {
            throw new StoreUnavailableException("Switched off.");
        }

        if (Delay > TimeSpan.Zero)
        {
            await Task.Delay(Delay, TimeProvider.System, cancellationToken);
        }

        AppendResult result = await inner.AppendAsync(packs, cancellationToken);
        Interlocked.Add(ref _duplicates, result.Duplicates);
        return result;
    }

    public ValueTask<ReadingWindow> ReadAsync(SourceKey source, IReadOnlyCollection<string>? channels, TimeWindow window, CancellationToken cancellationToken) =>
        inner.ReadAsync(source, channels, window, cancellationToken);

    public ValueTask<IReadOnlyList<ReadingSummary>> ReduceAsync(ChannelKey channel, TimeWindow window, TimeSpan bucket, CancellationToken cancellationToken) =>
        inner.ReduceAsync(channel, window, bucket, cancellationToken);

    public ValueTask<IReadOnlyList<Reading>> NewestAsync(SourceKey source, CancellationToken cancellationToken) => inner.NewestAsync(source, cancellationToken);

    public ValueTask<IReadOnlyList<SourceHourRead>> HoursAsync(SourceKey source, TimeWindow window, CancellationToken cancellationToken) =>
        inner.HoursAsync(source, window, cancellationToken);

    public ValueTask<ChangedHours> ChangesAsync(long afterChange, CancellationToken cancellationToken) => inner.ChangesAsync(afterChange, cancellationToken);

    public ValueTask<IReadOnlyList<SealedHour>> SealedHoursAsync(long afterSeal, int count, CancellationToken cancellationToken) =>
        inner.SealedHoursAsync(afterSeal, count, cancellationToken);

    public ValueTask DisposeAsync() => ValueTask.CompletedTask;
}
