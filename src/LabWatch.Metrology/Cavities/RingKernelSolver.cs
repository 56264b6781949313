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
    private const int DefaultDepth = 48;
    private readonly CavityGeometry _geometry;
    private readonly ZoneGrid _grid;
    private readonly Meridian _meridian;
    private readonly PanelMesh _mesh;
    private readonly RingKernelMatrix _matrix;

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
        ClosureDefect = _matrix.ClosureDefect();
    }

    /// <summary>Largest difference from one of the view factors of any place to all others and the aperture: the error of the kernels.</summary>
    public double ClosureDefect { get; }

    /// <summary>Number of nodes.</summary>
    internal int NodeCount => _mesh.Count;

    internal PanelMesh Mesh => _mesh;

    /// <summary>Follows the rays of a view through the reflections.</summary>
    /// <param name="view">The view, lengths in the unit of the geometry.</param>
    /// <param name="depth">Number of reflections to follow; later ones go on in the ratio of the last two.</param>
    public HitCounts Trace(CavityView view, int depth = DefaultDepth)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(depth, 2);
        IReadOnlyList<string> problems = view.Problems(_geometry);
        if (problems.Count > 0) throw new ArgumentException(string.Join(' ', problems), nameof(view));
        double[][] counts = new double[depth][];
        double[] escapes = new double[depth];
        foreach ((int k, double[] hits, double apex, double apexEscape) in Orders(view.Scaled(_geometry.Radius), depth))
        {
            counts[k] = Zones(hits, apex);
            escapes[k] = Dot(hits, _matrix.ToAperture) + apex * apexEscape;
        }

        return new HitCounts(_grid, CavityMethod.IntegralEquation, 1, counts, escapes, ClosureDefect);
    }

    /// <summary>The weights of the nodes of the mesh, for a temperature that is given at every one of them.</summary>
    internal double[] NodeHits(CavityView view, double emissivity, int depth = DefaultDepth)
    {
        double[] sum = new double[_mesh.Count];
        double power = emissivity;
        foreach ((_, double[] hits, _, _) in Orders(view.Scaled(_geometry.Radius), depth))
        {
            for (int i = 0; i < sum.Length; i++) sum[i] += power * hits[i];
            power *= 1 - emissivity;
        }

        return sum;
    }

    private IEnumerable<(int Order, double[] Hits, double Apex, double ApexEscape)> Orders(CavityView view, int depth)
    {
        double[] hits = new ViewDistribution(_meridian, _mesh).Of(view, _matrix.ToAperture);
        double apex = 0, apexEscape = 0, apexStays = 0;
        double[] apexRow = [];
        if (view.Kind == CavityViewKind.Axis)
        {
            apex = 1;
            (apexRow, apexEscape) = Apex();
            apexStays = 1 - apexEscape - apexRow.Sum();
        }

        for (int k = 0; k < depth; k++)
        {
            yield return (k, hits, apex, apexEscape);
            double[] next = new double[hits.Length];
            Reflect(hits, next);
            for (int i = 0; i < apexRow.Length; i++) next[i] += apex * apexRow[i];
            (hits, apex) = (next, apex * apexStays);
        }
    }

    /// <summary>
    /// View factors from the apex or centre of the bottom. Near the apex of a concave cone the walls repeat themselves at every scale: what is not sent to other
    /// surfaces or out stays at the apex.
    /// </summary>
    private (double[] Row, double Escape) Apex()
    {
        RingPoint apex = RingPoint.On(_meridian, 0, 0);
        double[] row = new double[_mesh.Count];
        _matrix.Row(apex, 0, row, without: 0);
        double escape = _matrix.Aperture(apex);
        if (apex.NormalR < 0) return (row, escape);

        // A flat or convex bottom does not see itself: what is missing to one is the error of the kernels.
        double scale = 1 / (row.Sum() + escape);
        for (int i = 0; i < row.Length; i++) row[i] *= scale;
        return (row, escape * scale);
    }

    /// <summary>One diffuse reflection of all hits. Each sum runs over the rows in order, one element at a time, so no vector width can change it.</summary>
    private void Reflect(ReadOnlySpan<double> hits, Span<double> next)
    {
        int n = hits.Length;
        Span<Vector<double>> target = MemoryMarshal.Cast<double, Vector<double>>(next);
        int tail = target.Length * Vector<double>.Count;
        for (int i = 0; i < n; i++)
        {
            double share = hits[i];
            if (share == 0) continue;
            ReadOnlySpan<double> row = _matrix.Entries.AsSpan(i * n, n);
            ReadOnlySpan<Vector<double>> source = MemoryMarshal.Cast<double, Vector<double>>(row);
            for (int j = 0; j < target.Length; j++) target[j] += source[j] * share;
            for (int j = tail; j < n; j++) next[j] += row[j] * share;
        }
    }

    private double[] Zones(ReadOnlySpan<double> hits, double apex)
    {
        double[] zones = new double[_grid.Zones.Count];
        for (int i = 0; i < hits.Length; i++) _grid.Add(zones, _mesh.Points[i].Line, _mesh.T[i], hits[i]);
        _grid.Add(zones, 0, 0, apex);
        return zones;
    }

    private static double Dot(ReadOnlySpan<double> a, ReadOnlySpan<double> b)
    {
        double sum = 0;
        for (int i = 0; i < a.Length; i++) sum += a[i] * b[i];
        return sum;
    }
}
