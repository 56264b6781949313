using LabWatch.Metrology.Tests.Checks;

namespace LabWatch.Metrology.Tests.Cavities;

public sealed class MirrorCavitySuite : CheckSuite
{
    public override string Title => "Effective emissivity of cavities whose walls reflect partly as mirrors";

    public override string Introduction =>
        "1 - e_eff of our Monte Carlo (65 536 rays in 16 randomisations) against another program's, and against the unfolded cylinder for pure mirrors, "
        + "within four combined standard errors.";

    protected override IEnumerable<Check> Build() => CavityRow.Read("cavity_t5_specular_diffuse.csv").Where(row => row.DiffuseFraction < 1).Select(row =>
        Check.OfEstimate(
            row.Id,
            row.What,
            row.Method == "B" ? "backward Monte Carlo, computed elsewhere (method B)" : "unfolded cylinder, exact",
            "C",
            row.Text("one_minus_eps_eff"),
            row.Value("u_one_minus"),
            () =>
            {
                var weights = CavityTraces.WithMirrorPart(row.Geometry, row.View, row.DiffuseFraction).Weights(row.Emissivity);
                return (weights.IsothermalComplement, weights.StandardError);
            }));
}
