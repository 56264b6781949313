using Microsoft.Extensions.Hosting;
using Microsoft.Extensions.Logging;

namespace LabWatch.Readings;

/// <summary>Seals hours in the background: every few seconds what is due, at once where memory or journal are at their limit.</summary>
internal sealed class SealingService(IReadingSealer sealer, IReadingStoreHealth store, TimeProvider clock, ILogger<SealingService> log) : BackgroundService
{
    private static readonly TimeSpan Look = TimeSpan.FromMilliseconds(250);
    private static readonly TimeSpan Turn = TimeSpan.FromSeconds(5);

    protected override async Task ExecuteAsync(CancellationToken stoppingToken)
    {
        await Task.Yield();
        long last = clock.GetTimestamp();
        await TryAsync(() => store.OpenAsync(stoppingToken).AsTask(), stoppingToken);
        using PeriodicTimer timer = new(Look, clock);
        while (await TickAsync(timer, stoppingToken))
        {
            if (sealer.NeedsSealing || clock.GetElapsedTime(last) >= Turn)
            {
                last = clock.GetTimestamp();
                await TryAsync(() => sealer.SealDueAsync(stoppingToken), stoppingToken);
            }
        }
    }

    private static async Task<bool> TickAsync(PeriodicTimer timer, CancellationToken stoppingToken)
    {
        try
        {
            return await timer.WaitForNextTickAsync(stoppingToken);
        }
        catch (OperationCanceledException) when (stoppingToken.IsCancellationRequested)
        {
            return false;
        }
    }

    private async Task TryAsync(Func<Task> action, CancellationToken stoppingToken)
    {
        try
        {
            await action();
        }
        catch (OperationCanceledException) when (stoppingToken.IsCancellationRequested)
        {
            // Stopping: what is not sealed stays in the journal.
        }
        catch (Exception error)
        {
            // The outermost loop: whatever failed, the readings are in the journal and the next turn tries again.
            ReadingsLog.SealingFailed(log, error);
        }
    }
}
