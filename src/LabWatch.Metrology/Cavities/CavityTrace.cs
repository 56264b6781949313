namespace LabWatch.Metrology.Cavities;

/// <summary>Traces a cavity by the best method that applies, and says which it was.</summary>
public static class CavityTrace
{
    /// <summary>
    /// Counts the hits of a view: in closed form for a flat plate and a diffuse sphere, by the integral equation for other diffuse walls, else by Monte Carlo.
    /// </summary>
    /// <param name="geometry">Geometry.</param>
    /// <param name="view">View, lengths in the unit of the geometry.</param>
    /// <param name="diffuseFraction">Diffuse fraction of the reflection, 0 to 1.</param>
    /// <param name="grid">Zones to count hits in; nodes by default.</param>
    /// <param name="second">Surfaces of a second material.</param>
    /// <param name="options">For Monte Carlo.</param>
    /// <exception cref="ArgumentException">Geometry or view is impossible; see <see cref="CavityGeometry.Problems"/> and <see cref="CavityView.Problems"/>.</exception>
    public static HitCounts Run(
        CavityGeometry geometry,
        CavityView view,
        double diffuseFraction = 1,
        ZoneGrid? grid = null,
        SecondMaterial second = SecondMaterial.None,
        MonteCarloOptions? options = null)
    {
        ArgumentNullException.ThrowIfNull(geometry);
        if (!(diffuseFraction >= 0 && diffuseFraction <= 1)) throw new ArgumentOutOfRangeException(nameof(diffuseFraction), "The diffuse fraction lies from 0 to 1.");
        if (geometry.Form == CavityForm.FlatPlate) return Plate(geometry, diffuseFraction);
        if (diffuseFraction < 1) return MonteCarloTracer.Trace(geometry, view, diffuseFraction, options, grid, second);
        if (geometry.Form != CavityForm.Sphere) return new RingKernelSolver(geometry, grid).Trace(view, second, options?.Depth ?? RingKernelSolver.DefaultDepth);
        IReadOnlyList<string> problems = view.Problems(geometry);
        return problems.Count == 0
            ? Sphere(geometry, view.Scaled(geometry.Radius), grid ?? ZoneGrid.Nodes(geometry), second)
            : throw new ArgumentException(string.Join(' ', problems), nameof(view));
    }

    /// <summary>A plate: each ray hits it once and leaves.</summary>
    private static HitCounts Plate(CavityGeometry geometry, double diffuseFraction)
    {
        var tally = new HitTally(ZoneGrid.Nodes(geometry), SecondMaterial.None, 2, 1);
        tally.Zones(0, 0)[0] = 1;
        tally.Escapes[0][0] = 1;
        return new HitCounts(tally, CavityMethod.ClosedForm, diffuseFraction, 0);
    }

    /// <summary>
    /// A diffuse sphere: the next hit is anywhere on the whole sphere with the same chance, so a/S leave at each reflection, and e_eff = e/(e + (1 - e) a/S) whatever
    /// the view, which decides only where the first hits are.
    /// </summary>
    private static HitCounts Sphere(CavityGeometry geometry, CavityView view, ZoneGrid grid, SecondMaterial second)
    {
        const int Depth = 48, Pieces = 4096;
        double ratio = geometry.ApertureRadius / geometry.Radius;
        // Half of the height of the missing cap, over the diameter, written without cancellation.
        double open = ratio * ratio / (1 + Math.Sqrt(1 - ratio * ratio)) / 2;
        var scene = new SphereScene(ratio);
        var tally = new HitTally(grid, second, Depth, 1);
        int material = second.HasFlag(SecondMaterial.Bottom) ? 1 : 0;
        double alive = 1;
        for (int k = 0; k < Depth; k++)
        {
            int order = tally.IndexOf(k, material * k);
            Span<double> zones = tally.Zones(0, order);
            for (int i = 0; i < Pieces; i++)
            {
                double part = (i + 0.5) / Pieces;
                grid.Add(zones, 0, k == 0 ? FirstHeight(scene, view, part) : scene.Top * part, alive / Pieces);
            }

            tally.Escapes[0][2 * order + material] = alive * open;
            alive *= 1 - open;
        }

        return new HitCounts(tally, CavityMethod.ClosedForm, 1, 1e-14);
    }

    /// <summary>Height of the first hit in a sphere, for a part of the rays from the axis outwards.</summary>
    private static double FirstHeight(SphereScene scene, CavityView view, double part)
    {
        var ray = new Ray { Line = -1, Z = scene.Top, Axial = -1 };
        switch (view.Kind)
        {
            case CavityViewKind.Hemispherical:
                return scene.Top * part; // by reciprocity: every element of the wall sees the aperture alike
            case CavityViewKind.Wall:
                return view.Position;
            case CavityViewKind.Beam:
                ray.R = view.Radius * Math.Sqrt(part);
                break;
            case CavityViewKind.Cone:
                double sine = Math.Sqrt(part) * view.Radius / Math.Sqrt(view.Radius * view.Radius + view.Distance * view.Distance);
                (ray.Radial, ray.Axial) = (sine, -Math.Sqrt(1 - sine * sine));
                ray.R = view.Distance * sine / -ray.Axial;
                break;
        }

        scene.Advance(ref ray);
        return ray.Z;
    }
}
