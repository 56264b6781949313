using LabWatch.Assessments.Planning;

namespace LabWatch.Tests.Api.Fakes;

/// <summary>A planner as a test says.</summary>
internal sealed class FakePlanner : IPlannerState
{
    public PlannerStatus Current { get; set; } = PlannerStatus.None;
}
