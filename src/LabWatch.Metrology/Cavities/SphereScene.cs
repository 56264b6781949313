namespace LabWatch.Metrology.Cavities;

/// <summary>Rays in a sphere with a radius of one; z = 0 is its lowest point.</summary>
internal readonly struct SphereScene(double aperture) : IRayScene
{
    private readonly double _top = 1 + Math.Sqrt(1 - aperture * aperture);

    /// <summary>Height of the aperture plane above the lowest point.</summary>
    public double Top => _top;

    public bool Advance(ref Ray ray)
    {
        double z = ray.Z - 1, b = ray.R * ray.Radial + z * ray.Axial;
        double distance = ray.Line < 0 ? Math.Sqrt(Math.Max(0, b * b + 1 - ray.R * ray.R - z * z)) - b : -2 * b;
        ray.Fly(distance);
        ray.Line = 0;
        return ray.Z < _top;
    }

    public (double R, double Z) Normal(in Ray ray) => (-ray.R, 1 - ray.Z);

    // Any two elements of a sphere see each other alike: the cap that is missing, over the whole sphere.
    public double ToAperture(in Ray ray) => (2 - _top) / 2;

    public double Along(in Ray ray) => ray.Z;
}
