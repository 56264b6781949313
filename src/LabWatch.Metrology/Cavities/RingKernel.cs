using LabWatch.Metrology.Numerics;

namespace LabWatch.Metrology.Cavities;

/// <summary>
/// View factors in a cavity of revolution: from an element of the wall to a ring of the wall, per length of the ring's meridian, and to the aperture.
/// </summary>
/// <remarks>
/// With v = 1 - cos(azimuth), distance^2 = g + b v and the two cosines times the distance are S1 - Q1 v and S2 - Q2 v, the kernel is
/// (2 r2/pi) (S1 S2 J0 - (S1 Q2 + S2 Q1) J1 + Q1 Q2 J2) with Jk the integrals of v^k/(g + b v)^2 over the azimuths in sight. Written in v instead of the cosine, every
/// term of a convex cavity has the same sign, so that near rings lose no digits. For the cylinder it is the ring kernel of H. Buckley, Phil. Mag. 6 (1928) 447-457.
/// </remarks>
internal static class RingKernel
{
    private const int Nodes = 16;
    private static readonly (double[] X, double[] W) Rule = GaussLegendre.Rule(Nodes);

    /// <summary>View factor from the place <paramref name="x"/> to the ring at <paramref name="y"/>, per unit length of the meridian.</summary>
    public static double ToRing(in RingPoint x, in RingPoint y)
    {
        double sight = Math.Min(Math.PI, x.Sight + y.Sight);
        if (sight <= 0) return 0;
        double dr = y.R - x.R, dz = y.Z - x.Z;
        double s1 = 0, s2 = 0;
        if (x.Line != y.Line)
        {
            s1 = x.NormalZ * dz + x.NormalR * dr;
            s2 = -(y.NormalZ * dz + y.NormalR * dr);
        }

        double q1 = x.NormalR * y.R, q2 = y.NormalR * x.R;
        double g = dr * dr + dz * dz, b = 2 * x.R * y.R, a = g + b;
        (double j0, double j1, double j2) = sight >= Math.PI ? Full(g, a, b) : Partial(g, a, b, sight, q1 * q2 != 0);
        return 2 * y.R / Math.PI * (s1 * s2 * j0 - (s1 * q2 + s2 * q1) * j1 + q1 * q2 * j2);
    }

    /// <summary>View factor from a place to the whole aperture, where nothing is in the way.</summary>
    public static double ToAperture(in RingPoint x, double radius, double apertureZ)
    {
        double h = apertureZ - x.Z;
        if (h <= 0) return x.R <= radius ? (x.NormalZ - x.NormalR) / 2 : 0; // the lip itself: the limit from inside
        double p = x.R * x.R + h * h - radius * radius;
        double d = Math.Sqrt(p * p + 4 * h * h * radius * radius);
        double up = p > 0 ? 2 * radius * radius * h * h / (d * (d + p)) : (1 - p / d) / 2;
        double a = x.R * x.R + h * h + radius * radius;
        double outward = -2 * h * x.R * radius * radius / (d * (d + a));
        return x.NormalZ * up + x.NormalR * outward;
    }

    private static (double J0, double J1, double J2) Full(double g, double a, double b)
    {
        double d2 = g * (a + b), d = Math.Sqrt(d2), scale = Math.PI / (d2 * d);
        return (a * scale, g * scale, g * (g + 2 * d) / (a + d) * scale);
    }

    /// <summary>The integrals up to an azimuth, by the eccentric angle psi with tan(psi) = D/g tan(azimuth/2).</summary>
    private static (double J0, double J1, double J2) Partial(double g, double a, double b, double sight, bool needsThird)
    {
        double d2 = g * (a + b), d = Math.Sqrt(d2), scale = 2 / (d2 * d);
        double psi = Math.Atan(d / g * Math.Tan(sight / 2)), sin = Math.Sin(psi), twice = 2 * sin * Math.Cos(psi);
        double difference = psi > 0.2 ? psi - twice / 2 : SmallDifference(psi);
        double j0 = scale * (a * psi + b / 2 * twice);
        double j1 = scale * g * difference;
        return (j0, j1, needsThird ? Third(g, a, b, d, psi, sight) : 0);
    }

    /// <summary>psi - sin(psi) cos(psi) for a small angle, by its series.</summary>
    private static double SmallDifference(double psi)
    {
        double q = 4 * psi * psi;
        return psi * (q / 6) * (1 - q / 20 * (1 - q / 42 * (1 - q / 72 * (1 - q / 110))));
    }

    private static double Third(double g, double a, double b, double d, double psi, double sight)
    {
        if (b > 0.2 * a && sight > 0.3)
        {
            double t1 = 2 * psi / d, end = Math.Sin(sight) / (a - b * Math.Cos(sight));
            return (sight - g * t1 * (a + 2 * b) / (a + b) + g * b * end / (a + b)) / (b * b);
        }

        // In the azimuth itself: v^2/(g + b v)^2 has its pole at cos = a/b, far away here, or the arc is short.
        double sum = 0;
        for (int i = 0; i < Nodes; i++)
        {
            double half = Math.Sin(sight / 4 * (1 + Rule.X[i])), v = 2 * half * half;
            double ratio = v / (g + b * v);
            sum += Rule.W[i] * ratio * ratio;
        }

        return sum * sight / 2;
    }
}
