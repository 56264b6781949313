using System.ComponentModel;

namespace LabWatch.Service.Api.Views;

/// <summary>What may lie behind what the comparators of a source show.</summary>
internal sealed record AttributionView(
    [property: Description("The source as site.source.")] string Source,
    [property: Description("The findings: its own by change and by model, then joint ones with sources that share a comparator.")] IReadOnlyList<AttributionFindingView> Findings,
    [property: Description("The coating of each band, inferred as an interval; empty where no comparator was decided on yet.")] IReadOnlyList<CoatingInferenceView> Coatings);
