using LabWatch.Lab;
using LabWatch.Lab.Findings;
using LabWatch.Lab.Runs;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;
using LabWatch.Records.Runs;
using LabWatch.Service.Api.Access;
using LabWatch.Service.Api.Live;
using LabWatch.Service.Api.Requests;
using LabWatch.Service.Api.Views;
using Microsoft.AspNetCore.Http.HttpResults;

namespace LabWatch.Service.Api.Runs;

/// <summary>Calibration runs: started, ended, corrected, cancelled.</summary>
internal static class RunEndpoints
{
    private const int RowsByDefault = 50;
    private const int MaximumRows = 500;

    /// <summary>Maps the endpoints into the group of the API's version.</summary>
    public static void Map(RouteGroupBuilder api)
    {
        RouteGroupBuilder group = api.MapGroup("runs").WithTags("Runs");
        group.MapGet(string.Empty, ListAsync)
            .Allow(Permission.Read)
            .WithName("ListRuns")
            .WithSummary("Calibration runs, latest start first")
            .ProducesProblem(StatusCodes.Status400BadRequest);
        group.MapGet("{id:guid}", FindAsync)
            .Allow(Permission.Read)
            .WithName("GetRun")
            .WithSummary("One calibration run with everything that was recorded of it")
            .ProducesProblem(StatusCodes.Status404NotFound);
        group.MapPost(string.Empty, StartAsync)
            .Allow(Permission.RecordRuns)
            .WithName("StartRun")
            .WithSummary("Record that a calibration begins to use a source")
            .WithDescription(
                "A source that is not ready needs `overrideReason`. Where a hazard stands against the source nobody can start; where the certificate of the "
                + "reference thermometer is missing, overdue or out of range a technician cannot. One run is open on a source at a time. "
                + "Sending the same request again under the same `id` or `Idempotency-Key` adds nothing and gives the same run (200 instead of 201).")
            .Produces<RunView>()
            .ProducesProblem(StatusCodes.Status400BadRequest)
            .ProducesProblem(StatusCodes.Status403Forbidden)
            .ProducesProblem(StatusCodes.Status409Conflict);
        group.MapPost("{id:guid}/end", EndAsync)
            .Allow(Permission.RecordRuns)
            .WithName("EndRun")
            .WithSummary("Record that a calibration has ended")
            .WithDescription("Ending it again as the same person changes nothing.")
            .ProducesProblem(StatusCodes.Status400BadRequest)
            .ProducesProblem(StatusCodes.Status404NotFound)
            .ProducesProblem(StatusCodes.Status409Conflict);
        group.MapPost("{id:guid}/correct", CorrectAsync)
            .Allow(Permission.RecordRuns)
            .WithName("CorrectRun")
            .WithSummary("Correct or cancel what was recorded of a calibration")
            .WithDescription("What was recorded before stays readable in `steps`. A run that was cancelled stays so.")
            .ProducesProblem(StatusCodes.Status400BadRequest)
            .ProducesProblem(StatusCodes.Status404NotFound)
            .ProducesProblem(StatusCodes.Status409Conflict);
    }

    private static async Task<Results<Ok<RunListView>, ProblemHttpResult>> ListAsync(
        [AsParameters] RunFilter filter, HttpRequest http, IRunLedger ledger, CancellationToken cancellationToken)
    {
        QueryReader query = new(http.Query);
        query.Allow("source", "open", "after", "count");
        RunQuery asked = new(query.Source("source"), query.Flag("open"), query.Cursor("after"), query.Count("count", RowsByDefault, MaximumRows));
        if (query.Findings.Count > 0)
        {
            return Refusals.BadRequest(query.Findings);
        }

        RunPage page = await ledger.ListAsync(asked, cancellationToken);
        return TypedResults.Ok(new RunListView([.. page.Items.Select(RunViews.Of)], page.Next));
    }

    private static async Task<Results<Ok<RunView>, ProblemHttpResult>> FindAsync(Guid id, IRunLedger ledger, CancellationToken cancellationToken) =>
        await ledger.FindAsync(id, cancellationToken) is { } run ? TypedResults.Ok(RunViews.Of(run)) : Missing(id);

