using LabWatch.Lab.Findings;
using LabWatch.Service.Api.Ports;
using LabWatch.Service.Api.Requests;
using LabWatch.Service.Api.Views;
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
            .WithName("ListFaults")
            .WithSummary("Demo only: kinds of fault, and the faults in force");
        group.MapPost(string.Empty, Inject)
            .WithName("InjectFault")
            .WithSummary("Demo only: inject a fault into the simulated laboratory")
            .ProducesProblem(StatusCodes.Status400BadRequest);
        group.MapDelete("{id}", Clear)
            .WithName("ClearFault")
            .WithSummary("Demo only: repair an injected fault")
            .ProducesProblem(StatusCodes.Status400BadRequest);
    }

    private static Ok<FaultListView> List(IDemoPort demo) => TypedResults.Ok(demo.Faults());

    private static Results<Ok<FaultListView>, ProblemHttpResult> Inject(FaultRequest request, IDemoPort demo) => Answer(demo.Inject(request), demo);

    private static Results<Ok<FaultListView>, ProblemHttpResult> Clear(string id, IDemoPort demo) => Answer(demo.Clear(id), demo);

    private static Results<Ok<FaultListView>, ProblemHttpResult> Answer(IReadOnlyList<Finding> findings, IDemoPort demo) =>
        findings.Count == 0 ? TypedResults.Ok(demo.Faults()) : Refusals.BadRequest(findings);
}
