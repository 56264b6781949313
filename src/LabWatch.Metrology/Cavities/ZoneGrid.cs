namespace LabWatch.Metrology.Cavities;

/// <summary>
/// The zones into which hits are counted. Each straight line of the meridian is cut at limits; either each cell is a zone of one temperature, or each limit is a node and
/// hits are shared between the two nodes around them, so that the zone sum is exact for a radiance that is linear between nodes.
/// </summary>
public sealed class ZoneGrid
{
    private readonly double[][] _limits;
    private readonly int[] _first;
    private readonly CavitySurface[] _surfaces;

    private ZoneGrid(double[][] limits, bool linear, Func<int, double, Zone> zoneAt)
    {
        Linear = linear;
        _limits = limits;
        _first = new int[limits.Length];
        List<Zone> zones = [];
        for (int line = 0; line < limits.Length; line++)
        {
            _first[line] = zones.Count;
            int count = linear ? limits[line].Length : limits[line].Length - 1;
            for (int i = 0; i < count; i++) zones.Add(zoneAt(line, linear ? limits[line][i] : (limits[line][i] + limits[line][i + 1]) / 2));
        }

        _surfaces = [.. _first.Select(first => zones[first].Surface)];
        Zones = zones;
    }

    /// <summary>Nodes (linear) or middles of cells, in units of the cavity's radius, from the bottom to the aperture.</summary>
    public IReadOnlyList<Zone> Zones { get; }

    /// <summary>Whether hits are shared between nodes; otherwise each cell is a zone.</summary>
    public bool Linear { get; }

    internal IReadOnlyList<double> Limits(int line) => _limits[line];

    internal int LineCount => _limits.Length;

    internal bool IsSecond(int line, HitTally tally) => tally.IsSecond(_surfaces[line]);

    /// <summary>
    /// Nodes for a temperature that varies smoothly: closer to the bottom's rim and to the aperture, at most a quarter of the radius apart on the bottom and the plate
    /// and about an eighth of the length on the wall.
    /// </summary>
    /// <param name="geometry">Any geometry. A sphere has nodes by height, a flat plate has one zone.</param>
    public static ZoneGrid Nodes(CavityGeometry geometry)
    {
        ArgumentNullException.ThrowIfNull(geometry);
        CavityGeometry unit = geometry.Normalised();
        if (unit.Form is CavityForm.Sphere or CavityForm.FlatPlate) return Round(unit, linear: unit.Form == CavityForm.Sphere, 16);
        var meridian = new Meridian(unit);
        return Straight(meridian, [.. meridian.Lines.Select(NodeLimits)], linear: true);
    }

    /// <summary>The bottom, equal cells of the wall, and the plate where there is one, each with one temperature; a sphere has cells of equal height.</summary>
    /// <param name="geometry">Any geometry; a flat plate has one zone.</param>
    /// <param name="wallCells">Number of cells of the cylindrical wall or the sphere, positive.</param>
    public static ZoneGrid Cells(CavityGeometry geometry, int wallCells)
    {
        ArgumentNullException.ThrowIfNull(geometry);
        ArgumentOutOfRangeException.ThrowIfNegativeOrZero(wallCells);
        CavityGeometry unit = geometry.Normalised();
        if (unit.Form is CavityForm.Sphere or CavityForm.FlatPlate) return Round(unit, linear: false, wallCells);
        var meridian = new Meridian(unit);
        double[][] limits = [.. meridian.Lines.Select(line => line.Surface == CavitySurface.Wall
            ? [.. Enumerable.Range(0, wallCells + 1).Select(i => line.Length * i / wallCells)]
            : new[] { 0, line.Length })];
        return Straight(meridian, limits, linear: false);
    }

    private static ZoneGrid Straight(Meridian meridian, double[][] limits, bool linear) => new(limits, linear, (line, t) =>
    {
        MeridianLine m = meridian.Lines[line];
        return new Zone(m.Surface, m.R(t), m.Z(t));
    });

    private static ZoneGrid Round(CavityGeometry unit, bool linear, int cells)
    {
        if (unit.Form == CavityForm.FlatPlate) return new ZoneGrid([[0, 1]], linear: false, (_, _) => new Zone(CavitySurface.Bottom, 0, 0));
        double top = new SphereScene(unit.ApertureRadius).Top;
        double[] limits = [.. Enumerable.Range(0, cells + 1).Select(i => top * i / cells)];
        return new ZoneGrid([limits], linear, (_, z) => new Zone(CavitySurface.Bottom, Math.Sqrt(Math.Max(0, z * (2 - z))), z));
    }

    /// <summary>Adds a hit at a place to the counts of its zones.</summary>
    internal void Add(Span<double> counts, int line, double t, double hits)
    {
        double[] limits = _limits[line];
        int low = 0, high = limits.Length - 1;
        while (high - low > 1)
        {
            int middle = (low + high) / 2;
            if (t >= limits[middle]) low = middle;
            else high = middle;
        }

        int zone = _first[line] + low;
        if (!Linear)
        {
            counts[zone] += hits;
            return;
        }

        double share = Math.Clamp((t - limits[low]) / (limits[high] - limits[low]), 0, 1);
        counts[zone] += hits * (1 - share);
        counts[zone + 1] += hits * share;
    }

    private static double[] NodeLimits(MeridianLine line)
    {
        // Steps that grow with the distance from the nearer end: the weights change fastest there.
        double length = line.Length;
        double longest = line.Surface == CavitySurface.Wall ? Math.Max(length / 16, 0.25) : 0.25;
        int steps = 2 * (int)Math.Ceiling(length / 2 / longest) + (line.Surface == CavitySurface.Wall ? 8 : 0);
        steps = Math.Max(steps, 4);
        return [.. Enumerable.Range(0, steps + 1).Select(i =>
        {
            double u = (double)i / steps;
            return length * (line.Surface == CavitySurface.Wall ? u - 0.11 * Math.Sin(2 * Math.PI * u) : u);
        })];
    }
}
