using LabWatch.Intake.Diagnostics;
using LabWatch.Intake.Spool;
using LabWatch.Lab.Readings;
using LabWatch.Readings;
using LabWatch.Readings.Quarantine;

namespace LabWatch.Intake.Pipeline;

/// <summary>
/// The one lane to store and quarantine: one append at a time, as the store demands. An append that does not answer keeps the lane until
/// it ends, and everything goes to the spool meanwhile.
/// </summary>
internal sealed class StoreLane(IReadingStore store, IQuarantine quarantine, string root, IntakeCounters counters) : IDisposable
{
    private readonly SemaphoreSlim _lane = new(1, 1);

    /// <summary>Takes the lane if it is free.</summary>
    public bool TryEnter() => _lane.Wait(0, CancellationToken.None);

    /// <summary>Takes the lane once it is free.</summary>
    public Task EnterAsync(CancellationToken cancellationToken) => _lane.WaitAsync(cancellationToken);

    /// <summary>Gives the lane back.</summary>
    public void Leave() => _lane.Release();

    /// <summary>
    /// Makes entries durable on another thread, since an engine may block, and gives the lane back when that has ended, however late.
    /// </summary>
    public Task AppendAndLeaveAsync(IReadOnlyList<SpoolEntry> entries, CancellationToken cancellationToken) =>
        Task.Run(
            async () =>
            {
                try
                {
                    await AppendAsync(entries, cancellationToken);
                }
                finally
                {
                    Leave();
                }
            },
            CancellationToken.None);

    /// <summary>Makes entries durable: readings in the store, refusals and conflicts in quarantine. The caller holds the lane.</summary>
    public async Task AppendAsync(IReadOnlyList<SpoolEntry> entries, CancellationToken cancellationToken)
    {
        var packs = new List<ReadingPack>(entries.Count);
        List<QuarantinedMessage>? refused = null;
        foreach (SpoolEntry entry in entries)
        {
            if (entry.Pack is { } pack)
            {
                packs.Add(pack);
            }

            if (entry.Refused is { } message)
            {
                (refused ??= []).Add(message);
            }
        }

        if (packs.Count > 0)
        {
            AppendResult result = await store.AppendAsync(packs, cancellationToken);
            counters.Committed(result.Accepted, result.Duplicates, result.Conflicts.Count);
            if (result.Conflicts.Count > 0)
            {
                (refused ??= []).AddRange(result.Conflicts.Select(conflict => ConflictReport.Of(conflict, root)));
            }
        }

        if (refused is not null)
        {
            await quarantine.AddAsync(refused, cancellationToken);
            counters.Quarantined(refused.Count);
        }
    }

    /// <summary>Puts a pack that the store refuses by itself into quarantine, so that it does not hold up the ones behind it.</summary>
    public async Task SetAsideAsync(ReadingPack pack, Exception reason, CancellationToken cancellationToken)
    {
        await quarantine.AddAsync([ConflictReport.Of(pack, reason, root)], cancellationToken);
        counters.Quarantined(1);
    }

    /// <inheritdoc/>
    public void Dispose() => _lane.Dispose();
}
