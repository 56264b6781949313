namespace LabWatch.Metrology.Cavities;

/// <summary>
/// A straight piece of the meridian of a cavity, walked from the apex or centre of the bottom towards the aperture; the inside lies to its left.
/// Lengths are in units of the cavity's radius.
/// </summary>
internal sealed record MeridianLine(CavitySurface Surface, double StartR, double StartZ, double EndR, double EndZ)
{
    public double Length { get; } = Math.Sqrt((EndR - StartR) * (EndR - StartR) + (EndZ - StartZ) * (EndZ - StartZ));

    /// <summary>Radial component of the unit normal into the cavity.</summary>
    public double NormalR => -(EndZ - StartZ) / Length;

    /// <summary>Axial component of the unit normal into the cavity.</summary>
    public double NormalZ => (EndR - StartR) / Length;

    public double R(double t) => StartR + (EndR - StartR) * (t / Length);

    public double Z(double t) => StartZ + (EndZ - StartZ) * (t / Length);

    /// <summary>Area of the surface of revolution.</summary>
    public double Area => Math.PI * (StartR + EndR) * Length;
}
