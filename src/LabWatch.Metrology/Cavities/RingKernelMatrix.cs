using LabWatch.Metrology.Numerics;

namespace LabWatch.Metrology.Cavities;

/// <summary>
/// The discretised ring kernel: entry (i, j) is the part of the diffuse radiation leaving node i's place that the node j's interpolation polynomial stands for,
/// and the view factor of each node to the aperture. Near panels are integrated against the polynomials themselves, the others by their nodes.
/// </summary>
internal sealed class RingKernelMatrix
{
    private const int NearNodes = 14;
    private const double NearRatio = 0.75;
    private static readonly (double[] X, double[] W) NearRule = GaussLegendre.Rule(NearNodes);
    private readonly Meridian _meridian;
    private readonly PanelMesh _mesh;

    public RingKernelMatrix(Meridian meridian, PanelMesh mesh)
    {
        _meridian = meridian;
        _mesh = mesh;
        int n = mesh.Count;
        Entries = new double[n * n];
        ToAperture = new double[n];
        FarEntries(n);
        for (int i = 0; i < n; i++)
        {
            RingPoint x = mesh.Points[i];
            Row(x, mesh.T[i], Entries.AsSpan(i * n, n), nearOnly: true);
            ToAperture[i] = Aperture(x);
        }
    }

    /// <summary>Row-major, one row a place that radiation leaves.</summary>
    public double[] Entries { get; }

    public double[] ToAperture { get; }

    public int Count => ToAperture.Length;

    /// <summary>For each node what its view factors to all walls and the aperture miss to one: the error of the kernels there.</summary>
    public double[] Defects()
    {
        double[] defects = new double[Count];
        for (int i = 0; i < Count; i++)
        {
            double sum = ToAperture[i];
            foreach (double entry in Entries.AsSpan(i * Count, Count)) sum += entry;
            defects[i] = sum - 1;
        }

        return defects;
    }

    /// <summary>Fills the view factors from a place to all nodes.</summary>
    /// <param name="x">The place.</param>
    /// <param name="t">Its distance from the start of its line.</param>
    /// <param name="row">Receives one entry a node; has to be zero.</param>
    /// <param name="without">A line to leave out, or -1.</param>
    /// <param name="nearOnly">Leaves out the panels that are integrated by their nodes.</param>
    public void Row(in RingPoint x, double t, Span<double> row, int without = -1, bool nearOnly = false)
    {
        Span<double> cuts = stackalloc double[2];
        for (int p = 0; p < _mesh.Panels.Count; p++)
        {
            Panel panel = _mesh.Panels[p];
            if (panel.Line == without || Blind(x, panel.Line)) continue;
            Span<double> entries = row.Slice(p * _mesh.Order, _mesh.Order);
            int count = Cuts(x, t, panel, cuts);
            if (count > 0 || !IsFar(x, panel, -1, 1)) Near(x, panel, cuts[..count], entries);
            else if (!nearOnly) Far(x, p, entries);
        }
    }

    /// <summary>Where a panel has to be cut for a place: at the place itself, and where the shadow of a re-entrant cone begins.</summary>
    private int Cuts(in RingPoint x, double t, in Panel panel, Span<double> cuts)
    {
        int count = 0;
        if (panel.Line == x.Line && t > panel.From && t < panel.To) cuts[count++] = panel.U(t);
        if (_meridian.Obstacle > 0 && ShadowEdge(x, panel) is { } edge) cuts[count++] = edge;
        return count;
    }

    /// <summary>The entries between nodes and panels far from each other, each exchange computed once for both ways.</summary>
    private void FarEntries(int n)
    {
        int order = _mesh.Order, panels = _mesh.Panels.Count;
        bool[] far = new bool[n * panels];
        Span<double> cuts = stackalloc double[2];
        for (int i = 0; i < n; i++)
        {
            RingPoint x = _mesh.Points[i];
            for (int p = 0; p < panels; p++)
            {
                Panel panel = _mesh.Panels[p];
                far[i * panels + p] = !Blind(x, panel.Line) && Cuts(x, _mesh.T[i], panel, cuts) == 0 && IsFar(x, panel, -1, 1);
            }
        }

        for (int i = 0; i < n; i++)
        {
            RingPoint x = _mesh.Points[i];
            int own = i / order;
            for (int j = i; j < n; j++)
            {
                bool there = far[i * panels + j / order], back = far[j * panels + own];
                if (!there && !back) continue;
                double exchange = RingKernel.Exchange(x, _mesh.Points[j]);
                if (there) Entries[i * n + j] = exchange * _mesh.Points[j].R * _mesh.Weights[j];
                if (back) Entries[j * n + i] = exchange * x.R * _mesh.Weights[i];
            }
        }
    }

