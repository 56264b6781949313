using System.Globalization;
using LabWatch.Assessments.Planning;
using LabWatch.Lab.Time;

namespace LabWatch.Service.Api.Health;

/// <summary>Looks whether the planner runs.</summary>
internal sealed class PlannerCheck(IPlannerState planner, TimeProvider clock) : IDependencyCheck
{
    // The planner wakes far more often; a run over a long backlog takes a while.
    private static readonly TimeSpan LongestRun = TimeSpan.FromMinutes(15);

    /// <inheritdoc/>
    public string Part => "planner";

    /// <inheritdoc/>
    public ValueTask<DependencyAnswer> AskAsync(CancellationToken cancellationToken)
    {
        PlannerStatus status = planner.Current;
        if (status.LastError is { } error)
        {
            return new(new DependencyAnswer(false, "The last run failed: " + error));
        }

        if (status.LastRun is not { } last)
        {
            return new(new DependencyAnswer(true, "It has not run yet."));
        }

        TimeSpan age = Instant.Now(clock) - (status.LastSuccess ?? last);
        return new(new DependencyAnswer(
            age < LongestRun,
            string.Create(CultureInfo.InvariantCulture, $"Last good run {age.TotalSeconds:F0} s ago; {status.WindowsDue} windows due, {status.Recorded} assessments since the start.")));
    }
}
