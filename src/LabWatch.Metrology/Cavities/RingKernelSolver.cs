using System.Numerics;
using System.Runtime.InteropServices;

namespace LabWatch.Metrology.Cavities;

/// <summary>
/// The deterministic method for diffuse walls: the integral equation of the radiosity with ring kernels (E. M. Sparrow and co-workers, 1960-62; R. E. Bedford and
/// C. K. Ma, J. Opt. Soc. Am. 64 (1974) 339-349), followed reflection by reflection so that one solution serves every emissivity, and solved for 1 - e_eff, which
/// keeps its relative precision however black the cavity is. Thread-safe after construction; not bound to a thread count or vector width.
/// </summary>
public sealed class RingKernelSolver
{
    internal const int DefaultDepth = 48;

    /// <summary>What polynomials on the panels leave, relative to 1 - e_eff: largest difference from four times finer panels over all forms (5e-10), rounded up.</summary>
    private const double PanelError = 1e-9;
    private readonly CavityGeometry _geometry;
    private readonly ZoneGrid _grid;
    private readonly Meridian _meridian;
    private readonly PanelMesh _mesh;
    private readonly RingKernelMatrix _matrix;
    private readonly double[] _defects;
    private readonly Lazy<(double[] Row, double Escape, double Stays)> _apex;

    /// <summary>Builds the kernels of a geometry.</summary>
    /// <param name="geometry">A cavity of straight lines: neither sphere nor plate.</param>
    /// <param name="grid">Zones to count hits in; nodes by default.</param>
    /// <exception cref="ArgumentException">The geometry is impossible or has no straight meridian.</exception>
    public RingKernelSolver(CavityGeometry geometry, ZoneGrid? grid = null)
        : this(geometry, grid, PanelOptions.Fine)
    {
    }

    internal RingKernelSolver(CavityGeometry geometry, ZoneGrid? grid, PanelOptions options)
    {
        ArgumentNullException.ThrowIfNull(geometry);
        _geometry = geometry;
        _meridian = new Meridian(geometry.Normalised());
        _grid = grid ?? ZoneGrid.Nodes(geometry);
        _mesh = new PanelMesh(_meridian, options, _grid);
        _matrix = new RingKernelMatrix(_meridian, _mesh);
        _defects = _matrix.Defects();
        ClosureDefect = _defects.Max(Math.Abs);
        _apex = new(Apex);
    }

    /// <summary>Largest difference from one of the view factors of any place to all others and the aperture: the error of the kernels.</summary>
    public double ClosureDefect { get; }

    /// <summary>Number of nodes.</summary>
    internal int NodeCount => _mesh.Count;

    internal PanelMesh Mesh => _mesh;

