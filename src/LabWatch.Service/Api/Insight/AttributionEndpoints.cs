using LabWatch.Assessments.Attribution;
using LabWatch.Lab;
using LabWatch.Metrology.Attribution;
using LabWatch.Service.Api.Access;
using LabWatch.Service.Api.Live;
using LabWatch.Service.Api.Sources;
using LabWatch.Service.Api.Views;
using Microsoft.AspNetCore.Http.HttpResults;

namespace LabWatch.Service.Api.Insight;

/// <summary>What may lie behind what comparators show.</summary>
internal static class AttributionEndpoints
{
    /// <summary>Maps the endpoints into the group of the API's version.</summary>
    public static void Map(RouteGroupBuilder api)
    {
        api.MapGet("sources/{id}/attribution", OfSourceAsync)
            .WithTags("Sources")
            .Allow(Permission.Read)
            .WithName("GetAttribution")
            .WithSummary("What may lie behind what the comparators of a source show, and its coating as an interval")
            .WithDescription(
                "Candidates: error of the thermometer, emissivity of the coating, gradient, drift of a comparator, absorption in one band. By the change since the reference days and against the model, "
                + "and jointly with sources that share a comparator. Where the bands cannot separate them the verdict is cannot-be-told-apart, with what would.")
            .ProducesProblem(StatusCodes.Status404NotFound);
        api.MapGet("attributions", JointAsync)
            .WithTags("Sources")
            .Allow(Permission.Read)
            .WithName("ListJointAttributions")
            .WithSummary("The same jointly over the sources that share a comparator");
    }

    private static async Task<Results<Ok<AttributionView>, ProblemHttpResult>> OfSourceAsync(
        string id, SiteBoard board, AttributionReader reader, CancellationToken cancellationToken)
    {
        LabSnapshot lab = board.Lab;
        if (SourceEndpoints.Find(board, id) is not { } source)
        {
            return SourceEndpoints.Missing(id);
        }

        IReadOnlyList<AttributionFinding> own = await reader.OfAsync(lab, source, cancellationToken);
        IReadOnlyList<AttributionFinding> joint = await reader.JointAsync(lab, cancellationToken);
        IReadOnlyList<CoatingInference> coatings = await reader.CoatingsAsync(source, cancellationToken);
        return TypedResults.Ok(new AttributionView(
            source.Key.ToString(),
            [.. own.Concat(joint.Where(finding => finding.Sources.Contains(source.Key))).Select(Of)],
            [.. coatings.Select(Of)]));
    }

    private static async Task<Ok<AttributionListView>> JointAsync(SiteBoard board, AttributionReader reader, CancellationToken cancellationToken) =>
        TypedResults.Ok(new AttributionListView([.. (await reader.JointAsync(board.Lab, cancellationToken)).Select(Of)]));

    private static AttributionFindingView Of(AttributionFinding finding) => new(
        finding.Basis,
        [.. finding.Sources.Select(source => source.ToString())],
        finding.Result is { } result ? Names.Of(result.Verdict) : "no-data",
        [.. finding.Result?.Suspects.Select(cause => Of(cause, finding.Result)) ?? []],
        [.. finding.Result?.Inclusion.Select(item => Of(item.Cause, finding.Result)) ?? []],
        finding.Explanation,
        finding.WouldSeparate,
        [.. finding.Observations.Select(Of)]);

    private static CauseView Of(Cause cause, AttributionResult result) => new(
        Names.Of(cause.Kind),
        cause.Subject,
        cause.Band,
        AttributionText.NameOf(cause),
        result.Inclusion.First(item => item.Cause == cause).Probability);

    private static DeviationView Of(Observation observation)
    {
        BandDeviation deviation = observation.Deviation;
        return new(
            deviation.Source, deviation.Comparator, deviation.Band, observation.Channel.Length == 0 ? null : observation.Channel, Numbers.OrNull(observation.SetPointCelsius),
            deviation.Kelvin, deviation.StandardUncertainty, deviation.KelvinPerEmissivity, deviation.KelvinPerGradient, deviation.KelvinPerSignal,
            observation.RecentDays, observation.ReferenceDays);
    }

    private static CoatingInferenceView Of(CoatingInference inference) => new(
        inference.Band,
        inference.Channel,
        inference.Assessment,
        new(inference.Stated.Value, 2 * inference.Stated.StandardUncertainty, 2),
        new(inference.ReflectedPart.Value, 2 * inference.ReflectedPart.StandardUncertainty, 2),
        CoatingInference.LowestPossible,
        Numbers.OrNull(inference.Interval.Lower),
        Numbers.OrNull(inference.Interval.Upper),
        inference.Interval.HasInformation,
        inference.Explanation);
}
