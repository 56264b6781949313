using LabWatch.Lab.Identity;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;
using LabWatch.Service.Api.Access;
using LabWatch.Service.Api.Live;
using LabWatch.Service.Api.Requests;
using LabWatch.Service.Api.Views;
using Microsoft.AspNetCore.Http.HttpResults;

namespace LabWatch.Service.Api.Sources;

/// <summary>What sources there are, and what is known about them now.</summary>
internal static class SourceEndpoints
{
    /// <summary>Maps the endpoints into the group of the API's version.</summary>
    public static void Map(RouteGroupBuilder api)
    {
        RouteGroupBuilder group = api.MapGroup("sources").WithTags("Sources").Allow(Permission.Read);
        group.MapGet(string.Empty, ListAsync)
            .WithName("ListSources")
            .WithSummary("All sources with readiness, newest readings, open alerts");
        group.MapGet("{id}", FindAsync)
            .WithName("GetSource")
            .WithSummary("One source with its instruments, limits and newest assessments")
            .WithDescription("The id is site.source, for example hollin-vale.fir.")
            .ProducesProblem(StatusCodes.Status404NotFound);
        group.MapGet("{id}/profile", ProfileEndpoint.ReadAsync)
            .WithName("GetProfile")
            .WithSummary("Axial temperature profile of a source with its radiance in each band")
            .WithDescription(
                "From the newest reading of each channel, or those at an instant: wells, lip, case, the curve along the wall; effective emissivity, radiance temperature and its "
                + "offset from the reference temperature in each band, with the comparator. The same computation as the criteria axial-uniformity and effective-emissivity.")
            .ProducesProblem(StatusCodes.Status400BadRequest)
            .ProducesProblem(StatusCodes.Status404NotFound)
            .ProducesProblem(StatusCodes.Status503ServiceUnavailable);
        group.MapGet("{id}/balance", BalanceEndpoint.LearnAsync)
            .WithName("LearnBalance")
            .WithSummary("A baseline of heater power, or of a redundant thermometer, learnt from readings of a span")
            .WithDescription(
                "The regression that the criteria heater-balance and reference-agreement compare with, in the form of the lab file's member balances: look at it, then put it on record there. "
                + "channel is the heater power or a well thermometer that is not the reference; from and until enclose 1 to 31 days in which the source was in order.")
            .ProducesProblem(StatusCodes.Status400BadRequest)
            .ProducesProblem(StatusCodes.Status404NotFound)
            .ProducesProblem(StatusCodes.Status503ServiceUnavailable);
        group.MapGet("{id}/readings", ReadingEndpoints.ReadAsync)
            .WithName("GetReadings")
            .WithSummary("Readings of one channel of a source, raw or reduced to buckets")
            .WithDescription(
                "Raw values in the channel's own unit and, for thermometers, t90 in degree Celsius through the certificate in force at each reading's time. "
                + "CSV with format=csv or Accept: text/csv.")
            .Produces<ReadingsView>(StatusCodes.Status200OK, "application/json", "text/csv")
            .ProducesProblem(StatusCodes.Status400BadRequest)
            .ProducesProblem(StatusCodes.Status404NotFound)
            .ProducesProblem(StatusCodes.Status503ServiceUnavailable);
    }

    /// <summary>The source of an id as the path gives it; null where there is none.</summary>
    public static ReferenceSource? Find(SiteBoard board, string id) =>
        SourceKey.TryParse(id, out SourceKey key) ? board.Lab.FindSource(key) : null;

    /// <summary>The answer where there is no source of an id.</summary>
    public static ProblemHttpResult Missing(string id) => Refusals.NotFound("source", id, "GET /api/v1/sources lists the sources; an id is site.source.");

    private static async Task<Ok<SourceListView>> ListAsync(SiteBoard board, CancellationToken cancellationToken) =>
        TypedResults.Ok(new SourceListView(board.Site(), await board.SourcesAsync(cancellationToken)));

    private static async Task<Results<Ok<SourceDetailView>, ProblemHttpResult>> FindAsync(
        string id, SiteBoard board, TimeProvider clock, CancellationToken cancellationToken)
    {
        if (Find(board, id) is not { } source)
        {
            return Missing(id);
        }

        Instant now = Instant.Now(clock);
        SourceStatusView status = await board.StatusAsync(source, board.OpenAlerts(), cancellationToken);
        IReadOnlyList<AssessmentView> latest = await board.AssessmentsAsync(cancellationToken);
        return TypedResults.Ok(new SourceDetailView(
            SourceViews.Of(source, status),
            SourceViews.Instruments(board.Lab, source, now),
            SourceViews.Limits(board.Lab, source, now),
            [.. latest.Where(assessment => assessment.Source == status.Id)]));
    }
}
