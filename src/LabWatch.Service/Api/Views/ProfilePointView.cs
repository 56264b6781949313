using System.ComponentModel;

namespace LabWatch.Service.Api.Views;

/// <summary>A thermometer of a source.</summary>
internal sealed record ProfilePointView(
    [property: Description("Id of the channel.")] string Channel,
    [property: Description("Name for people.")] string Name,
    [property: Description("well, lip or case.")] string Kind,
    [property: Description("Distance from the aperture plane, millimetres; null where it has no place on the axis.")] double? PositionMillimetre,
    [property: Description("Temperature, degree Celsius; null where its newest reading gives none.")] double? Celsius,
    [property: Description("Expanded uncertainty by its certificate, kelvin; null without one.")] double? ExpandedUncertaintyKelvin,
    [property: Description("Coverage factor of that uncertainty; null without one.")] double? CoverageFactor,
    [property: Description("Whether the source's temperature is taken from it.")] bool IsReference,
    [property: Description("Whether it has been silent for too long to count.")] bool IsSilent);
