using System.ComponentModel;

namespace LabWatch.Service.Api.Views;

/// <summary>What may lie behind deviations of radiance temperature.</summary>
internal sealed record AttributionFindingView(
    [property: Description("change: told from the same comparators on the reference days; model: told from the model of the cavity.")] string Basis,
    [property: Description("The sources, as site.source.")] IReadOnlyList<string> Sources,
    [property: Description("nothing-to-explain, explained, cannot-be-told-apart or unexplained; no-data where there are no deviations.")] string Verdict,
    [property: Description("The causes named, or those that cannot be told apart.")] IReadOnlyList<CauseView> Suspects,
    [property: Description("Every candidate, the most probable first.")] IReadOnlyList<CauseView> Candidates,
    [property: Description("The outcome in plain words.")] string Explanation,
    [property: Description("What would separate the suspects, as sentences.")] IReadOnlyList<string> WouldSeparate,
    [property: Description("The deviations weighed.")] IReadOnlyList<DeviationView> Deviations);
