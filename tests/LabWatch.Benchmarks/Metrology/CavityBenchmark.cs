using System.Diagnostics;
using LabWatch.Metrology.Cavities;
using LabWatch.Metrology.Radiometry;

namespace LabWatch.Benchmarks.Metrology;

/// <summary>
/// Effective emissivity: the deterministic method, hits a second, rays and time until a standard error, the live evaluation of one profile. No arguments.
/// </summary>
internal static class CavityBenchmark
{
    private static readonly CavityGeometry Peer = new(CavityForm.CylinderOutwardCone, 1, 6, 60, 1);
    private static readonly CavityGeometry Long = new(CavityForm.CylinderOutwardCone, 1, 8, 60, 1);

    public static int Run(string[] args)
    {
        Console.WriteLine($"{Environment.ProcessorCount} cores, .NET {Environment.Version}; times of one thread are processor time, the best of some runs");
        Deterministic();
        HitsPerSecond();
        Console.WriteLine("time until a standard error of 1 - e_eff, one thread; depth as the emissivity needs");
        Until("L/R 8, e 0.9, beam 0.25, D 1", Long, CavityView.Beam(0.25), 1, 0.9, 8);
        Until("L/R 8, e 0.9, beam 0.25, D 0.9", Long, CavityView.Beam(0.25), 0.9, 0.9, 8);
        Until("L/R 8, e 0.9, hemispherical, D 1", Long, CavityView.Hemispherical, 1, 0.9, 8);
        Until("L/R 8, e 0.9, hemispherical, D 0.9", Long, CavityView.Hemispherical, 0.9, 0.9, 8);
        Until("L/R 6, e 0.95, beam 0.25, D 1", Peer, CavityView.Beam(0.25), 1, 0.95, 6);
        Until("L/R 6, e 0.95, beam 0.25, D 0.9", Peer, CavityView.Beam(0.25), 0.9, 0.95, 6);
        Until("L/R 6, e 0.85, r 0.5, beam 0.25, D 1", Peer with { ApertureRadius = 0.5 }, CavityView.Beam(0.25), 1, 0.85, 9);
        Until("L/R 6, e 0.95, r 0.5, hemispherical, D 1", Peer with { ApertureRadius = 0.5 }, CavityView.Hemispherical, 1, 0.95, 6);
        AnyEmissivity();
        Live();
        return 0;
    }

    private static void Deterministic()
    {
        Console.WriteLine("integral equation, one thread: kernels of a new geometry, then 48 reflections of one view");
        CavityGeometry[] geometries =
        [
            Long with { Form = CavityForm.Cylinder }, Peer with { ApertureRadius = 0.5 }, Peer with { Form = CavityForm.CylinderInwardCone, ApertureRadius = 0.75 },
        ];
        foreach (CavityGeometry geometry in geometries)
        {
            var (solver, kernels) = Best(() => new RingKernelSolver(geometry), 9);
            var (counts, trace) = Best(() => solver.Trace(CavityView.Hemispherical), 9);
            Console.WriteLine(FormattableString.Invariant(
                $"  {geometry.Form}, r {geometry.ApertureRadius}: {kernels:F1} ms + {trace:F1} ms, relative error {counts.RelativeError:E1}"));
        }
    }

    private static void HitsPerSecond()
    {
        foreach ((int threads, double diffuse) in new[] { (1, 1.0), (2, 1.0), (1, 0.9), (2, 0.9) })
        {
            var options = new MonteCarloOptions(4096, 16, 48, 1, threads);
            var (counts, milliseconds) = Best(() => MonteCarloTracer.Trace(Peer, CavityView.Beam(0.25), diffuse, options), 5, processor: false);
            double hits = 0;
            for (int order = 0; order < counts.Orders.Count; order++) hits += counts.Hits(order).ToArray().Sum();
            Console.WriteLine(FormattableString.Invariant($"trace, D {diffuse}, {threads} thread(s): {hits * 16 * 4096 / milliseconds / 1000:F2} million hits/s"));
        }
    }

    private static void Until(string name, CavityGeometry geometry, CavityView view, double diffuse, double emissivity, int depth)
    {
        ZoneGrid grid = ZoneGrid.Nodes(geometry);
        foreach (double target in new[] { 1e-5, 1e-6 })
        {
            for (int rays = 8; ; rays *= 2)
            {
                // The error of a single seed scatters: the root mean square over eight decides.
                double square = 0, time = double.PositiveInfinity;
                for (ulong seed = 1; seed <= 8; seed++)
                {
                    var options = new MonteCarloOptions(rays, 16, depth, seed, 1);
                    TimeSpan start = Environment.CpuUsage.TotalTime;
                    double error = MonteCarloTracer.Trace(geometry, view, diffuse, options, grid).Weights(emissivity).StandardError;
                    time = Math.Min(time, (Environment.CpuUsage.TotalTime - start).TotalMilliseconds);
                    square += error * error / 8;
                }

                if (Math.Sqrt(square) > target && rays < 1 << 18) continue;
                Console.WriteLine(FormattableString.Invariant($"  {name}: {target:E0} with {rays * 16} rays, {time:F2} ms (standard error {Math.Sqrt(square):E1})"));
                break;
            }
        }
    }

    private static void AnyEmissivity()
    {
        var (_, milliseconds) = Best(() => MonteCarloTracer.Trace(Peer with { ApertureRadius = 0.5 }, CavityView.Cone(10, 0.4), 0.9, new MonteCarloOptions()), 3, processor: false);
        Console.WriteLine(FormattableString.Invariant($"hit counts for any emissivity, new geometry, 65 536 rays, 48 reflections, all cores: {milliseconds:F0} ms"));
    }

    private static void Live()
    {
        ZoneWeights weights = new RingKernelSolver(Long).Trace(CavityView.Beam(0.25)).Weights(0.9);
        double[] kelvin = [.. weights.Counts.Grid.Zones.Select(zone => 773.15 - 0.3 * zone.Z)];
        foreach (RadianceBand band in new[] { RadianceBand.At(3.9), RadianceBand.Of(8, 14) })
        {
            double sum = 0;
            const int Times = 200_000;
            var (_, milliseconds) = Best(
                () =>
                {
                    for (int i = 0; i < Times; i++) sum += CavityRadiance.Of(weights, band, kelvin, 773.15).Complement;
                    return 0;
                },
                5);
            string what = band.IsOneWavelength ? "one wavelength" : "8-14 um";
            Console.WriteLine(FormattableString.Invariant($"live evaluation, {kelvin.Length} zones, {what}: {milliseconds * 1e6 / Times:F0} ns (sum {sum:E3})"));
        }
    }

    private static (T Result, double Milliseconds) Best<T>(Func<T> run, int times, bool processor = true)
    {
        T result = run();
        double best = double.PositiveInfinity;
        for (int i = 0; i < times; i++)
        {
            long start = Stopwatch.GetTimestamp();
            TimeSpan used = Environment.CpuUsage.TotalTime;
            result = run();
            double elapsed = Stopwatch.GetElapsedTime(start).TotalMilliseconds;
            best = Math.Min(best, processor ? (Environment.CpuUsage.TotalTime - used).TotalMilliseconds : elapsed);
        }

        return (result, best);
    }
}
