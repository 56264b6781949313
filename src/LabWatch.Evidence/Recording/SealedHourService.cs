using LabWatch.Readings;
using LabWatch.Records;
using Microsoft.Extensions.Hosting;
using Microsoft.Extensions.Logging;

namespace LabWatch.Evidence.Recording;

/// <summary>Looks every few seconds for hours that were sealed, and has them entered in the trail.</summary>
internal sealed class SealedHourService(SealedHourRecorder recorder, ILogger<SealedHourService> logger) : BackgroundService
{
    private static readonly TimeSpan Pause = TimeSpan.FromSeconds(5);

    protected override async Task ExecuteAsync(CancellationToken stoppingToken)
    {
        // Of real time: a demo that runs faster needs no more looks.
        using PeriodicTimer timer = new(Pause, TimeProvider.System);
        try
        {
            do
            {
                await TryAsync(stoppingToken);
            }
            while (await timer.WaitForNextTickAsync(stoppingToken));
        }
        catch (OperationCanceledException) when (stoppingToken.IsCancellationRequested)
        {
            // Stopping: what is not entered yet is entered after the next start.
        }
    }

    private async Task TryAsync(CancellationToken stoppingToken)
    {
        try
        {
            await recorder.RecordAsync(stoppingToken);
        }
        catch (Exception exception) when (exception is RecordsUnavailableException or StoreUnavailableException)
        {
            EvidenceLog.HoursNotEntered(logger, exception.Message);
        }
        catch (Exception exception) when (exception is not OperationCanceledException)
        {
            // The outermost loop: seals stay in the store, and the position tells where to go on at the next turn.
            EvidenceLog.HoursNotEntered(logger, exception.ToString());
        }
    }
}
