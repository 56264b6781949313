using System.ComponentModel;

namespace LabWatch.Service.Api.Views;

/// <summary>A spectral band in which a source is used.</summary>
internal sealed record BandView(
    [property: Description("Id of the band in its source.")] string Id,
    [property: Description("Name for people.")] string Name,
    [property: Description("Lower edge, micrometres.")] double LowerMicrometre,
    [property: Description("Upper edge, micrometres.")] double UpperMicrometre);
