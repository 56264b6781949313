namespace LabWatch.Metrology.Cavities;

/// <summary>Rays in a cavity of straight meridian lines with a radius of one: cylinder with flat or conical bottom, or plain cone.</summary>
internal readonly struct StraightScene : IRayScene
{
    private const int Bottom = 0;
    private readonly int _wall;
    private readonly int _plate;
    private readonly double _top;
    private readonly double _aperture;

    /// <summary>Height of the apex above the rim of the bottom (the base of a plain cone), positive for a re-entrant cone, zero for a flat bottom.</summary>
    private readonly double _apex;
    private readonly double _rim;
    private readonly double _bottomLength;
    private readonly (double R, double Z) _bottomNormal;
    private readonly ApertureTable? _table;

    public StraightScene(Meridian meridian)
    {
        MeridianLine bottom = meridian.Lines[0];
        bool hasWall = meridian.Lines.Count > 1 && meridian.Lines[1].Surface == CavitySurface.Wall;
        _wall = hasWall ? 1 : -1;
        _plate = hasWall ? 2 : 1;
        _top = meridian.ApertureZ;
        _aperture = meridian.ApertureRadius;
        _rim = bottom.EndZ;
        _apex = bottom.StartZ - _rim;
        _bottomLength = bottom.Length;
        _bottomNormal = (bottom.NormalR, bottom.NormalZ);
        _table = meridian.Obstacle > 0 ? new ApertureTable(meridian) : null;
    }

    public bool Advance(ref Ray ray)
    {
        if (_apex > 0 && ray.Line != Bottom && ConeDistance(ray, entering: true) is var shadow && shadow < double.PositiveInfinity)
        {
            Land(ref ray, shadow, Bottom);
            return true;
        }

        if (_wall > 0)
        {
            double distance = CylinderDistance(ray), z = ray.Z + ray.Axial * distance;
            if (z >= 0 && z < _top)
            {
                Land(ref ray, distance, _wall);
                return true;
            }

            if (z < 0) return LandOnBottom(ref ray);
        }
        else
        {
            double distance = ConeDistance(ray, entering: false);
            if (ray.Z + ray.Axial * distance < _top)
            {
                Land(ref ray, distance, Bottom);
                return true;
            }
        }

        return LandOnTop(ref ray);
    }

    public (double R, double Z) Normal(in Ray ray) => ray.Line == Bottom ? _bottomNormal : ray.Line == _wall ? (-1, 0) : (0, -1);

    public double ToAperture(in Ray ray)
    {
        if (ray.Line == _plate) return 0;
        if (_table is not null) return _table.Of(ray.Line, Along(ray));
        (double normalR, double normalZ) = Normal(ray);
        return RingKernel.ToAperture(ray.R, ray.Z, normalR, normalZ, _aperture, _top);
    }

    public double Along(in Ray ray) => ray.Line == Bottom ? ray.R * _bottomLength : ray.Line == _wall ? ray.Z : 1 - ray.R;

    private bool LandOnBottom(ref Ray ray)
    {
        if (_apex == 0) Land(ref ray, -ray.Z / ray.Axial, Bottom);
        else if (_apex < 0) Land(ref ray, ConeDistance(ray, entering: false), Bottom);
        else Land(ref ray, CylinderDistance(ray), Bottom); // by rounding past the rim of a re-entrant cone
        return true;
    }

    private bool LandOnTop(ref Ray ray)
    {
        ray.Fly((_top - ray.Z) / ray.Axial);
        ray.Z = _top;
        ray.Line = _plate;
        return ray.R >= _aperture;
    }

    private void Land(ref Ray ray, double distance, int line)
    {
        ray.Fly(distance);
        ray.Line = line;
        if (line == _wall) ray.R = 1;
        else if (ray.R > 1) ray.R = 1;
        if (line == Bottom) ray.Z = _apex == 0 ? 0 : _rim + _apex * (1 - ray.R);
    }

    private double CylinderDistance(in Ray ray)
    {
        double a = ray.Radial * ray.Radial + ray.Around * ray.Around, b = ray.R * ray.Radial;
        if (a <= 0) return double.PositiveInfinity;
        if (ray.Line == _wall) return -2 * b / a;
        return (Math.Sqrt(b * b + a * Math.Max(0, 1 - ray.R * ray.R)) - b) / a;
    }

    /// <summary>
    /// Distance to the conical bottom, whose radius at height z is 1 - (z - rim)/apex: from inside it for an outward or plain cone, from outside for a re-entrant one.
    /// </summary>
    private double ConeDistance(in Ray ray, bool entering)
    {
        double radius = 1 - (ray.Z - _rim) / _apex, slope = -ray.Axial / _apex;
        bool onCone = ray.Line == Bottom;
        if (onCone) radius = ray.R;
        double a = ray.Radial * ray.Radial + ray.Around * ray.Around - slope * slope;
        double b = ray.R * ray.Radial - radius * slope;
        if (onCone) return Positive(-2 * b / a, radius, slope);
        double c = ray.R * ray.R - radius * radius, discriminant = b * b - a * c;
        if (discriminant < 0) return double.PositiveInfinity;
        double root = b >= 0 ? -b - Math.Sqrt(discriminant) : -b + Math.Sqrt(discriminant);
        double first = root / a, second = c / root;
        if (first > second) (first, second) = (second, first);
        double hit = Positive(first, radius, slope);
        if (hit == double.PositiveInfinity) hit = Positive(second, radius, slope);
        // A ray that enters a re-entrant cone below its rim has left the cavity before.
        return entering && radius + slope * hit > 1 ? double.PositiveInfinity : hit;
    }

    private static double Positive(double distance, double radius, double slope) =>
        distance > 0 && radius + slope * distance >= 0 ? distance : double.PositiveInfinity;
}
