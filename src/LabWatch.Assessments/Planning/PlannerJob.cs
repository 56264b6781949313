using Quartz;

namespace LabWatch.Assessments.Planning;

/// <summary>Wakes the planner, and keeps it awake while there is more to do at once.</summary>
[DisallowConcurrentExecution]
internal sealed class PlannerJob(Planner planner) : IJob
{
    public async ValueTask Execute(IJobExecutionContext context, CancellationToken cancellationToken)
    {
        while (!cancellationToken.IsCancellationRequested && await planner.RunAsync(cancellationToken))
        {
        }
    }
}
