using System.Collections.Concurrent;
using LabWatch.Metrology.Cavities;

namespace LabWatch.Metrology.Tests.Cavities;

/// <summary>Traces that several checks share, each made once.</summary>
internal static class CavityTraces
{
    private static readonly ConcurrentDictionary<(CavityGeometry, int), Lazy<RingKernelSolver>> Solvers = new();
    private static readonly ConcurrentDictionary<(CavityGeometry, CavityView, int), Lazy<HitCounts>> Diffuse = new();
    private static readonly ConcurrentDictionary<(CavityGeometry, CavityView, double, int), Lazy<HitCounts>> Mirrored = new();

    /// <summary>The solver with ten cells on the wall, or with nodes (zero cells).</summary>
    public static RingKernelSolver Solver(CavityGeometry geometry, int cells = 0) => Solvers.GetOrAdd(
        (geometry, cells), key => new(() => new RingKernelSolver(key.Item1, cells == 0 ? null : ZoneGrid.Cells(key.Item1, cells)))).Value;

    public static HitCounts Of(CavityGeometry geometry, CavityView view, int cells = 0) => Diffuse.GetOrAdd(
        (geometry, view, cells), key => new(() => Solver(key.Item1, key.Item3).Trace(key.Item2))).Value;

    public static HitCounts WithMirrorPart(CavityGeometry geometry, CavityView view, double diffuseFraction, int cells = 0) => Mirrored.GetOrAdd(
        (geometry, view, diffuseFraction, cells),
        key => new(() => MonteCarloTracer.Trace(
            key.Item1, key.Item2, key.Item3, new MonteCarloOptions(4096, 16, 24, 7), key.Item4 == 0 ? null : ZoneGrid.Cells(key.Item1, key.Item4)))).Value;
}
