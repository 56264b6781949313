using System.ComponentModel;

namespace LabWatch.Service.Api.Views;

/// <summary>Which emissivities of the coating explain what a comparator last showed.</summary>
internal sealed record CoatingInferenceView(
    [property: Description("Id of the band.")] string Band,
    [property: Description("Channel of the comparator.")] string Channel,
    [property: Description("Id of the assessment that it is taken from.")] string Assessment,
    [property: Description("Emissivity of the lab file with its expanded uncertainty (k = 2).")] EstimateView Stated,
    [property: Description("Reflected part that the comparator shows, with its expanded uncertainty (k = 2).")] EstimateView ReflectedPart,
    [property: Description("Lowest emissivity thought possible before.")] double LowestPossible,
    [property: Description("Lowest emissivity that explains it; null where none does.")] double? Lower,
    [property: Description("Highest emissivity that explains it; null where none does.")] double? Upper,
    [property: Description("Whether the interval is shorter than half of what was thought possible before.")] bool HasInformation,
    [property: Description("The same in words.")] string Explanation);
