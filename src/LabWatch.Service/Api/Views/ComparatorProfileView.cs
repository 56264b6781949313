using System.ComponentModel;

namespace LabWatch.Service.Api.Views;

/// <summary>What a comparator shows of a source.</summary>
internal sealed record ComparatorProfileView(
    [property: Description("Id of its channel.")] string Channel,
    [property: Description("Name for people.")] string Name,
    [property: Description("Radiance temperature it shows through its certificate, degree Celsius; null where it shows none.")] double? Celsius,
    [property: Description("The effective emissivity that follows; null where it gives none.")] EstimateView? EffectiveEmissivity,
    [property: Description("Whether it was calibrated against this very source.")] bool ShowsChangeOnly,
    [property: Description("Why what it shows decides nothing, in words; null where it may be used.")] string? Refusal);
