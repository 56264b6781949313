using Quartz;

namespace LabWatch.Assessments.Planning;

/// <summary>Wakes the planner, and keeps it awake while there is more to do at once.</summary>
[DisallowConcurrentExecution]
internal sealed class PlannerJob(Planner planner) : IJob
{
    public async ValueTask Execute(IJobExecutionContext context, CancellationToken cancellationToken)
    {
        try
        {
            while (await planner.RunAsync(cancellationToken))
            {
            }
        }
        catch (OperationCanceledException) when (cancellationToken.IsCancellationRequested)
        {
            // Stopping: what was broken off stays due and is found by the next start.
        }
    }
}