    private static async Task<Results<Created<RunView>, Ok<RunView>, ProblemHttpResult>> StartAsync(
        StartRunRequest request, HttpContext http, RunDesk desk, ILabSnapshotSource labs, TimeProvider clock, CancellationToken cancellationToken)
    {
        Caller caller = Caller.Of(http);
        BodyChecks checks = new();
        LabSnapshot lab = labs.Current;
        string? key = RunChecks.Key(http.Request, checks);
        CalibrationRun? run = RunChecks.Start(request, lab, caller.Name, Instant.Now(clock), checks);
        if (run is null)
        {
            return Refusals.BadRequest(checks.Findings);
        }

        ReferenceSource source = lab.FindSource(run.Source)!;
        (RunOutcome? outcome, IReadOnlyList<Finding> refusal, bool isForbidden) = await desk.StartAsync(lab, source, run, key, caller, cancellationToken);
        if (outcome is null)
        {
            return Refusals.Refuse(isForbidden ? StatusCodes.Status403Forbidden : StatusCodes.Status409Conflict, "The run cannot start.", refusal);
        }

        return outcome switch
        {
            { Problem: RunProblem.SourceInUse, Run.Run: { } other } => Refusals.Conflict(
                "source-in-use", $"Job {other.JobNumber} of {other.StartedBy} has used this source since {other.StartedAt}.", other.Id.ToString(), "End that run first, or cancel it where it was a mistake."),
            { Problem: RunProblem.KeyReused } => Refusals.Conflict(
                "key-reused", "This id or key stands for another request.", key ?? run.Id.ToString(), "Draw a new one for each run."),
            { IsNew: true, Run: { } started } => TypedResults.Created($"/api/v1/runs/{started.Run.Id}", RunViews.Of(started)),
            { Run: { } known } => TypedResults.Ok(RunViews.Of(known)),
            _ => Refusals.Failed(),
        };
    }

    private static async Task<Results<Ok<RunView>, ProblemHttpResult>> EndAsync(
        Guid id, EndRunRequest? request, HttpContext http, RunDesk desk, TimeProvider clock, CancellationToken cancellationToken)
    {
        BodyChecks checks = new();
        string? note = RunChecks.EndNote(request, checks);
        return checks.Findings.Count > 0
            ? Refusals.BadRequest(checks.Findings)
            : Answer(id, await desk.EndAsync(id, Instant.Now(clock), Caller.Of(http).Name, note, cancellationToken));
    }

    private static async Task<Results<Ok<RunView>, ProblemHttpResult>> CorrectAsync(
        Guid id, CorrectRunRequest request, HttpContext http, RunDesk desk, IRunLedger ledger, ILabSnapshotSource labs, TimeProvider clock, CancellationToken cancellationToken)
    {
        if (await ledger.FindAsync(id, cancellationToken) is not { } recorded)
        {
            return Missing(id);
        }

        BodyChecks checks = new();
        RunCorrection? correction = RunChecks.Correct(request, recorded.Run, labs.Current, checks);
        return correction is null
            ? Refusals.BadRequest(checks.Findings)
            : Answer(id, await desk.CorrectAsync(id, Instant.Now(clock), Caller.Of(http).Name, correction, cancellationToken));
    }

    private static Results<Ok<RunView>, ProblemHttpResult> Answer(Guid id, RunOutcome outcome) => outcome switch
    {
        { Problem: RunProblem.None, Run: { } run } => TypedResults.Ok(RunViews.Of(run)),
        { Problem: RunProblem.EndedAlready, Run.Run: { } run } => Refusals.Conflict(
            "ended-already", $"{run.EndedBy} ended this run at {run.EndedAt}.", id.ToString(), "Nothing is left to do; correct it where something is wrong."),
        { Problem: RunProblem.Cancelled } => Refusals.Conflict("run-cancelled", "This run was cancelled.", id.ToString(), "Record a new run."),
        _ => Missing(id),
    };

    private static ProblemHttpResult Missing(Guid id) => Refusals.NotFound("run", id.ToString(), "GET /api/v1/runs lists the runs.");
}
