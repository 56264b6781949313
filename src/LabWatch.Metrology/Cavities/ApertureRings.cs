using LabWatch.Metrology.Numerics;

namespace LabWatch.Metrology.Cavities;

/// <summary>View factor to the aperture where a re-entrant cone may hide a part of it: the ring kernel summed over the rings of the opening.</summary>
internal sealed class ApertureRings(Meridian meridian)
{
    private const int Nodes = 14;
    private static readonly (double[] X, double[] W) Rule = GaussLegendre.Rule(Nodes);

    public double From(in RingPoint x)
    {
        double radius = meridian.ApertureRadius, edge = radius;
        double cone = (1 - meridian.ApertureZ / meridian.Obstacle) / -Math.Cos(x.Sight);
        if (x.Sight is > 0 and < Math.PI && cone > 0 && cone < radius) edge = cone;
        double sum = Piece(x, 0, edge);
        return edge < radius ? sum + Piece(x, edge, radius) : sum;
    }

    private double Piece(in RingPoint x, double from, double to)
    {
        // The rings come near to a place at the rim of the opening or at an apex below it: halve until each piece is short against its distance.
        double dr = x.R - Math.Clamp(x.R, from, to), dz = x.Z - meridian.ApertureZ, length = to - from;
        if (length > 1e-7 && length > Math.Sqrt(dr * dr + dz * dz)) return Piece(x, from, (from + to) / 2) + Piece(x, (from + to) / 2, to);
        double sum = 0;
        for (int i = 0; i < Nodes; i++)
        {
            double r = from + length * (1 + Rule.X[i]) / 2;
            var y = new RingPoint(r, meridian.ApertureZ, 0, -1, meridian.SightAngle(r, meridian.ApertureZ), -1);
            sum += Rule.W[i] * RingKernel.ToRing(x, y);
        }

        return sum * length / 2;
    }
}
