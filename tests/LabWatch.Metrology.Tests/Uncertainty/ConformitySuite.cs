using LabWatch.Metrology.Tests.Checks;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Metrology.Tests.Uncertainty;

public sealed class ConformitySuite : CheckSuite
{
    public override string Title => "Coverage factors and conformity (JCGM 100 table G.2, JCGM 106, ILAC-G8, ISO/IEC 17043)";

    public override string Introduction =>
        "Published tables and examples to the digits printed, and tails, quantiles and risks computed elsewhere to 40 digits.";

    protected override IEnumerable<Check> Build() =>
        CheckRow.Read("t08_gum_conformity.csv")
            .Select(row => Compute(row) is { } compute ? Check.Of(row, compute) : null)
            .OfType<Check>();

    private static Func<double>? Compute(CheckRow row) => row.Group switch
    {
        "gum_tableG2" => () => CoverageFactor.For(row.Number("nu")),
        "jcgm106_table1" => () => NormalDistribution.UpperQuantile(1 - row.Number("pc")),
        "jcgm106_examples" or "conformance_probability" => () => Conformity.Probability(EstimateOf(row), ToleranceOf(row)),
        "ilac_g8_guard_band" => GuardBand(row),
        _ => null,
    };

    private static Func<double> GuardBand(CheckRow row) => row.Quantity switch
    {
        "specific PFA at the acceptance limit, w=rU, U=2u" => () => NormalDistribution.UpperTail(2 * row.Number("r")),
        "acceptance limit A = T - rU" => () => ToleranceInterval.Symmetric(row.Number("T")).Guarded(row.Number("r") * row.Number("U")).Upper,
        _ => () => Conformity.NonconformityProbability(
            new Estimate(row.Number("y"), row.Number("U") / 2), ToleranceInterval.Symmetric(row.Number("T"))),
    };

    private static Estimate EstimateOf(CheckRow row) =>
        new(row.Number("y"), row.Number("u"), row.Has("nu") ? row.Number("nu") : double.PositiveInfinity);

    private static ToleranceInterval ToleranceOf(CheckRow row) => new(
        row.Has("TL") ? row.Number("TL") : double.NegativeInfinity,
        row.Has("TU") ? row.Number("TU") : double.PositiveInfinity);
}
