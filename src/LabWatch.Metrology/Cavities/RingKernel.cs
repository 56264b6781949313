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
    public static double ToRing(in RingPoint x, in RingPoint y) => y.R * Exchange(x, y);

    /// <summary>The view factor over the radius of the ring, the same both ways (reciprocity).</summary>
    public static double Exchange(in RingPoint x, in RingPoint y)
    {
        double sight = x.Sight + y.Sight;
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
        if (sight >= Math.PI)
        {
            double d2 = g * (a + b), d = Math.Sqrt(d2);
            return 2 / (d2 * d) * (s1 * s2 * a - (s1 * q2 + s2 * q1) * g + q1 * q2 * g * (g + 2 * d) / (a + d));
        }

        double cosine = x.SightCosine * y.SightCosine - x.SightSine * y.SightSine, sine = x.SightSine * y.SightCosine + x.SightCosine * y.SightSine;
        (double j0, double j1, double j2) = Partial(g, a, b, sight, cosine, sine, q1 * q2 != 0);
        return 2 / Math.PI * (s1 * s2 * j0 - (s1 * q2 + s2 * q1) * j1 + q1 * q2 * j2);
    }

    /// <summary>View factor from a place to the whole aperture, where nothing is in the way.</summary>
    public static double ToAperture(in RingPoint x, double radius, double apertureZ) => ToAperture(x.R, x.Z, x.NormalR, x.NormalZ, radius, apertureZ);

    /// <inheritdoc cref="ToAperture(in RingPoint, double, double)"/>
    public static double ToAperture(double r, double z, double normalR, double normalZ, double radius, double apertureZ)
    {
        double h = apertureZ - z;
        if (h <= 0) return r <= radius ? (normalZ - normalR) / 2 : 0; // the lip itself: the limit from inside
        double square = radius * radius, p = r * r + h * h - square;
        double d = Math.Sqrt(p * p + 4 * h * h * square);
        double up = p > 0 ? 2 * square * h * h / (d * (d + p)) : (1 - p / d) / 2;
        double outward = -2 * h * r * square / (d * (d + p + 2 * square));
        return normalZ * up + normalR * outward;
    }

    /// <summary>The integrals up to an azimuth, by the eccentric angle psi with tan(psi) = D/g tan(azimuth/2).</summary>
    private static (double J0, double J1, double J2) Partial(double g, double a, double b, double sight, double cosine, double sine, bool needsThird)
    {
        double d2 = g * (a + b), d = Math.Sqrt(d2), scale = 2 / (d2 * d);
        // tan of half the azimuth without cancellation; infinite where rounding has brought the azimuth to pi.
        double half = sine <= 0 ? double.PositiveInfinity : cosine < 0 ? (1 - cosine) / sine : sine / (1 + cosine);
        double tangent = d / g * half, psi = Math.Atan(tangent), twice = 2 / (tangent + 1 / tangent);
        double difference = psi > 0.2 ? psi - twice / 2 : SmallDifference(psi);
        double j0 = scale * (a * psi + b / 2 * twice);
        double j1 = scale * g * difference;
        return (j0, j1, needsThird ? Third(g, a, b, d, psi, sight, cosine, sine) : 0);
    }

    /// <summary>psi - sin(psi) cos(psi) for a small angle, by its series.</summary>
    private static double SmallDifference(double psi)
    {
        double q = 4 * psi * psi;
        return psi * (q / 6) * (1 - q / 20 * (1 - q / 42 * (1 - q / 72 * (1 - q / 110))));
    }

    private static double Third(double g, double a, double b, double d, double psi, double sight, double cosine, double sine)
    {
        if (b > 0.2 * a && sight > 0.3)
        {
            double t1 = 2 * psi / d, end = sine / (a - b * cosine);
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
