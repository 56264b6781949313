using LabWatch.Alerts.Desk;
using LabWatch.Alerts.Hazards;
using Microsoft.Extensions.Logging;

namespace LabWatch.Alerts.Hosting;

/// <summary>Lets time pass for the hazard watch, once a second, and keeps what a restart needs.</summary>
internal sealed class HazardTicker(HazardWatch watch, LastHeardFile heard, DeskQueue desk, ReadingsWatch readings, TimeProvider clock, ILogger<HazardTicker> logger)
{
    private const int TicksPerHeard = 10;
    private const int TicksPerCertificates = 60;
    private static readonly TimeSpan Interval = TimeSpan.FromSeconds(1);

    /// <summary>Ticks until the token is cancelled.</summary>
    public async Task RunAsync(CancellationToken stopping)
    {
        using PeriodicTimer timer = new(Interval, clock);
        for (long tick = 1; await timer.WaitForNextTickAsync(stopping); tick++)
        {
            Tick(tick);
        }
    }

    private void Tick(long tick)
    {
        try
        {
            watch.Tick();
            readings.Tick();
            desk.Post(new DeskWork.Tick());
            if (tick % TicksPerHeard == 0)
            {
                heard.Write(watch.LastHeard());
            }

            if (tick % TicksPerCertificates == 0)
            {
                watch.RefreshThermometers();
            }
        }
        catch (Exception exception)
        {
            // Silence must go on being judged whatever went wrong this time.
            Log.TickFailed(logger, exception);
        }
    }
}
