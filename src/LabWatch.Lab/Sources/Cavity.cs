namespace LabWatch.Lab.Sources;

/// <summary>
/// Geometry and coating of a cavity. Axial positions are measured from the aperture plane into the cavity, in millimetres.
/// </summary>
/// <param name="Shape">Shape of the radiating surface.</param>
/// <param name="RadiusMillimetre">Inner radius of the cylinder, of the cone's base or of the sphere; of the plate for a flat plate.</param>
/// <param name="LengthMillimetre">Length of the cylindrical part, aperture plane to the rim of the bottom; height of a plain cone; zero for a sphere or plate.</param>
/// <param name="ConeHalfAngleDegree">Half-angle of the conical bottom or cone; null where there is none.</param>
/// <param name="ApertureRadiusMillimetre">Radius of the opening; equal to the inner radius where there is no aperture plate.</param>
/// <param name="Coating">Wall optics, one entry a working band.</param>
public sealed record Cavity(
    CavityShape Shape,
    double RadiusMillimetre,
    double LengthMillimetre,
    double? ConeHalfAngleDegree,
    double ApertureRadiusMillimetre,
    IReadOnlyList<CoatingOptics> Coating)
{
    /// <summary>Surfaces with an emissivity of their own.</summary>
    public SecondSurface SecondMaterial { get; init; }

    /// <summary>The wells that are compared for axial uniformity; null for all.</summary>
    public AxialRange? UniformZone { get; init; }
}
