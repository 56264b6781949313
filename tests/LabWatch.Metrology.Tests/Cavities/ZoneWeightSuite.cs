using System.Collections.Concurrent;
using LabWatch.Metrology.Cavities;
using LabWatch.Metrology.Tests.Checks;

namespace LabWatch.Metrology.Tests.Cavities;

public sealed class ZoneWeightSuite : CheckSuite
{
    private static readonly ConcurrentDictionary<(CavityGeometry, CavityView, double), Lazy<HitCounts[]>> Traces = new();

    public override string Title => "Zone weights";

    public override string Introduction =>
        "The weight of the bottom, of ten equal cells of the wall and of the aperture plate: diffuse walls within the stated 1e-9, others within four combined standard errors.";

    protected override IEnumerable<Check> Build() => CavityRow.Read("cavity_t6_zone_weights.csv").Select(Make);

    private static Check Make(CavityRow row) => row.DiffuseFraction < 1
        ? Check.OfEstimate(row.Id, What(row), "backward Monte Carlo, computed elsewhere (method B)", "C", row.Text("w"), row.Value("u_w"), () => Estimate(row))
        : Check.OfNumber(
            row.Id,
            What(row),
            "integral equation with ring kernels, computed elsewhere (method A)",
            "C",
            row.Text("w"),
            row.Value("u_w"),
            isRelative: false,
            () => CavityTraces.Of(row.Geometry, row.View, 10).Weights(row.Emissivity).Weights[ZoneOf(row)]);

    /// <summary>Our own standard error from independent seeds, as a zone's weight has none of its own.</summary>
    private static (double Value, double StandardError) Estimate(CavityRow row)
    {
        HitCounts[] traces = Traces.GetOrAdd((row.Geometry, row.View, row.DiffuseFraction), key => new(() =>
        [
            .. Enumerable.Range(0, 8).Select(seed => MonteCarloTracer.Trace(
                key.Item1, key.Item2, key.Item3, new MonteCarloOptions(2048, 4, 16, (ulong)seed), ZoneGrid.Cells(key.Item1, 10))),
        ])).Value;
        double[] values = [.. traces.Select(trace => trace.Weights(row.Emissivity).Weights[ZoneOf(row)])];
        var summary = Metrology.Statistics.Summary.Of(values);
        return (summary.Mean, summary.StandardDeviation / Math.Sqrt(values.Length));
    }

    private static string What(CavityRow row) => $"{row.What}, weight of {row.Text("zone")}";

    private static int ZoneOf(CavityRow row) => row.Text("zone") switch
    {
        "bottom" => 0,
        "lid" => 11,
        string wall => int.Parse(wall["wall".Length..], System.Globalization.CultureInfo.InvariantCulture),
    };
}
