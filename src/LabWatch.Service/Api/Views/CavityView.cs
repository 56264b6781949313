using System.ComponentModel;

namespace LabWatch.Service.Api.Views;

/// <summary>Geometry of a cavity. Axial positions count from the aperture plane into the cavity.</summary>
internal sealed record CavityView(
    [property: Description("Shape of the radiating surface.")] string Shape,
    [property: Description("Inner radius, millimetres.")] double RadiusMillimetre,
    [property: Description("Length of the cylindrical part or height of a plain cone, millimetres.")] double LengthMillimetre,
    [property: Description("Half-angle of the conical bottom or cone, degrees.")] double? ConeHalfAngleDegree,
    [property: Description("Radius of the opening, millimetres.")] double ApertureRadiusMillimetre,
    [property: Description("Wall optics, one entry a working band.")] IReadOnlyList<CoatingView> Coating,
    [property: Description("Surfaces with an emissivity of their own: none, bottom, aperture-plate or bottom-and-aperture-plate.")] string SecondMaterial);