    /// <summary>Follows the rays of a view through the reflections.</summary>
    /// <param name="view">The view, lengths in the unit of the geometry.</param>
    /// <param name="second">Surfaces of a second material.</param>
    /// <param name="depth">Number of reflections to follow; later ones go on in the ratio of the last two.</param>
    public HitCounts Trace(CavityView view, SecondMaterial second = SecondMaterial.None, int depth = DefaultDepth)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(depth, 2);
        IReadOnlyList<string> problems = view.Problems(_geometry);
        if (problems.Count > 0) throw new ArgumentException(string.Join(' ', problems), nameof(view));
        var tally = new HitTally(_grid, second, depth, 1);
        DiffuseHits[] hits = [Start(view.Scaled(_geometry.Radius))];
        double error = PanelError;
        for (int total = 0; ; total++)
        {
            for (int b = 0; b < hits.Length; b++) Count(hits[b], tally, tally.IndexOf(total, b));
            if (total is > 0 and < 5) error = Math.Max(error, KernelError(hits));
            if (total == depth - 1) return new HitCounts(tally, CavityMethod.IntegralEquation, 1, error);
            hits = Next(hits, tally);
        }
    }

    /// <summary>The weights of the nodes of the mesh, for a temperature that is given at every one of them.</summary>
    internal double[] NodeWeights(CavityView view, double emissivity, int depth = DefaultDepth)
    {
        double[] sum = new double[_mesh.Count];
        double power = emissivity;
        DiffuseHits hits = Start(view.Scaled(_geometry.Radius));
        for (int k = 0; k < depth; k++)
        {
            for (int i = 0; i < sum.Length; i++) sum[i] += power * hits.Nodes[i];
            power *= 1 - emissivity;
            var next = new DiffuseHits(new double[sum.Length], 0);
            hits = next with { Apex = Reflect(hits, next.Nodes, _ => true) };
        }

        return sum;
    }

    /// <summary>What the error of the kernels adds to the escapes of one order, relative to them.</summary>
    private double KernelError(DiffuseHits[] hits)
    {
        double wrong = 0, escapes = 0;
        foreach (DiffuseHits part in hits)
        {
            for (int i = 0; i < part.Nodes.Length; i++)
            {
                wrong += part.Nodes[i] * _defects[i];
                escapes += part.Nodes[i] * _matrix.ToAperture[i];
            }
        }

        return escapes > 0 ? Math.Abs(wrong) / escapes : 0;
    }

    private DiffuseHits Start(CavityView view) =>
        new(new ViewDistribution(_meridian, _mesh).Of(view, _matrix.ToAperture), view.Kind == CavityViewKind.Axis ? 1 : 0);

    private void Count(in DiffuseHits hits, HitTally tally, int order)
    {
        Span<double> zones = tally.Zones(0, order), escapes = tally.Escapes[0].AsSpan(2 * order, 2);
        for (int i = 0; i < hits.Nodes.Length; i++)
        {
            int line = _mesh.Points[i].Line;
            _grid.Add(zones, line, _mesh.T[i], hits.Nodes[i]);
            escapes[IsSecond(tally, line) ? 1 : 0] += hits.Nodes[i] * _matrix.ToAperture[i];
        }

        if (hits.Apex == 0) return;
        _grid.Add(zones, 0, 0, hits.Apex);
        escapes[IsSecond(tally, 0) ? 1 : 0] += hits.Apex * _apex.Value.Escape;
    }

    /// <summary>One more reflection; hits are kept apart by the number of reflections on the second material.</summary>
    private DiffuseHits[] Next(DiffuseHits[] hits, HitTally tally)
    {
        bool two = tally.Second != SecondMaterial.None;
        DiffuseHits[] next = [.. Enumerable.Range(0, two ? hits.Length + 1 : 1).Select(_ => new DiffuseHits(new double[_mesh.Count], 0))];
        for (int b = 0; b < hits.Length; b++)
        {
            next[b] = next[b] with { Apex = next[b].Apex + Reflect(hits[b], next[b].Nodes, line => !IsSecond(tally, line)) };
            if (two) next[b + 1] = next[b + 1] with { Apex = Reflect(hits[b], next[b + 1].Nodes, line => IsSecond(tally, line)) };
        }

        return next;
    }

    private bool IsSecond(HitTally tally, int line) => tally.IsSecond(_meridian.Lines[line].Surface);

    /// <summary>Adds one diffuse reflection of the hits on some lines and gives what stays at the apex.</summary>
    private double Reflect(in DiffuseHits hits, Span<double> next, Func<int, bool> reflects)
    {
        int n = next.Length;
        for (int i = 0; i < n; i++)
        {
            if (hits.Nodes[i] != 0 && reflects(_mesh.Points[i].Line)) AddScaled(_matrix.Entries.AsSpan(i * n, n), hits.Nodes[i], next);
        }

        if (hits.Apex == 0 || !reflects(0)) return 0;
        AddScaled(_apex.Value.Row, hits.Apex, next);
        return hits.Apex * _apex.Value.Stays;
    }

    /// <summary>Adds a multiple of a row, one element at a time and unfused, so no vector width can change the sums.</summary>
    private static void AddScaled(ReadOnlySpan<double> row, double share, Span<double> next)
    {
        ReadOnlySpan<Vector<double>> source = MemoryMarshal.Cast<double, Vector<double>>(row);
        Span<Vector<double>> target = MemoryMarshal.Cast<double, Vector<double>>(next);
        for (int j = 0; j < target.Length; j++) target[j] += source[j] * share;
        for (int j = target.Length * Vector<double>.Count; j < next.Length; j++) next[j] += row[j] * share;
    }

    /// <summary>
    /// View factors from the apex or centre of the bottom. Near the apex of a concave cone the walls repeat themselves at every scale: what is not sent to other
    /// surfaces or out stays at the apex.
    /// </summary>
    private (double[] Row, double Escape, double Stays) Apex()
    {
        RingPoint apex = RingPoint.On(_meridian, 0, 0);
        double[] row = new double[_mesh.Count];
        _matrix.Row(apex, 0, row, without: 0);
        double escape = _matrix.Aperture(apex);
        if (apex.NormalR < 0) return (row, escape, 1 - escape - row.Sum());

        // A flat or convex bottom does not see itself: what is missing to one is the error of the kernels.
        double scale = 1 / (row.Sum() + escape);
        for (int i = 0; i < row.Length; i++) row[i] *= scale;
        return (row, escape * scale, 0);
    }
}
