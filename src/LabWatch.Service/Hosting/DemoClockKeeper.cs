namespace LabWatch.Service.Hosting;

/// <summary>Keeps the demo's time every second of real time, and at the end.</summary>
internal sealed class DemoClockKeeper(DataDirectory data, TimeProvider clock) : BackgroundService
{
    private static readonly TimeSpan Pause = TimeSpan.FromSeconds(1);

    protected override async Task ExecuteAsync(CancellationToken stoppingToken)
    {
        while (!stoppingToken.IsCancellationRequested)
        {
            DemoClock.Keep(data.Path, clock);
            await Task.Delay(Pause, TimeProvider.System, stoppingToken).ConfigureAwait(ConfigureAwaitOptions.SuppressThrowing);
        }

        DemoClock.Keep(data.Path, clock);
    }
}
