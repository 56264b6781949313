namespace LabWatch.Assessments.Planning;

/// <summary>Shows the planner's progress.</summary>
public interface IPlannerState
{
    /// <summary>The present status. Reading it costs nothing.</summary>
    PlannerStatus Current { get; }
}
