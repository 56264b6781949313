using LabWatch.Assessments.Clock;
using Microsoft.Extensions.Hosting;
using Microsoft.Extensions.Logging;
using Quartz;

namespace LabWatch.Assessments.Planning;

/// <summary>
/// Runs the scheduler that wakes the planner. The schedule is kept in memory, because nothing is owed to a wake-up that was missed. After a
/// step of the clock the trigger is set anew: without that a step back would silence it for as long as the step was.
/// </summary>
internal sealed class PlannerService(
    Planner planner,
    IEnumerable<ICriterion> criteria,
    AssessmentsOptions options,
    IClockStepSource clockSteps,
    TimeProvider clock,
    ILogger<PlannerService> logger) : IHostedService
{
    private static readonly TriggerKey Wake = new("wake", "assessments");
    private static readonly JobKey Job = new("planner", "assessments");
    private IScheduler? _scheduler;

    public async Task StartAsync(CancellationToken cancellationToken)
    {
        _scheduler = await QuartzSchedulerBuilder
            .Create(quartz => quartz
                .UseTimeProvider(clock)
                .UseInMemoryStore(_ => { })
                .UseDefaultThreadPool(1)
                .UseJobFactory(new PlannerJobFactory(planner)))
            .BuildScheduler(cancellationToken);
        await _scheduler.ScheduleJob(
            JobBuilder.Create<PlannerJob>().WithIdentity(Job).Build(), NewTrigger(), cancellationToken: cancellationToken);
        await _scheduler.Start(cancellationToken);
        clockSteps.Stepped += OnStepped;
        AssessmentsLog.Started(logger, criteria.Count(), options.WakeInterval.TotalSeconds);
    }

    public async Task StopAsync(CancellationToken cancellationToken)
    {
        clockSteps.Stepped -= OnStepped;
        if (_scheduler is { } scheduler)
        {
            await scheduler.Interrupt(Job, cancellationToken);
            await scheduler.Shutdown(true, cancellationToken);
        }
    }

    private ITrigger NewTrigger() =>
        TriggerBuilder.Create(clock)
            .WithIdentity(Wake)
            .ForJob(Job)
            .StartAt(clock.GetUtcNow())
            .WithSchedule(SimpleScheduleBuilder.Create()
                .WithInterval(options.WakeInterval)
                .RepeatForever()
                .WithMisfireInstruction(SimpleTriggerMisfireInstruction.NextWithRemainingCount))
            .Build();

    private void OnStepped(object? sender, ClockStep step) => _ = RescheduleAsync();

    private async Task RescheduleAsync()
    {
        try
        {
            if (_scheduler is { } scheduler)
            {
                await scheduler.RescheduleJob(Wake, NewTrigger());
            }
        }
        catch (SchedulerException exception)
        {
            // Outermost: the scheduler is shutting down; nobody awaits this.
            AssessmentsLog.Failed(logger, exception);
        }
    }
}
