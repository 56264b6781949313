using LabWatch.Metrology.Numerics;

namespace LabWatch.Metrology.Cavities;

/// <summary>Where the rays of a view first hit the wall: weights of the nodes of a mesh, whose sum is one.</summary>
internal sealed class ViewDistribution(Meridian meridian, PanelMesh mesh)
{
    private const int Nodes = 14;
    private static readonly (double[] X, double[] W) Rule = GaussLegendre.Rule(Nodes);

    /// <summary>The part of the rays that hits nearer to the axis than a place, and its derivative along the meridian.</summary>
    private delegate (double Part, double Slope) Share(MeridianLine line, double t);

    public double[] Of(in CavityView view, ReadOnlySpan<double> toAperture) => view.Kind switch
    {
        CavityViewKind.Hemispherical => Hemispherical(toAperture),
        CavityViewKind.Beam => Along(BeamShare(view.Radius)),
        CavityViewKind.Cone => Along(ConeShare(view.Distance, view.Radius)),
        CavityViewKind.Wall => At(view.Position),
        _ => new double[mesh.Count],
    };

    /// <summary>By reciprocity: a ring of area A sends A F/a of what the aperture of area a receives.</summary>
    private double[] Hemispherical(ReadOnlySpan<double> toAperture)
    {
        double[] weights = new double[mesh.Count];
        for (int i = 0; i < weights.Length; i++) weights[i] = 2 * Math.PI * mesh.Points[i].R * mesh.Weights[i] * toAperture[i] / meridian.ApertureArea;
        return weights;
    }

    private double[] At(double z)
    {
        int line = meridian.Lines.Count > 1 && meridian.Lines[1].Surface == CavitySurface.Wall ? 1 : 0;
        MeridianLine m = meridian.Lines[line];
        double t = (z - m.StartZ) / (m.EndZ - m.StartZ) * m.Length;
        double[] weights = new double[mesh.Count];
        for (int p = 0; p < mesh.Panels.Count; p++)
        {
            Panel panel = mesh.Panels[p];
            if (panel.Line != line || t < panel.From || (t >= panel.To && panel.To < m.Length)) continue;
            mesh.Rule.AddBasis(panel.U(t), 1, weights.AsSpan(p * mesh.Order, mesh.Order));
            break;
        }

        return weights;
    }

    /// <summary>Part of the beam that falls inside of a place, its radius squared over that of the beam, and the derivative along the meridian.</summary>
    private static Share BeamShare(double radius) => (line, t) =>
    {
        double r = line.R(t), square = radius * radius;
        return line.Surface == CavitySurface.Bottom ? (r * r / square, 2 * r * line.NormalZ / square) : (1, 0);
    };

    /// <summary>Part of the cone of rays that falls inside of a place: sin^2 of the angle at the detector over that of the edge.</summary>
    private Share ConeShare(double distance, double spot)
    {
        double edge = spot * spot / (spot * spot + distance * distance), detector = meridian.ApertureZ + distance;
        return (line, t) =>
        {
            if (line.Surface == CavitySurface.Plate) return (1, 0);
            double r = line.R(t), z = detector - line.Z(t), square = r * r + z * z;
            return (r * r / square / edge, 2 * r * z * (line.NormalZ * z - line.NormalR * r) / (square * square * edge));
        };
    }

    /// <summary>Integrates each node's polynomial over the rising share of the rays, up to one.</summary>
    private double[] Along(Share share)
    {
        double[] weights = new double[mesh.Count];
        for (int p = 0; p < mesh.Panels.Count; p++)
        {
            Panel panel = mesh.Panels[p];
            MeridianLine line = meridian.Lines[panel.Line];
            double start = share(line, panel.From).Part, end = share(line, panel.To).Part;
            if (start >= 1 || end <= start) continue;
            double half = ((end <= 1 ? panel.To : Crossing(line, panel, share)) - panel.From) / 2;
            for (int i = 0; i < Nodes; i++)
            {
                double t = panel.From + half * (1 + Rule.X[i]);
                mesh.Rule.AddBasis(panel.U(t), half * Rule.W[i] * share(line, t).Slope, weights.AsSpan(p * mesh.Order, mesh.Order));
            }
        }

        return weights;
    }

    private static double Crossing(MeridianLine line, in Panel panel, Share share)
    {
        double low = panel.From, high = panel.To;
        for (int i = 0; i < 60; i++)
        {
            double middle = (low + high) / 2;
            if (share(line, middle).Part < 1) low = middle;
            else high = middle;
        }

        return (low + high) / 2;
    }
}
