using LabWatch.Lab.Assessments;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Time;

namespace LabWatch.Readings;

/// <summary>
/// Readings at rest. Every engine behaves the same: the first value of an identity (source, channel, device time) stays, an equal repeat
/// changes nothing, another value for it is reported as a conflict. Safe for many readers; one appender at a time.
/// </summary>
public interface IReadingStore : IAsyncDisposable
{
    /// <summary>
    /// Makes packs durable in one commit: when this returns, every accepted reading survives a crash; when it throws, none of them is
    /// visible. Throws <see cref="StoreUnavailableException"/> where the engine cannot answer now.
    /// </summary>
    ValueTask<AppendResult> AppendAsync(IReadOnlyList<ReadingPack> packs, CancellationToken cancellationToken);

    /// <summary>
    /// Raw readings of a source in a window of device time, the open hour included, in rising order of time for each channel.
    /// </summary>
    /// <param name="source">The source.</param>
    /// <param name="channels">Channel ids; null for all that have readings.</param>
    /// <param name="window">Window of device time.</param>
    /// <param name="cancellationToken">Cancels the read.</param>
    ValueTask<ReadingWindow> ReadAsync(SourceKey source, IReadOnlyCollection<string>? channels, TimeWindow window, CancellationToken cancellationToken);

    /// <summary>
    /// Readings of one channel reduced to buckets of a fixed length, aligned to the epoch: answered from the minute summaries where the
    /// bucket is a multiple of a minute, from the raw readings otherwise. Empty buckets are left out.
    /// </summary>
    ValueTask<IReadOnlyList<ReadingSummary>> ReduceAsync(ChannelKey channel, TimeWindow window, TimeSpan bucket, CancellationToken cancellationToken);

    /// <summary>The newest reading (by device time) of each channel of a source.</summary>
    ValueTask<IReadOnlyList<Reading>> NewestAsync(SourceKey source, CancellationToken cancellationToken);

    /// <summary>The hours of a source in a window that have readings, with their present revisions, in rising order.</summary>
    ValueTask<IReadOnlyList<SourceHourRead>> HoursAsync(SourceKey source, TimeWindow window, CancellationToken cancellationToken);

    /// <summary>
    /// The hours whose revision changed after a change number, and the change number now: how late readings are noticed without polling
    /// every hour. Start with 0.
    /// </summary>
    ValueTask<ChangedHours> ChangesAsync(long afterChange, CancellationToken cancellationToken);

    /// <summary>
    /// Sealed parts of source-hours in the order in which they were sealed, those with a higher seal number than the one given (start
    /// with 0), at most <paramref name="count"/> of them. Engines that do not seal give none.
    /// </summary>
    ValueTask<IReadOnlyList<SealedHour>> SealedHoursAsync(long afterSeal, int count, CancellationToken cancellationToken);
}
