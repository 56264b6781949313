namespace LabWatch.Metrology.Cavities;

/// <summary>A place on the meridian: radius, height, unit normal into the cavity and how far round it sees past a re-entrant cone.</summary>
internal readonly record struct RingPoint(double R, double Z, double NormalR, double NormalZ, double Sight, int Line)
{
    /// <summary>Cosine of the angle of sight.</summary>
    public double SightCosine { get; } = Sight >= Math.PI ? -1 : Math.Cos(Sight);

    /// <summary>Sine of the angle of sight.</summary>
    public double SightSine { get; } = Sight >= Math.PI ? 0 : Math.Sin(Sight);

    public static RingPoint On(Meridian meridian, int line, double t)
    {
        MeridianLine m = meridian.Lines[line];
        (double r, double z) = (m.R(t), m.Z(t));
        return new RingPoint(r, z, m.NormalR, m.NormalZ, line == 0 && meridian.Obstacle > 0 ? 0 : meridian.SightAngle(r, z), line);
    }
}