    /// <summary>View factor from a place to the aperture.</summary>
    public double Aperture(in RingPoint x)
    {
        if (_meridian.Obstacle <= 0) return RingKernel.ToAperture(x, _meridian.ApertureRadius, _meridian.ApertureZ);
        if (x.NormalZ < 0) return 0; // the plate lies in the plane of the aperture
        var opening = new ApertureRings(_meridian);
        return opening.From(x);
    }

    /// <summary>A flat or convex surface does not see itself.</summary>
    private static bool Blind(in RingPoint x, int line) => line == x.Line && x.NormalR >= 0;

    private void Far(in RingPoint x, int panel, Span<double> entries)
    {
        int first = panel * _mesh.Order;
        for (int j = 0; j < entries.Length; j++) entries[j] += _mesh.Weights[first + j] * RingKernel.ToRing(x, _mesh.Points[first + j]);
    }

    private void Near(in RingPoint x, in Panel panel, Span<double> cuts, Span<double> entries)
    {
        cuts.Sort();
        double from = -1;
        foreach (double cut in cuts)
        {
            NearPiece(x, panel, from, cut, entries);
            from = cut;
        }

        NearPiece(x, panel, from, 1, entries);
    }

    private void NearPiece(in RingPoint x, in Panel panel, double from, double to, Span<double> entries)
    {
        if (to - from > 1e-7 && !IsShort(x, panel, from, to))
        {
            double middle = (from + to) / 2;
            NearPiece(x, panel, from, middle, entries);
            NearPiece(x, panel, middle, to, entries);
            return;
        }

        double half = (to - from) / 2;
        for (int i = 0; i < NearNodes; i++)
        {
            double u = from + half * (1 + NearRule.X[i]);
            RingPoint y = RingPoint.On(_meridian, panel.Line, panel.T(u));
            _mesh.Rule.AddBasis(u, half * panel.HalfLength * NearRule.W[i] * RingKernel.ToRing(x, y), entries);
        }
    }

    /// <summary>
    /// Whether one rule does for a piece. On the line of the place itself the kernel is smooth on either side of it, up to the scale of the distance to the opposite wall.
    /// </summary>
    private bool IsShort(in RingPoint x, in Panel panel, double from, double to)
    {
        if (x.Line != panel.Line) return IsFar(x, panel, from, to);
        double start = _meridian.Lines[panel.Line].R(panel.T(from)), end = _meridian.Lines[panel.Line].R(panel.T(to));
        return (to - from) * panel.HalfLength <= 2 * Math.Max(x.R, Math.Min(start, end));
    }

    /// <summary>Whether a piece of a panel is far from a place, measured by its own length, on the same side of the axis.</summary>
    private bool IsFar(in RingPoint x, in Panel panel, double from, double to)
    {
        MeridianLine line = _meridian.Lines[panel.Line];
        double start = panel.T(from), end = panel.T(to), length = end - start;
        double dr = (line.EndR - line.StartR) / line.Length, dz = (line.EndZ - line.StartZ) / line.Length;
        double along = Math.Clamp((x.R - line.StartR) * dr + (x.Z - line.StartZ) * dz, start, end);
        double r = x.R - line.R(along), z = x.Z - line.Z(along);
        return r * r + z * z >= NearRatio * NearRatio * length * length;
    }

    /// <summary>Where on a panel the re-entrant cone begins to hide a part of the rings, as a local coordinate.</summary>
    private double? ShadowEdge(in RingPoint x, in Panel panel)
    {
        if (x.Sight is <= 0 or >= Math.PI || panel.Line == 0) return null;
        MeridianLine line = _meridian.Lines[panel.Line];
        double cosine = Math.Cos(x.Sight), h = _meridian.Obstacle;
        // (1 - z/h) = -cosine r along the line, both linear in t.
        double start = 1 - line.StartZ / h + cosine * line.StartR, end = 1 - line.EndZ / h + cosine * line.EndR;
        if (start == end) return null;
        double u = panel.U(start / (start - end) * line.Length);
        return u > -1 + 1e-9 && u < 1 - 1e-9 ? u : null;
    }
}
