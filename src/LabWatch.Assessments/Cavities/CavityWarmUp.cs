using LabWatch.Lab;
using LabWatch.Lab.Sources;
using Microsoft.Extensions.Hosting;
using Microsoft.Extensions.Logging;

namespace LabWatch.Assessments.Cavities;

/// <summary>
/// Makes the cavity models of all sources in the background, at the start and after each change of the configuration, so that neither the
/// planner nor a page has to wait for a trace. Nothing depends on it.
/// </summary>
internal sealed class CavityWarmUp(ICavityModels models, ILabSnapshotSource snapshots, TimeProvider clock, ILogger<CavityWarmUp> logger) : BackgroundService
{
    private static readonly TimeSpan LookEvery = TimeSpan.FromSeconds(10);

    /// <inheritdoc/>
    protected override async Task ExecuteAsync(CancellationToken stoppingToken)
    {
        LabSnapshot? warm = null;
        using PeriodicTimer timer = new(LookEvery, clock);
        try
        {
            do
            {
                LabSnapshot snapshot = snapshots.Current;
                if (!ReferenceEquals(snapshot, warm))
                {
                    await Task.Run(() => Warm(snapshot, stoppingToken), stoppingToken);
                    warm = snapshot;
                }
            }
            while (await timer.WaitForNextTickAsync(stoppingToken));
        }
        catch (OperationCanceledException) when (stoppingToken.IsCancellationRequested)
        {
            // Stopping: whoever needs a model makes it.
        }
    }

    private void Warm(LabSnapshot snapshot, CancellationToken cancellationToken)
    {
        foreach (ReferenceSource source in snapshot.Sources)
        {
            foreach (WorkingBand band in source.Bands)
            {
                cancellationToken.ThrowIfCancellationRequested();
                try
                {
                    models.ModelOf(source, band);
                }
                catch (Exception exception) when (exception is not OperationCanceledException)
                {
                    // The planner meets the same failure and reports it with its consequence; the other sources go on.
                    AssessmentsLog.WarmUpFailed(logger, exception, source.Key.ToString());
                }
            }
        }
    }
}
