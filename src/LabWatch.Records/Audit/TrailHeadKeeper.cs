using Microsoft.Extensions.Hosting;

namespace LabWatch.Records.Audit;

/// <summary>Writes the ends of the chains beside the database: at most once a second, and when the service stops.</summary>
internal sealed class TrailHeadKeeper(TrailHeads heads) : BackgroundService
{
    private static readonly TimeSpan Pause = TimeSpan.FromSeconds(1);

    public override async Task StopAsync(CancellationToken cancellationToken)
    {
        await base.StopAsync(cancellationToken);
        heads.Write();
    }

    protected override async Task ExecuteAsync(CancellationToken stoppingToken)
    {
        // Of real time: a demo that runs faster needs no more writes.
        using PeriodicTimer timer = new(Pause, TimeProvider.System);
        try
        {
            while (await timer.WaitForNextTickAsync(stoppingToken))
            {
                heads.Write();
            }
        }
        catch (OperationCanceledException) when (stoppingToken.IsCancellationRequested)
        {
            // Stopping: the last end is written when the loop is over.
        }
    }
}
