using LabWatch.Assessments;
using LabWatch.Assessments.Budgets;
using LabWatch.Assessments.Criteria;
using LabWatch.Lab;
using LabWatch.Lab.Assessments;
using LabWatch.Lab.Limits;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;
using LabWatch.Metrology.Radiometry;
using LabWatch.Metrology.Uncertainty;
using LabWatch.Tests.Assessments.Cavities;

namespace LabWatch.Tests.Assessments.Budgets;

public sealed class BudgetCriterionTests
{
    private static readonly BudgetCriterion Criterion = new(BudgetCriterion.DefaultSchedule, DemoRun.Models);

    [Fact]
    public void The_lines_combine_by_the_root_of_their_squares_with_the_coverage_factor_of_their_freedom()
    {
        CriterionResult result = Evaluate(new CavityLab(), claimed: [new("reference-drift", 0.05, 12, DistributionShape.Normal, "test")]);

        double[] lines = [.. result.Figures.Where(figure => BudgetFigures.LineOf(figure.Name) is not null).Select(figure => figure.Value.Value)];
        double combined = Math.Sqrt(lines.Sum(line => line * line));
        Assert.Equal(9, lines.Length);
        Assert.Equal(combined, Figure(result, "radiance-temperature").StandardUncertainty * 1000, 1e-6);

        // Welch-Satterthwaite by hand (JCGM 100:2008, equation G.2b): only the claimed line has finite degrees of freedom, since the readings do not scatter.
        double freedom = Math.Pow(combined, 4) / (Math.Pow(50, 4) / 12);
        Assert.Equal(freedom, Figure(result, "effective-degrees-of-freedom").Value, freedom * 1e-6);
        Assert.Equal(CoverageFactor.For(freedom) * combined, result.Value.Value, 1e-6);
    }

    [Fact]
    public void The_coating_counts_as_by_hand_for_a_flat_plate()
    {
        // A plate at 300 degC, e = 0.95: T_rad by Planck at 10 um; u(e) = 0.01 moves e L(T) + (1 - e) L(T_bg) by u (L(T) - L(T_bg)).
        CavityLab lab = new() { Cavity = new(CavityShape.FlatPlate, 50, 0, null, 50, [new("8-14", new(0.95, 0.01), new(1, 0))]), Middle = 300, Front = 300, Lip = 300 };
        CriterionResult result = Evaluate(lab, []);

        RadianceBand band = RadianceBand.Of(8, 14);
        double own = band.Radiance(573.15), around = band.Radiance(296.15), seen = (0.95 * own) + (0.05 * around);
        double expected = 0.01 * (own - around) / band.RadianceSlope(band.Temperature(seen)) * 1000;
        Assert.Equal(expected, Figure(result, "u-coating-emissivity").Value, expected * 2e-3);
    }

    [Fact]
    public void What_is_measured_counts_and_what_is_claimed_for_it_is_told_beside_it()
    {
        CriterionResult result = Evaluate(new CavityLab(), [new("surroundings", 1e-6, double.PositiveInfinity, DistributionShape.Normal, "test")]);

        Assert.True(Figure(result, "u-surroundings").Value > 1e-3);
        Assert.Equal(1e-3, Figure(result, "claimed-surroundings").Value, 1e-12);
        Assert.Contains("Above what is claimed: surroundings", result.Explanation, StringComparison.Ordinal);
    }

    [Fact]
    public void A_claim_for_another_band_or_range_does_not_count()
    {
        ClaimedUncertainty claim = new("absorption", 1, double.PositiveInfinity, DistributionShape.Normal, "test");
        Assert.DoesNotContain(Evaluate(new CavityLab(), [claim with { MaximumCelsius = 200 }]).Figures, figure => figure.Name == "claimed-u-absorption");
        Assert.DoesNotContain(Evaluate(new CavityLab(), [claim with { Band = "3-5" }]).Figures, figure => figure.Name == "claimed-u-absorption");
        Assert.Contains(Evaluate(new CavityLab(), [claim with { Band = "8-14" }]).Figures, figure => figure.Name == "claimed-u-absorption");
    }

    [Fact]
    public void Above_the_cmc_it_fails_and_says_what_to_report_and_below_never_less_than_the_cmc()
    {
        double live = Evaluate(new CavityLab(), []).Value.Value;

        CriterionResult fails = Evaluate(new CavityLab(), [], cmc: live / 2), passes = Evaluate(new CavityLab(), [], cmc: live * 2);

        Assert.Equal(Decision.Fail, fails.Decision);
        Assert.Contains("does not hold: report at least", fails.Explanation, StringComparison.Ordinal);
        Assert.Equal(Decision.Pass, passes.Decision);
        Assert.Contains("never the smaller live value", passes.Explanation, StringComparison.Ordinal);
        Assert.Contains("The largest contribution is ", passes.Explanation, StringComparison.Ordinal);
    }

    [Fact]
    public void Propagation_of_distributions_agrees_where_the_radiance_is_nearly_linear_and_not_where_it_is_not()
    {
        CavityLab lab = new();
        Assert.True(Check(lab, []).Agrees);

        // A claim of 60 K at 300 degC: the inverse of Planck's law is far from straight over that, so that the interval leans to one side.
        Assert.False(Check(lab with { Cavity = new(CavityShape.FlatPlate, 50, 0, null, 50, [new("8-14", new(0.5, 0.25), new(1, 0))]), Lip = 300 }, []).Agrees);
    }

    private static BudgetCheck Check(CavityLab lab, IReadOnlyList<ClaimedUncertainty> claimed)
    {
        CriterionResult result = Evaluate(lab, claimed);
        Assessment assessment = new(
            CavityLab.Key, CriterionCode.Budget, result.Scope, Criterion.Schedule.EndingAt(CavityLab.Noon), 1, result.Value, result.Unit, null, result.CoverageFactor, result.Decision, null,
            result.Figures, result.Explanation, new Provenance("d", [], [], null, "test"), CavityLab.Noon, null);
        return BudgetCheck.Of(lab.Snapshot().Sources[0], assessment)!;
    }

    private static CriterionResult Evaluate(CavityLab lab, IReadOnlyList<ClaimedUncertainty> claimed, double? cmc = null)
    {
        LabSnapshot made = lab.Snapshot();
        ReferenceSource source = made.Sources[0] with { Claimed = claimed };
        LabSnapshot snapshot = new(
            made.Site, [source], made.Instruments, made.Installations, made.Certificates,
            [.. made.Limits, .. cmc is { } limit ? [new AcceptanceLimit("cmc", 1, CavityLab.Key, CriterionCode.Budget, limit, "mK", DecisionRule.SimpleAcceptance, TestLab.LongAgo)] : Array.Empty<AcceptanceLimit>()],
            []);
        TimeWindow window = Criterion.Schedule.EndingAt(CavityLab.Noon);
        return Assert.Single(Criterion.Evaluate(new CriterionInput(snapshot, source, window, lab.Readings(Criterion.Schedule.SpanOf(window)))));
    }

    private static Estimate Figure(CriterionResult result, string name) => result.Figures.Single(figure => figure.Name == name).Value;
}
