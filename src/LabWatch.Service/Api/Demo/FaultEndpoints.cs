using LabWatch.Lab;
using LabWatch.Lab.Findings;
using LabWatch.Service.Api.Access;
using LabWatch.Service.Api.Requests;
using LabWatch.Service.Api.Views;
using LabWatch.Simulator;
using LabWatch.Simulator.Faults;
using Microsoft.AspNetCore.Http.HttpResults;

namespace LabWatch.Service.Api.Demo;

/// <summary>Faults of the demo's simulated laboratory. Mapped in the demo only.</summary>
internal static class FaultEndpoints
{
    /// <summary>Maps the endpoints into the group of the API's version.</summary>
    public static void Map(RouteGroupBuilder api)
    {
        RouteGroupBuilder group = api.MapGroup("demo/faults").WithTags("Demo");
        group.MapGet(string.Empty, List)
            .Allow(Permission.Read)
            .WithName("ListFaults")
            .WithSummary("Demo only: kinds of fault, and the faults in force");
        group.MapPost(string.Empty, Inject)
            .Allow(Permission.InjectFaults)
            .WithName("InjectFault")
            .WithSummary("Demo only: inject a fault into the simulated laboratory")
            .ProducesProblem(StatusCodes.Status400BadRequest);
        group.MapDelete("{id}", Clear)
            .Allow(Permission.InjectFaults)
            .WithName("ClearFault")
            .WithSummary("Demo only: repair an injected fault")
            .ProducesProblem(StatusCodes.Status400BadRequest);
    }

    private static Ok<FaultListView> List(ILabSimulation simulation, ILabSnapshotSource lab) =>
        TypedResults.Ok(FaultViews.Of(simulation, lab.Current.Site.Id));

    private static Results<Ok<FaultListView>, ProblemHttpResult> Inject(FaultRequest request, ILabSimulation simulation, ILabSnapshotSource lab)
    {
        (FaultOrder? order, IReadOnlyList<Finding> findings) = FaultOrders.Read(request);
        return Answer(order is null ? findings : simulation.Inject(order), simulation, lab);
    }

    private static Results<Ok<FaultListView>, ProblemHttpResult> Clear(string id, ILabSimulation simulation, ILabSnapshotSource lab) =>
        Answer(simulation.Clear(id), simulation, lab);

    private static Results<Ok<FaultListView>, ProblemHttpResult> Answer(IReadOnlyList<Finding> findings, ILabSimulation simulation, ILabSnapshotSource lab) =>
        findings.Count == 0 ? TypedResults.Ok(FaultViews.Of(simulation, lab.Current.Site.Id)) : Refusals.BadRequest(findings);
}
