using LabWatch.Alerts.Hazards;
using LabWatch.Lab.Time;
using LabWatch.Records.Runs;
using Microsoft.Extensions.Logging;

namespace LabWatch.Alerts.Attention;

/// <summary>
/// Tells the hazard watch which sources a calibration run uses: they are looked after. Asked for every few seconds and never waited for by a
/// hazard; where the records do not answer, what was known ages as if the run had ended.
/// </summary>
internal sealed class RunAttention(IEnumerable<IRunLedger> runs, HazardWatch watch, TimeProvider clock, ILogger<RunAttention> logger)
{
    private static readonly TimeSpan Interval = TimeSpan.FromSeconds(15);
    private readonly IRunLedger? _runs = runs.FirstOrDefault();
    private bool _failing;

    /// <summary>Asks until the token is cancelled.</summary>
    public async Task RunAsync(CancellationToken stopping)
    {
        if (_runs is null)
        {
            return;
        }

        using PeriodicTimer timer = new(Interval, clock);
        do
        {
            await AskAsync(stopping);
        }
        while (await timer.WaitForNextTickAsync(stopping));
    }

    private async Task AskAsync(CancellationToken stopping)
    {
        try
        {
            foreach (RecordedRun open in await _runs!.OpenAsync(stopping))
            {
                watch.Attend(open.Run.Source, Instant.Now(clock));
            }

            _failing = false;
        }
        catch (Exception exception) when (!stopping.IsCancellationRequested)
        {
            // The records do not answer: hazards go on without them, and it is said once.
            if (!_failing)
            {
                Log.RunsUnknown(logger, exception);
            }

            _failing = true;
        }
    }
}
