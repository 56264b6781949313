namespace LabWatch.Metrology.Cavities;

/// <summary>
/// The meridian of a cavity of flat and conical surfaces with a radius of one, the aperture, and the shadow of a re-entrant cone.
/// </summary>
internal sealed class Meridian
{
    /// <param name="geometry">Geometry with a radius of one; neither sphere nor plate.</param>
    public Meridian(CavityGeometry geometry)
    {
        double length = geometry.Length, depth = geometry.ConeDepth, aperture = geometry.ApertureRadius;
        List<MeridianLine> lines = [];
        switch (geometry.Form)
        {
            case CavityForm.Cone:
                lines.Add(new MeridianLine(CavitySurface.Bottom, 0, 0, 1, length));
                break;
            case CavityForm.Cylinder or CavityForm.CylinderInwardCone or CavityForm.CylinderOutwardCone:
                double apex = geometry.Form switch { CavityForm.CylinderInwardCone => depth, CavityForm.CylinderOutwardCone => -depth, _ => 0 };
                lines.Add(new MeridianLine(CavitySurface.Bottom, 0, apex, 1, 0));
                lines.Add(new MeridianLine(CavitySurface.Wall, 1, 0, 1, length));
                break;
            default:
                throw new ArgumentException("Spheres and plates have no meridian of straight lines.", nameof(geometry));
        }

        if (aperture < 1) lines.Add(new MeridianLine(CavitySurface.Plate, 1, length, aperture, length));
        Lines = lines;
        ApertureRadius = aperture;
        ApertureZ = length;
        Obstacle = geometry.Form == CavityForm.CylinderInwardCone ? depth : 0;
    }

    public IReadOnlyList<MeridianLine> Lines { get; }

    public double ApertureRadius { get; }

    public double ApertureZ { get; }

    public double ApertureArea => Math.PI * ApertureRadius * ApertureRadius;

    /// <summary>Height of the re-entrant cone that shades parts of the wall from each other; zero where every two places see each other.</summary>
    public double Obstacle { get; }

    /// <summary>
    /// How far round, in radians, a place at (r, z) sees past the re-entrant cone: the azimuth of the generators where a plane through the place touches the cone.
    /// Two places see each other while their azimuths differ by less than the sum of their angles. Pi where nothing is in the way.
    /// </summary>
    public double SightAngle(double r, double z)
    {
        if (Obstacle <= 0) return Math.PI;
        double cone = 1 - z / Obstacle;
        if (cone >= r) return 0;
        return cone <= -r ? Math.PI : Math.Acos(cone / r);
    }
}
