using LabWatch.Metrology.Cavities;
using LabWatch.Metrology.Tests.Checks;

namespace LabWatch.Metrology.Tests.Cavities;

public sealed class SphereSuite : CheckSuite
{
    public override string Title => "Effective emissivity of diffuse spheres";

    public override string Introduction => "1 - e_eff of the closed form e/(e + (1 - e) a/S), a/S the missing cap over the whole sphere; it holds for every view.";

    protected override IEnumerable<Check> Build() => CavityRow.Read("cavity_t1_sphere.csv").Select(row => Check.OfNumber(
        row.Id,
        row.What,
        "closed form, integrating sphere (E. M. Sparrow and R. D. Cess, Radiation Heat Transfer, from memory)",
        "PC",
        row.Text("one_minus_eps_eff"),
        1e-12,
        isRelative: true,
        () => CavityTrace.Run(row.Geometry, CavityView.Hemispherical).Weights(row.Emissivity).IsothermalComplement));
}
