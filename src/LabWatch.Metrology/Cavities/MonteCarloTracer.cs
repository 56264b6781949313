namespace LabWatch.Metrology.Cavities;

/// <summary>
/// Backward Monte Carlo: rays start at the detector, enter through the aperture and are always reflected, diffusely with the probability D, else as by a mirror, until
/// they leave. At each hit the chance of leaving next is added in full (the view factor of the aperture for the diffuse part, the mirrored ray itself for the rest),
/// so that 1 - e_eff is estimated itself and not as a difference.
/// </summary>
public static class MonteCarloTracer
{
    /// <summary>Traces a view.</summary>
    /// <param name="geometry">Any form but the flat plate.</param>
    /// <param name="view">The view, lengths in the unit of the geometry. Along the axis of a conical bottom with a mirror part there is no limit, so it is refused.</param>
    /// <param name="diffuseFraction">Diffuse fraction D of the reflection, 0 to 1, on all surfaces.</param>
    /// <param name="options">Number of rays, seed, threads.</param>
    /// <param name="grid">Zones to count hits in; nodes by default.</param>
    /// <param name="second">Surfaces of a second material.</param>
    public static HitCounts Trace(
        CavityGeometry geometry,
        CavityView view,
        double diffuseFraction,
        MonteCarloOptions? options = null,
        ZoneGrid? grid = null,
        SecondMaterial second = SecondMaterial.None)
    {
        ArgumentNullException.ThrowIfNull(geometry);
        options ??= new MonteCarloOptions();
        Require(geometry, view, diffuseFraction, options);
        CavityGeometry unit = geometry.Normalised();
        grid ??= ZoneGrid.Nodes(geometry);
        var tally = new HitTally(grid, second, options.Depth, options.Replicates);
        CavityView scaled = view.Scaled(geometry.Radius);
        if (geometry.Form == CavityForm.Sphere)
        {
            var sphere = new SphereScene(unit.ApertureRadius);
            Run(sphere, new RayStart(scaled, unit, sphere.Top), tally, diffuseFraction, options);
        }
        else
        {
            var meridian = new Meridian(unit);
            Run(new StraightScene(meridian), new RayStart(scaled, unit, unit.Length), tally, diffuseFraction, options);
        }

        return new HitCounts(tally, CavityMethod.MonteCarlo, diffuseFraction, 0, (long)options.Replicates * options.RaysPerReplicate);
    }

    private static void Run<TScene>(TScene scene, RayStart start, HitTally tally, double diffuseFraction, MonteCarloOptions options)
        where TScene : struct, IRayScene
    {
        // One replicate is one unit of work with sums of its own: the number of threads cannot change a bit.
        Parallel.For(0, options.Replicates, new ParallelOptions { MaxDegreeOfParallelism = options.Threads }, replicate =>
            new ReplicateTracer<TScene>(scene, start, tally, replicate, diffuseFraction, options.Seed).Trace(options.RaysPerReplicate));
    }

    private static void Require(CavityGeometry geometry, CavityView view, double diffuseFraction, MonteCarloOptions options)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(options.Replicates, 2);
        ArgumentOutOfRangeException.ThrowIfLessThan(options.Depth, 2);
        ArgumentOutOfRangeException.ThrowIfLessThan(options.RaysPerReplicate, 1);
        if (!(diffuseFraction >= 0 && diffuseFraction <= 1)) throw new ArgumentOutOfRangeException(nameof(diffuseFraction), "The diffuse fraction lies from 0 to 1.");
        if (geometry.Form == CavityForm.FlatPlate) throw new ArgumentException("A flat plate needs no trace.", nameof(geometry));
        IReadOnlyList<string> problems = view.Problems(geometry);
        if (problems.Count > 0) throw new ArgumentException(string.Join(' ', problems), nameof(view));
        if (view.Kind == CavityViewKind.Axis && diffuseFraction < 1 && geometry.ConeDepth > 0)
        {
            throw new ArgumentException("A single ray along the axis of a cone has no limit where a part of the reflection is as by a mirror; use a beam.", nameof(view));
        }
    }
}
