using LabWatch.Metrology.Cavities;
using LabWatch.Metrology.Tests.Checks;

namespace LabWatch.Metrology.Tests.Cavities;

public sealed class DiffuseCavitySuite : CheckSuite
{
    /// <summary>By how much the two deterministic methods of the reference differ at most.</summary>
    private const double MethodsAgree = 2.3e-9;

    private static readonly string[] Files = ["cavity_t3_cylinder_diffuse.csv", "cavity_t4_cylinder_cone_diffuse.csv", "cavity_t5_specular_diffuse.csv"];

    public override string Title => "Effective emissivity of diffuse cylinders with flat and conical bottoms";

    public override string Introduction =>
        "1 - e_eff of the integral equation with ring kernels against another program's solution of it, within the uncertainty that each row states (about 1e-8 relative). "
        + "On the axis of an outward cone the radiosity approaches its limit as a power below one of the distance; the reference takes a place near the apex, here "
        + "the limit itself is solved, so those rows have the 2.3e-9 by which the two methods of the reference agree.";

    protected override IEnumerable<Check> Build()
    {
        foreach (CavityRow row in Files.SelectMany(CavityRow.Read).Where(row => row.DiffuseFraction == 1))
        {
            bool apex = row.View.Kind == CavityViewKind.Axis && row.Geometry.Form == CavityForm.CylinderOutwardCone;
            yield return Check.OfNumber(
                row.Id,
                row.What,
                "integral equation with ring kernels, computed elsewhere (method A)",
                "C",
                row.Text("one_minus_eps_eff"),
                apex ? Math.Max(MethodsAgree, row.Value("u_one_minus")) : row.Value("u_one_minus"),
                isRelative: false,
                () => CavityTraces.Of(row.Geometry, row.View).Weights(row.Emissivity).IsothermalComplement);
        }
    }
}
