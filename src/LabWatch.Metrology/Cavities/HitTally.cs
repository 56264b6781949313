namespace LabWatch.Metrology.Cavities;

/// <summary>Hits and escapes while they are counted, in one or more independent replicates.</summary>
internal sealed class HitTally
{
    public HitTally(ZoneGrid grid, SecondMaterial second, int depth, int replicates)
    {
        (Grid, Second, Depth) = (grid, second, depth);
        Orders = OrdersOf(second, depth);
        Hits = [.. Enumerable.Range(0, replicates).Select(_ => new double[Orders.Length * grid.Zones.Count])];
        Escapes = [.. Enumerable.Range(0, replicates).Select(_ => new double[Orders.Length * 2])];
    }

    public ZoneGrid Grid { get; }

    public SecondMaterial Second { get; }

    public int Depth { get; }

    public HitOrder[] Orders { get; }

    /// <summary>By replicate: order times zones plus zone.</summary>
    public double[][] Hits { get; }

    /// <summary>By replicate: twice the order, plus one where the last reflection was on the second material.</summary>
    public double[][] Escapes { get; }

    public bool IsSecond(CavitySurface surface) => IsSecond(Second, surface);

    public static bool IsSecond(SecondMaterial second, CavitySurface surface) => surface switch
    {
        CavitySurface.Bottom => second.HasFlag(SecondMaterial.Bottom),
        CavitySurface.Plate => second.HasFlag(SecondMaterial.Plate),
        _ => false,
    };

    /// <summary>All orders of a depth, by total and then by reflections on the second material.</summary>
    public static HitOrder[] OrdersOf(SecondMaterial second, int depth)
    {
        List<HitOrder> orders = [];
        for (int total = 0; total < depth; total++)
        {
            for (int b = 0; b <= (second == SecondMaterial.None ? 0 : total); b++) orders.Add(new HitOrder(total - b, b));
        }

        return [.. orders];
    }

    /// <summary>Index of the order with a number of reflections, some of them on the second material.</summary>
    public int IndexOf(int total, int onSecond) => Second == SecondMaterial.None ? total : total * (total + 1) / 2 + onSecond;

    public Span<double> Zones(int replicate, int order) => Hits[replicate].AsSpan(order * Grid.Zones.Count, Grid.Zones.Count);

    public double[][] MeanHits()
    {
        double[][] mean = new double[Orders.Length][];
        int zones = Grid.Zones.Count;
        for (int o = 0; o < mean.Length; o++)
        {
            mean[o] = new double[zones];
            for (int r = 0; r < Hits.Length; r++)
            {
                ReadOnlySpan<double> hits = Zones(r, o);
                for (int i = 0; i < zones; i++) mean[o][i] += hits[i] / Hits.Length;
            }
        }

        return mean;
    }
}
