namespace LabWatch.Metrology.Cavities;

/// <summary>
/// Geometry of a cavity of revolution. Lengths are in any one unit: effective emissivity depends on their ratios alone.
/// Axial positions z rise from the rim of the bottom (z = 0) to the aperture plane (z = <paramref name="Length"/>); a plain cone has its apex at z = 0.
/// </summary>
/// <param name="Form">Form of the cavity.</param>
/// <param name="Radius">Inner radius of the cylinder, of the cone's base or of the sphere, positive.</param>
/// <param name="Length">Length of the cylinder from the rim of the bottom to the aperture plane, or height of a plain cone, positive; not used for sphere and plate.</param>
/// <param name="ConeHalfAngleDegree">Half-angle of a conical bottom, above 0 and below 90 degrees; not used for the other forms (a plain cone has radius and height).</param>
/// <param name="ApertureRadius">Radius of the opening in a thin flat aperture plate, positive, at most <paramref name="Radius"/>; equal to it where there is no plate.</param>
public sealed record CavityGeometry(CavityForm Form, double Radius, double Length, double ConeHalfAngleDegree, double ApertureRadius)
{
    /// <summary>Depth of the conical bottom from rim to apex; the height of a plain cone; zero without a cone.</summary>
    public double ConeDepth => Form switch
    {
        CavityForm.CylinderInwardCone or CavityForm.CylinderOutwardCone => Radius / Math.Tan(double.DegreesToRadians(ConeHalfAngleDegree)),
        CavityForm.Cone => Length,
        _ => 0,
    };

    /// <summary>Whether an aperture plate narrows the opening.</summary>
    public bool HasPlate => Form is not (CavityForm.FlatPlate or CavityForm.Sphere) && ApertureRadius < Radius;

    /// <summary>What is wrong with the geometry, in words, empty where nothing is.</summary>
    public IReadOnlyList<string> Problems()
    {
        List<string> problems = [];
        if (!(Radius > 0) || !double.IsFinite(Radius)) problems.Add("The radius must be positive.");
        if (Form == CavityForm.FlatPlate) return problems;
        if (!(ApertureRadius > 0) || !(ApertureRadius <= Radius)) problems.Add("The aperture radius must be positive and at most the radius of the cavity.");
        if (Form == CavityForm.Sphere) return problems;
        if (!(Length > 0) || !double.IsFinite(Length)) problems.Add("The length must be positive.");
        if (Form is CavityForm.CylinderInwardCone or CavityForm.CylinderOutwardCone)
        {
            if (!(ConeHalfAngleDegree > 0 && ConeHalfAngleDegree < 90)) problems.Add("The half-angle of the cone must lie between 0 and 90 degrees.");
            else if (Form == CavityForm.CylinderInwardCone && ConeDepth >= Length) problems.Add("The re-entrant cone reaches the aperture plane.");
        }

        return problems;
    }

    /// <summary>The same form with a radius of one.</summary>
    internal CavityGeometry Normalised()
    {
        IReadOnlyList<string> problems = Problems();
        if (problems.Count > 0) throw new ArgumentException(string.Join(' ', problems));
        return this with { Radius = 1, Length = Length / Radius, ApertureRadius = ApertureRadius / Radius };
    }
}
