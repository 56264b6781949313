namespace LabWatch.Metrology.Cavities;

/// <summary>How a detector looks at a cavity; lengths in the unit of the geometry.</summary>
/// <param name="Kind">Kind of view.</param>
/// <param name="Radius">Radius of the beam, or of the spot in the aperture plane.</param>
/// <param name="Distance">Distance of the detector from the aperture plane.</param>
/// <param name="Position">Axial position of the wall element, from the rim of the bottom.</param>
public readonly record struct CavityView(CavityViewKind Kind, double Radius, double Distance, double Position)
{
    /// <summary>One ray along the axis.</summary>
    public static CavityView Axis { get; } = new(CavityViewKind.Axis, 0, 0, 0);

    /// <summary>All radiation through the aperture.</summary>
    public static CavityView Hemispherical { get; } = new(CavityViewKind.Hemispherical, 0, 0, 0);

    /// <summary>A collimated beam of a radius.</summary>
    public static CavityView Beam(double radius) => new(CavityViewKind.Beam, radius, 0, 0);

    /// <summary>A point detector at a distance, with a spot of a radius in the aperture plane.</summary>
    public static CavityView Cone(double distance, double spotRadius) => new(CavityViewKind.Cone, spotRadius, distance, 0);

    /// <summary>The local value at an axial position of the wall.</summary>
    public static CavityView Wall(double position) => new(CavityViewKind.Wall, 0, 0, position);

    /// <summary>What is wrong with the view of a geometry, in words, empty where nothing is.</summary>
    public IReadOnlyList<string> Problems(CavityGeometry geometry)
    {
        ArgumentNullException.ThrowIfNull(geometry);
        List<string> problems = [];
        if (geometry.Form == CavityForm.FlatPlate) return problems;
        bool sized = Kind is CavityViewKind.Beam or CavityViewKind.Cone;
        if (sized && !(Radius > 0 && Radius <= geometry.ApertureRadius)) problems.Add("The beam or spot must be positive and at most as wide as the aperture.");
        if (Kind == CavityViewKind.Cone && (!(Distance > 0) || !double.IsFinite(Distance))) problems.Add("The distance of the detector must be positive.");
        if (Kind == CavityViewKind.Wall && !(Position >= 0 && Position <= geometry.Length)) problems.Add("The place on the wall must lie between bottom and aperture.");
        return problems;
    }

    internal CavityView Scaled(double radius) => new(Kind, Radius / radius, Distance / radius, Position / radius);
}
