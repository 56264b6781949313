using System.Collections.Concurrent;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Readings;
using LabWatch.Readings;

namespace LabWatch.Service.Api.Live;

/// <summary>
/// The newest reading of every channel, kept in memory so that a page never waits for the store. Fed by the intake; a source that the
/// intake has not spoken of for a while is looked up in the store (start of the service, another node's source).
/// </summary>
internal sealed class LiveReadings(IReadingStore store, TimeProvider clock) : IReadingTap
{
    private static readonly TimeSpan LookUpEvery = TimeSpan.FromSeconds(10);
    private readonly ConcurrentDictionary<SourceKey, SourceLive> _sources = new();

    /// <inheritdoc/>
    public void OnPack(ReadingPack pack)
    {
        ArgumentNullException.ThrowIfNull(pack);
        Of(pack.Source).Take(pack.Readings, clock.GetTimestamp());
    }

    /// <summary>The newest reading of each channel of a source, by channel id.</summary>
    public async ValueTask<IReadOnlyDictionary<string, Reading>> NewestAsync(SourceKey source, CancellationToken cancellationToken)
    {
        SourceLive live = Of(source);
        if (live.IsDue(clock, LookUpEvery))
        {
            try
            {
                live.Take(await store.NewestAsync(source, cancellationToken).ConfigureAwait(false), clock.GetTimestamp());
            }
            catch (StoreUnavailableException)
            {
                // What is known stays shown with its age, which grows; health says that the store does not answer.
            }
        }

        return live.Snapshot();
    }

    private SourceLive Of(SourceKey source) => _sources.GetOrAdd(source, static _ => new SourceLive());
}
