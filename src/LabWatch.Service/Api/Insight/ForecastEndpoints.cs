using LabWatch.Assessments;
using LabWatch.Assessments.Forecasts;
using LabWatch.Lab.Assessments;
using LabWatch.Lab.Time;
using LabWatch.Records.Assessments;
using LabWatch.Service.Api.Access;
using LabWatch.Service.Api.Live;
using LabWatch.Service.Api.Requests;
using LabWatch.Service.Api.Sources;
using LabWatch.Service.Api.Views;
using Microsoft.AspNetCore.Http.HttpResults;

namespace LabWatch.Service.Api.Insight;

/// <summary>How the results of the assessments move over time.</summary>
internal static class ForecastEndpoints
{
    /// <summary>Maps the endpoints into the group of the API's version.</summary>
    public static void Map(RouteGroupBuilder api)
    {
        api.MapGet("sources/{id}/forecasts", OfSourceAsync)
            .WithTags("Sources")
            .Allow(Permission.Read)
            .WithName("ListForecasts")
            .WithSummary("Drift of a source's results over the days, and when each would reach its limit")
            .WithDescription(
                "One item a quantity, scope and set point, the soonest crossing first: effective emissivity less its baseline and offset of the radiance temperature by model and by comparator, "
                + "stability, axial uniformity, budget, agreement of the references, heater balance. Day means, slope with uncertainty for autocorrelated noise, crossing with its 95 % interval, state of the control charts. Read anew every five minutes.")
            .ProducesProblem(StatusCodes.Status404NotFound);
        api.MapGet("assessments/{id}/forecasts", OfAssessmentAsync)
            .WithTags("Assessments")
            .Allow(Permission.Read)
            .WithName("ListForecastsOfAssessment")
            .WithSummary("The same as it stood at the end of an assessment's window, for its criterion, scope and set point")
            .ProducesProblem(StatusCodes.Status404NotFound);
    }

    private static async Task<Results<Ok<ForecastListView>, ProblemHttpResult>> OfSourceAsync(
        string id, SiteBoard board, AssessmentHistory history, TimeProvider clock, CancellationToken cancellationToken) =>
        SourceEndpoints.Find(board, id) is { } source
            ? TypedResults.Ok(new ForecastListView(
                source.Key.ToString(), Instant.Now(clock), [.. (await history.ForecastsAsync(source.Key, cancellationToken)).Select(ForecastViews.Of)]))
            : SourceEndpoints.Missing(id);

    private static async Task<Results<Ok<ForecastListView>, ProblemHttpResult>> OfAssessmentAsync(
        string id, IAssessmentLedger ledger, AssessmentHistory history, CancellationToken cancellationToken)
    {
        if (await ledger.FindAsync(id, cancellationToken) is not { } assessment)
        {
            return Refusals.NotFound("assessment", id, "GET /api/v1/assessments lists the assessments.");
        }

        IReadOnlyList<DriftForecast> all = await history.ForecastsAsync(assessment.Source, assessment.Window.End, cancellationToken);
        return TypedResults.Ok(new ForecastListView(
            assessment.Source.ToString(),
            assessment.Window.End,
            [.. all.Where(forecast => IsAbout(forecast, assessment)).Select(ForecastViews.Of)]));
    }

    private static bool IsAbout(DriftForecast forecast, Assessment assessment)
    {
        double setPoint = CriterionResult.Figure(assessment.Figures, FigureName.SetPoint);
        return forecast.Series.Criterion == assessment.Criterion
            && forecast.Series.Scope == assessment.Scope
            && (double.IsNaN(setPoint) || Math.Abs(forecast.Series.SetPointCelsius - setPoint) < 0.06);
    }
}
