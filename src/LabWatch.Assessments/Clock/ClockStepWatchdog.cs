using Microsoft.Extensions.Hosting;
using Microsoft.Extensions.Logging;

namespace LabWatch.Assessments.Clock;

/// <summary>Looks at both clocks every ten monotonic seconds, which no step of the wall clock can hold up.</summary>
internal sealed class ClockStepWatchdog(TimeProvider clock, ILogger<ClockStepWatchdog> logger) : BackgroundService, IClockStepSource
{
    private static readonly TimeSpan Interval = TimeSpan.FromSeconds(10);

    public event EventHandler<ClockStep>? Stepped;

    protected override async Task ExecuteAsync(CancellationToken stoppingToken)
    {
        ClockComparison comparison = new(clock);
        using PeriodicTimer timer = new(Interval, clock);
        while (await timer.WaitForNextTickAsync(stoppingToken))
        {
            if (comparison.Look() is { } step)
            {
                AssessmentsLog.ClockStepped(logger, step.Step.TotalSeconds);
                Stepped?.Invoke(this, step);
            }
        }
    }
}
