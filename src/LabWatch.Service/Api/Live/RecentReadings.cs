using System.Collections.Concurrent;
using LabWatch.Assessments.Evaluation;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;
using LabWatch.Readings;

namespace LabWatch.Service.Api.Live;

/// <summary>
/// Readings of a source's reference and set point over the last hour and more, for telling when it will be at its set point. Read from the store at
/// most every ten seconds a source however many pages ask; null while the store does not answer.
/// </summary>
internal sealed class RecentReadings(IReadingStore store, TimeProvider clock)
{
    private static readonly TimeSpan KeepFor = TimeSpan.FromSeconds(10);
    private static readonly TimeSpan Reach = TimeSpan.FromMinutes(75);
    private readonly ConcurrentDictionary<SourceKey, (long At, ReadingWindow? Readings)> _known = new();

    /// <summary>The readings up to an instant.</summary>
    public async ValueTask<ReadingWindow?> ReadAsync(ReferenceSource source, Instant now, CancellationToken cancellationToken)
    {
        if (_known.TryGetValue(source.Key, out (long At, ReadingWindow? Readings) known) && clock.GetElapsedTime(known.At) < KeepFor)
        {
            return known.Readings;
        }

        IReadOnlyList<string> channels = JunctionTemperatures.With(source, [.. source.Channels.Where(channel => channel.IsReference || channel.Quantity is ChannelQuantity.SetPoint or ChannelQuantity.ComparatorTemperature).Select(channel => channel.Id)]);
        ReadingWindow? readings;
        try
        {
            readings = await store.ReadAsync(source.Key, channels, new TimeWindow(now - Reach, now), cancellationToken).ConfigureAwait(false);
        }
        catch (StoreUnavailableException)
        {
            readings = null;
        }

        _known[source.Key] = (clock.GetTimestamp(), readings);
        return readings;
    }
}
