using LabWatch.Lab.Sources;
using LabWatch.Metrology.Cavities;

namespace LabWatch.Assessments.Cavities;

/// <summary>A source's cavity and view as the tracers take them. Lengths in millimetres, positions z from the rim of the bottom.</summary>
/// <param name="Geometry">The geometry.</param>
/// <param name="View">The view.</param>
/// <param name="Second">Surfaces of a second material.</param>
public sealed record CavityDescription(CavityGeometry Geometry, CavityView View, SecondMaterial Second)
{
    /// <summary>Height of the aperture plane above z = 0, millimetres: a place so far in front of a well has z = this minus the well's position.</summary>
    public double ApertureHeight => Geometry.Form switch
    {
        CavityForm.FlatPlate => 0,
        CavityForm.Sphere => Geometry.Radius + Math.Sqrt(Math.Max(0, (Geometry.Radius * Geometry.Radius) - (Geometry.ApertureRadius * Geometry.ApertureRadius))),
        _ => Geometry.Length,
    };

    /// <summary>What is wrong with them, in words; empty where nothing is.</summary>
    public IReadOnlyList<string> Problems() => Geometry.Problems() is { Count: > 0 } problems ? problems : View.Problems(Geometry);

    /// <summary>The cavity and view of a source.</summary>
    public static CavityDescription Of(ReferenceSource source)
    {
        ArgumentNullException.ThrowIfNull(source);
        Cavity cavity = source.Cavity;
        CavityGeometry geometry = new(
            FormOf(cavity.Shape), cavity.RadiusMillimetre, cavity.LengthMillimetre, cavity.ConeHalfAngleDegree ?? 0, cavity.ApertureRadiusMillimetre);
        return new(geometry, ViewOf(source.View ?? ApertureView.Usual(cavity.ApertureRadiusMillimetre)), SecondOf(cavity.SecondMaterial));
    }

    private static CavityForm FormOf(CavityShape shape) => shape switch
    {
        CavityShape.Cylinder => CavityForm.Cylinder,
        CavityShape.CylinderInwardCone => CavityForm.CylinderInwardCone,
        CavityShape.CylinderOutwardCone => CavityForm.CylinderOutwardCone,
        CavityShape.Cone => CavityForm.Cone,
        CavityShape.Sphere => CavityForm.Sphere,
        _ => CavityForm.FlatPlate,
    };

    private static CavityView ViewOf(ApertureView view) => view.Kind switch
    {
        ApertureViewKind.Cone => CavityView.Cone(view.DistanceMillimetre, view.SpotRadiusMillimetre),
        ApertureViewKind.Beam => CavityView.Beam(view.SpotRadiusMillimetre),
        _ => CavityView.Hemispherical,
    };

    private static SecondMaterial SecondOf(SecondSurface surface) => surface switch
    {
        SecondSurface.Bottom => SecondMaterial.Bottom,
        SecondSurface.AperturePlate => SecondMaterial.Plate,
        SecondSurface.BottomAndAperturePlate => SecondMaterial.Bottom | SecondMaterial.Plate,
        _ => SecondMaterial.None,
    };
}
