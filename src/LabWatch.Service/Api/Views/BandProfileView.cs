using System.ComponentModel;

namespace LabWatch.Service.Api.Views;

/// <summary>What a source radiates in one band.</summary>
internal sealed record BandProfileView(
    [property: Description("Id of the band.")] string Band,
    [property: Description("Name for people.")] string Name,
    [property: Description("How it is computed: ring-kernels, monte-carlo, flat-plate, or closed-form for a diffuse sphere.")] string Method,
    [property: Description("Effective emissivity for the reference temperature, with the profile.")] EstimateView EffectiveEmissivity,
    [property: Description("Effective emissivity without temperature differences.")] EstimateView IsothermalEffectiveEmissivity,
    [property: Description("Radiance temperature with the surroundings, degree Celsius.")] double RadianceTemperatureCelsius,
    [property: Description("The same with its uncertainty, that of the reference included, degree Celsius and kelvin.")] EstimateView RadianceTemperature,
    [property: Description("Radiance temperature minus reference temperature, millikelvin.")] EstimateView OffsetMillikelvin,
    [property: Description("Radiance temperature of the surroundings, degree Celsius.")] double SurroundingsCelsius,
    [property: Description("What each comparator of the band shows; empty where there is none.")] IReadOnlyList<ComparatorProfileView> Comparators,
    [property: Description("The baseline on record; null where the isothermal design value serves.")] BaselineView? Baseline);
