using Quartz;
using Quartz.Extensibility;

namespace LabWatch.Assessments.Planning;

/// <summary>Hands the one job to the scheduler.</summary>
internal sealed class PlannerJobFactory(Planner planner) : IJobFactory
{
    public ValueTask<JobScope> CreateJob(TriggerFiredBundle bundle, IScheduler scheduler, CancellationToken cancellationToken) =>
        new(new JobScope(new PlannerJob(planner), state: null));

    public ValueTask ReturnJob(JobScope scope, CancellationToken cancellationToken) => ValueTask.CompletedTask;
}
