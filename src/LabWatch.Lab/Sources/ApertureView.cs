namespace LabWatch.Lab.Sources;

/// <summary>How a source is looked at: effective emissivity belongs to a view.</summary>
/// <param name="Kind">Kind of view.</param>
/// <param name="SpotRadiusMillimetre">Radius of the spot in the aperture plane, or of the beam; zero for a hemispherical view.</param>
/// <param name="DistanceMillimetre">Distance of the detector from the aperture plane; zero but for a cone.</param>
public sealed record ApertureView(ApertureViewKind Kind, double SpotRadiusMillimetre, double DistanceMillimetre)
{
    /// <summary>Distance of the usual radiation thermometer, millimetres (common practice, no source).</summary>
    public const double UsualDistanceMillimetre = 700;

    /// <summary>Spot of the usual view, as a part of the aperture's radius.</summary>
    public const double UsualSpotPart = 0.5;

    /// <summary>The view that is taken where none is stated: a cone from <see cref="UsualDistanceMillimetre"/> with a spot of half the aperture's radius.</summary>
    public static ApertureView Usual(double apertureRadiusMillimetre) =>
        new(ApertureViewKind.Cone, UsualSpotPart * apertureRadiusMillimetre, UsualDistanceMillimetre);
}
