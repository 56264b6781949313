using System.Globalization;
using LabWatch.Metrology.Cavities;
using LabWatch.Metrology.Numerics;
using LabWatch.Metrology.Tests.Checks;

namespace LabWatch.Metrology.Tests.Cavities;

public sealed class NonIsothermalSuite : CheckSuite
{
    private const double C2 = 0.014387768775039337;

    public override string Title => "Effective emissivity of cavities with a temperature gradient";

    public override string Introduction =>
        "The wall falls linearly or as the square of the height by dT at the aperture. Each row has two checks, within 2e-9: ten cells, each at the temperature of its middle, "
        + "and the continuous profile.";

    protected override IEnumerable<Check> Build()
    {
        foreach (CavityRow row in CavityRow.Read("cavity_t6_nonisothermal.csv"))
        {
            string what = string.Create(
                CultureInfo.InvariantCulture, $"{row.What}, {row.Text("profile")} dT = {row.Text("dT")} K at {row.Text("T0")} K, {row.Text("lambda_um")} um");
            const string Source = "integral equation with ring kernels, computed elsewhere (method A)";
            double u = row.Value("u_eps_eff");
            yield return Check.OfNumber(row.Id + "-cells", what + ", ten cells", Source, "C", row.Text("eps_eff_zones"), u, false, () => Cells(row));
            yield return Check.OfNumber(row.Id + "-profile", what + ", continuous", Source, "C", row.Text("eps_eff_continuous"), u, false, () => Continuous(row));
        }
    }

    private static double Cells(CavityRow row)
    {
        HitCounts counts = CavityTraces.Of(row.Geometry, row.View, 10);
        double[] deficits = [.. counts.Grid.Zones.Select(zone => Deficit(row, zone.Surface, zone.Z))];
        return 1 - counts.Weights(row.Emissivity).Complement(deficits);
    }

    private static double Continuous(CavityRow row)
    {
        RingKernelSolver solver = CavityTraces.Solver(row.Geometry, 10);
        double[] weights = NodeWeights(row);
        double complement = CavityTraces.Of(row.Geometry, row.View, 10).Weights(row.Emissivity).IsothermalComplement;
        for (int i = 0; i < weights.Length; i++)
        {
            RingPoint point = solver.Mesh.Points[i];
            complement += weights[i] * Deficit(row, (CavitySurface)point.Line, point.Z);
        }

        return 1 - complement;
    }

    private static double[] NodeWeights(CavityRow row) => Weights.GetOrAdd(
        (row.Geometry, row.View, row.Emissivity), key => CavityTraces.Solver(key.Item1, 10).NodeWeights(key.Item2, key.Item3));

    private static readonly System.Collections.Concurrent.ConcurrentDictionary<(CavityGeometry, CavityView, double), double[]> Weights = new();

    private static double Deficit(CavityRow row, CavitySurface surface, double z)
    {
        double u = surface switch { CavitySurface.Bottom => 0, CavitySurface.Plate => 1, _ => z / row.Geometry.Length };
        double t0 = row.Value("T0"), t = t0 + row.Value("dT") * (row.Text("profile") == "lin" ? u : u * u);
        if (row.Text("lambda_um") != "8-14") return 1 - Planck(row.Value("lambda_um"), t) / Planck(row.Value("lambda_um"), t0);
        return 1 - Band(t) / Band(t0);
    }

    private static double Planck(double micrometres, double kelvin) => 1 / double.ExpM1(C2 / (micrometres * 1e-6 * kelvin));

    /// <summary>Radiance from 8 to 14 um up to a factor, by Gauss-Legendre quadrature.</summary>
    private static double Band(double kelvin)
    {
        (double[] x, double[] w) = GaussLegendre.Rule(20);
        double sum = 0;
        for (int i = 0; i < x.Length; i++)
        {
            double micrometres = 11 + 3 * x[i];
            sum += w[i] * Planck(micrometres, kelvin) / Math.Pow(micrometres, 5);
        }

        return sum;
    }
}
