using Microsoft.Extensions.Hosting;
using Microsoft.Extensions.Logging;

namespace LabWatch.Readings;

/// <summary>Compares all sealed parts with their digests again and again, slowly enough to disturb nothing (about 2 MB a second).</summary>
internal sealed class IntegrityService(IReadingStore store, ReadingsOptions options, ILogger<IntegrityService> log) : BackgroundService
{
    private const int PartsAtOnce = 64;
    private static readonly TimeSpan FirstAfter = TimeSpan.FromMinutes(10);
    private static readonly TimeSpan Pause = TimeSpan.FromSeconds(1);

    protected override async Task ExecuteAsync(CancellationToken stoppingToken)
    {
        if (store is not IReadingIntegrity integrity)
        {
            return;
        }

        // Of real time: disks age no faster in a demo.
        try
        {
            await Task.Delay(FirstAfter, TimeProvider.System, stoppingToken);
            while (true)
            {
                await TryAsync(integrity, stoppingToken);
                await Task.Delay(options.IntegrityCheckEvery, TimeProvider.System, stoppingToken);
            }
        }
        catch (OperationCanceledException) when (stoppingToken.IsCancellationRequested)
        {
            // The next start begins anew.
        }
    }

    private async Task TryAsync(IReadingIntegrity integrity, CancellationToken stoppingToken)
    {
        try
        {
            (long parts, long wrong, IntegrityBatch batch) = (0, 0, default);
            while ((batch = await integrity.CheckSealedAsync(batch.Last, PartsAtOnce, stoppingToken)).Parts > 0)
            {
                (parts, wrong) = (parts + batch.Parts, wrong + batch.Wrong);
                await Task.Delay(Pause, TimeProvider.System, stoppingToken);
            }

            ReadingsLog.IntegrityChecked(log, parts, wrong);
        }
        catch (Exception exception) when (!stoppingToken.IsCancellationRequested)
        {
            // The outermost loop: the next turn begins anew.
            ReadingsLog.IntegrityFailed(log, exception.Message);
        }
    }
}
