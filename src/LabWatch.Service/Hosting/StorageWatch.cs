using LabWatch.Alerts;
using LabWatch.Intake.Diagnostics;
using LabWatch.Readings;

namespace LabWatch.Service.Hosting;

/// <summary>Looks once a second whether readings can be stored, and tells people where they cannot.</summary>
internal sealed class StorageWatch(
    IReadingStoreHealth store, IIntakeState intake, IServiceAlerts alerts, DataDirectory data, ILogger<StorageWatch> logger) : BackgroundService
{
    private static readonly TimeSpan Interval = TimeSpan.FromSeconds(1);

    protected override async Task ExecuteAsync(CancellationToken stoppingToken)
    {
        // Of real time: a disk does not fill faster because a demo runs faster.
        StorageJudge judge = new(alerts, data.Path, TimeProvider.System);
        using PeriodicTimer timer = new(Interval, TimeProvider.System);
        try
        {
            while (await timer.WaitForNextTickAsync(stoppingToken))
            {
                Look(judge);
            }
        }
        catch (OperationCanceledException) when (stoppingToken.IsCancellationRequested)
        {
            // A clean stop.
        }
    }

    private void Look(StorageJudge judge)
    {
        try
        {
            (long? free, long? size) = Room();
            judge.Judge(new StorageState(store.Trouble, intake.CommitsStopped, intake.SpoolLength, free, size, store.Findings.Count));
        }
        catch (Exception exception)
        {
            // The outermost loop: the next look is in a second.
            HostLog.StorageWatchFailed(logger, exception);
        }
    }

    private (long? Free, long? Size) Room()
    {
        try
        {
            DriveInfo drive = new(data.Path);
            return (drive.AvailableFreeSpace, drive.TotalSize);
        }
        catch (Exception exception) when (exception is IOException or UnauthorizedAccessException or ArgumentException)
        {
            return (null, null);
        }
    }
}
