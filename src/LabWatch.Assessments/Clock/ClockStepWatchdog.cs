using Microsoft.Extensions.Hosting;
using Microsoft.Extensions.Logging;

namespace LabWatch.Assessments.Clock;

/// <summary>
/// Looks at both clocks every ten monotonic seconds, which no step of the wall clock can hold up. Compares from the moment it is made.
/// </summary>
internal sealed class ClockStepWatchdog : BackgroundService, IClockStepSource
{
    private static readonly TimeSpan Interval = TimeSpan.FromSeconds(10);

    private readonly ClockComparison _comparison;
    private readonly PeriodicTimer _timer;
    private readonly ILogger<ClockStepWatchdog> _logger;

    public ClockStepWatchdog(TimeProvider clock, ILogger<ClockStepWatchdog> logger)
    {
        _comparison = new ClockComparison(clock);
        _timer = new PeriodicTimer(Interval, clock);
        _logger = logger;
    }

    public event EventHandler<ClockStep>? Stepped;

    public override void Dispose()
    {
        _timer.Dispose();
        base.Dispose();
    }

    protected override async Task ExecuteAsync(CancellationToken stoppingToken)
    {
        while (await _timer.WaitForNextTickAsync(stoppingToken))
        {
            if (_comparison.Look() is { } step)
            {
                AssessmentsLog.ClockStepped(_logger, step.Step.TotalSeconds);
                Stepped?.Invoke(this, step);
            }
        }
    }
}
