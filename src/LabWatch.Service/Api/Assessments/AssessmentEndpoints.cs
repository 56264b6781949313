using LabWatch.Lab.Assessments;
using LabWatch.Records.Assessments;
using LabWatch.Service.Api.Access;
using LabWatch.Service.Api.Live;
using LabWatch.Service.Api.Requests;
using LabWatch.Service.Api.Views;
using Microsoft.AspNetCore.Http.HttpResults;

namespace LabWatch.Service.Api.Assessments;

/// <summary>The assessments made.</summary>
internal static class AssessmentEndpoints
{
    private const int RowsByDefault = 50;
    private const int MaximumRows = 500;
    private const int MaximumOutcomes = 2000;

    /// <summary>Maps the endpoints into the group of the API's version.</summary>
    public static void Map(RouteGroupBuilder api)
    {
        RouteGroupBuilder group = api.MapGroup("assessments").WithTags("Assessments").Allow(Permission.Read);
        group.MapGet(string.Empty, ListAsync)
            .WithName("ListAssessments")
            .WithSummary("Assessments, newest window first, highest revisions only")
            .ProducesProblem(StatusCodes.Status400BadRequest);
        group.MapGet("outcomes", OutcomesAsync)
            .WithName("ListOutcomes")
            .WithSummary("The same list without figures, words and provenance, for charts and tables of many")
            .WithDescription("Filters and pages as for the list of assessments, up to 2000 rows a page. The id leads to the whole assessment.")
            .ProducesProblem(StatusCodes.Status400BadRequest);
        group.MapGet("{id}", FindAsync)
            .WithName("GetAssessment")
            .WithSummary("One assessment, any revision, with its provenance")
            .ProducesProblem(StatusCodes.Status404NotFound);
        group.MapGet("{id}/revisions", RevisionsAsync)
            .WithName("ListAssessmentRevisions")
            .WithSummary("Every revision of the assessment of the same source, criterion, scope and window, first revision first")
            .WithDescription("The id may be that of any of the revisions.")
            .ProducesProblem(StatusCodes.Status404NotFound);
    }

    private static async Task<Results<Ok<AssessmentListView>, ProblemHttpResult>> ListAsync(
        [AsParameters] AssessmentFilter filter, HttpRequest http, IAssessmentLedger ledger, CancellationToken cancellationToken)
    {
        QueryReader query = new(http.Query);
        AssessmentQuery asked = Read(query, MaximumRows);
        if (query.Findings.Count > 0)
        {
            return Refusals.BadRequest(query.Findings);
        }

        AssessmentPage page = await ledger.ListAsync(asked, cancellationToken);
        return TypedResults.Ok(new AssessmentListView([.. page.Items.Select(AssessmentViews.Of)], page.Next));
    }

    private static async Task<Results<Ok<OutcomeListView>, ProblemHttpResult>> OutcomesAsync(
        [AsParameters] AssessmentFilter filter, HttpRequest http, IAssessmentLedger ledger, CancellationToken cancellationToken)
    {
        QueryReader query = new(http.Query);
        AssessmentQuery asked = Read(query, MaximumOutcomes);
        if (query.Findings.Count > 0)
        {
            return Refusals.BadRequest(query.Findings);
        }

        AssessmentPage page = await ledger.ListAsync(asked, cancellationToken);
        return TypedResults.Ok(new OutcomeListView([.. page.Items.Select(AssessmentViews.OutcomeOf)], page.Next));
    }

    private static AssessmentQuery Read(QueryReader query, int most)
    {
        query.Allow("source", "criterion", "from", "to", "after", "count");
        return new(
            query.Source("source"),
            query.Criterion("criterion"),
            query.Window("from", "to"),
            query.Cursor("after"),
            query.Count("count", RowsByDefault, most));
    }

    private static async Task<Results<Ok<AssessmentView>, ProblemHttpResult>> FindAsync(
        string id, IAssessmentLedger ledger, CancellationToken cancellationToken) =>
        await ledger.FindAsync(id, cancellationToken) is { } assessment
            ? TypedResults.Ok(AssessmentViews.Of(assessment))
            : Missing(id);

    /// <summary>Revisions have ids that follow from their number, and are counted from 1 without a gap.</summary>
    private static async Task<Results<Ok<IReadOnlyList<AssessmentView>>, ProblemHttpResult>> RevisionsAsync(
        string id, IAssessmentLedger ledger, CancellationToken cancellationToken)
    {
        if (await ledger.FindAsync(id, cancellationToken) is not { } asked)
        {
            return Missing(id);
        }

        List<AssessmentView> revisions = [];
        while (await ledger.FindAsync(IdOf(asked, revisions.Count + 1), cancellationToken) is { } revision)
        {
            revisions.Add(AssessmentViews.Of(revision));
        }

        return TypedResults.Ok<IReadOnlyList<AssessmentView>>(revisions);
    }

    private static string IdOf(Assessment assessment, int revision) =>
        Assessment.IdOf(assessment.Source, assessment.Criterion, assessment.Scope, assessment.Window, revision);

    private static ProblemHttpResult Missing(string id) =>
        Refusals.NotFound("assessment", id, "GET /api/v1/assessments lists the assessments.");
}
