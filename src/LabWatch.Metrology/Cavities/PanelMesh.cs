namespace LabWatch.Metrology.Cavities;

/// <summary>
/// Panels along the meridian, each with the nodes of one Gauss-Legendre rule. They shrink by halves towards apexes and corners, where the radiosity behaves like
/// s^beta or s log s (s the distance), so that a polynomial fits it on every panel.
/// </summary>
internal sealed class PanelMesh
{
    private readonly List<Panel> _panels = [];

    /// <param name="meridian">The meridian.</param>
    /// <param name="options">Fineness.</param>
    /// <param name="grid">Zones whose limits have to be limits of panels too, so that sums over zones are exact.</param>
    public PanelMesh(Meridian meridian, PanelOptions options, ZoneGrid grid)
    {
        Order = options.Order;
        Rule = new PanelRule(options.Order);
        for (int line = 0; line < meridian.Lines.Count; line++) AddLine(meridian, line, options, grid);
        int n = _panels.Count * Order;
        (Points, T, Weights) = (new RingPoint[n], new double[n], new double[n]);
        for (int p = 0; p < _panels.Count; p++)
        {
            Panel panel = _panels[p];
            for (int i = 0; i < Order; i++)
            {
                int node = p * Order + i;
                T[node] = panel.T(Rule.X[i]);
                Points[node] = RingPoint.On(meridian, panel.Line, T[node]);
                Weights[node] = Rule.W[i] * panel.HalfLength;
            }
        }
    }

    public int Order { get; }

    public PanelRule Rule { get; }

    public IReadOnlyList<Panel> Panels => _panels;

    public RingPoint[] Points { get; }

    /// <summary>Distance of each node from the start of its line.</summary>
    public double[] T { get; }

    /// <summary>Length of the meridian that each node stands for.</summary>
    public double[] Weights { get; }

    public int Count => Points.Length;

    private void AddLine(Meridian meridian, int index, PanelOptions options, ZoneGrid grid)
    {
        MeridianLine line = meridian.Lines[index];
        SortedSet<double> cuts = [0, line.Length];
        bool cone = index == 0 && line.EndZ > line.StartZ;
        if (meridian.Obstacle > 0) options = options with { Longest = options.Longest / 2 }; // shadows bend the view factors within half a radius
        double shortest = options.Shortest * Math.Min(1, line.Length);
        if (meridian.ApertureRadius < 1) shortest = Math.Min(shortest, (1 - meridian.ApertureRadius) / 8);
        Grade(cuts, 0, line.Length, (line.Length, index > 0 || cone, index < meridian.Lines.Count - 1), shortest, options);
        foreach (double cut in grid.Limits(index)) AddCut(cuts, cut);
        foreach (double cut in ShadowCuts(meridian, line, grid.Limits(index))) AddCut(cuts, cut);
        double from = double.NaN;
        foreach (double to in cuts)
        {
            if (!double.IsNaN(from)) _panels.Add(new Panel(index, from, to));
            from = to;
        }
    }

    /// <summary>Cuts [from, to] until no piece is longer than allowed, or than its distance from a graded end times growth less one.</summary>
    private static void Grade(SortedSet<double> cuts, double from, double to, (double Length, bool AtStart, bool AtEnd) line, double shortest, PanelOptions options)
    {
        double length = to - from, near = double.PositiveInfinity;
        bool touchesStart = line.AtStart && from <= 0, touchesEnd = line.AtEnd && to >= line.Length;
        if (line.AtStart) near = from;
        if (line.AtEnd) near = Math.Min(near, line.Length - to);
        if (length <= options.Longest && (length <= shortest || length <= (options.Growth - 1) * near * 1.001)) return;
        double cut = touchesStart == touchesEnd ? from + length / 2 : touchesStart ? from + length / options.Growth : to - length / options.Growth;
        cuts.Add(cut);
        Grade(cuts, from, cut, line, shortest, options);
        Grade(cuts, cut, to, line, shortest, options);
    }

    /// <summary>
    /// The height from which the whole re-entrant cone is in sight, steps towards it from below, where the view of the cone has the power 3/2, and the heights from
    /// which a limit of a zone goes behind the cone.
    /// </summary>
    private static IEnumerable<double> ShadowCuts(Meridian meridian, MeridianLine line, IReadOnlyList<double> limits)
    {
        if (meridian.Obstacle <= 0 || line.Surface != CavitySurface.Wall) yield break;
        double top = 2 * meridian.Obstacle;
        yield return top;
        for (double d = 0.3; d > 0.002; d /= 3) yield return top * (1 - d);
        foreach (double limit in limits) yield return top - limit;
    }

    private static void AddCut(SortedSet<double> cuts, double cut)
    {
        if (cut <= 0 || cut >= cuts.Max) return;
        double below = cuts.GetViewBetween(0, cut).Max, above = cuts.GetViewBetween(cut, cuts.Max).Min;
        if (Math.Min(cut - below, above - cut) > 1e-9) cuts.Add(cut);
    }
}
