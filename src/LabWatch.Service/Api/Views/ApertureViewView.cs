using System.ComponentModel;

namespace LabWatch.Service.Api.Views;

/// <summary>How a source is looked at.</summary>
internal sealed record ApertureViewView(
    [property: Description("cone (a radiation thermometer on the axis), beam (parallel rays) or hemispherical.")] string Kind,
    [property: Description("Radius of the spot in the aperture plane, or of the beam, millimetres; zero for a hemispherical view.")] double SpotRadiusMillimetre,
    [property: Description("Distance of the detector from the aperture plane, millimetres; zero but for a cone.")] double DistanceMillimetre,
    [property: Description("Whether the lab file states it; else it is the usual view.")] bool IsStated);
