using LabWatch.Assessments;
using LabWatch.Assessments.Criteria;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Tests.Assessments.Cavities;

public sealed class AxialUniformityCriterionTests
{
    private static readonly AxialUniformityCriterion Criterion = new(AxialUniformityCriterion.DefaultSchedule, DemoRun.Models);
    private static readonly Instant WindowStart = CavityLab.Noon - TimeSpan.FromMinutes(30);

    [Fact]
    public void The_largest_difference_between_calibrated_wells_passes_with_numbers_and_units()
    {
        CriterionResult result = Evaluate(new CavityLab());
        Assert.Equal(Decision.Pass, result.Decision);
        Assert.Equal(1000, result.Value.Value, 1e-6);
        Assert.Equal(1000 * 0.01 * Math.Sqrt(2), result.Value.StandardUncertainty, 1e-9);
        Assert.Equal("mK", result.Unit);
        Assert.StartsWith(
            "Largest difference between calibrated wells is 1000 mK (U = 28 mK, k = 2.00); the limit is 1500 mK; by simple acceptance it passes. Probability of conformity 100.0 %. "
            + "well-bottom with 300.000 degC is the warmest, well-front with 299.000 degC the coldest; the gradient is 6.25 K/m (U = 0.18 K/m) towards the bottom. In the band 8-14 the profile changes e_eff by -0.",
            result.Explanation,
            StringComparison.Ordinal);
    }

    [Fact]
    public void The_gradient_is_the_slope_of_a_straight_line_through_the_wells()
    {
        // Ordinary least squares by hand: positions -80, 0, 80 mm from their middle, temperatures 299, 299.8, 300.
        Assert.Equal((80 * 300 - 80 * 299) / (2.0 * 80 * 80) * 1000, Figure(Evaluate(new CavityLab()), "gradient"), 1e-9);
    }

    [Fact]
    public void A_limit_in_kelvin_gives_the_value_in_kelvin_and_the_guard_band_its_words()
    {
        CavityLab lab = new() { UniformityLimit = 990, Rule = DecisionRule.GuardBand };
        CriterionResult result = Evaluate(lab);
        Assert.Equal(Decision.ConditionalFail, result.Decision);
        Assert.Contains("fails conditionally", result.Explanation, StringComparison.Ordinal);
    }

    [Fact]
    public void A_coarse_indicator_and_a_well_without_certificate_are_left_out_by_name()
    {
        CriterionResult result = Evaluate(new CavityLab { Indicator = 310, Uncertified = ["lip", "ambient", "well-middle"] });
        Assert.Equal(1000, result.Value.Value, 1e-6);
        Assert.Contains(
            "Left out: indicator, whose certificate states U = 0.20 K, against 0.020 K of the reference (k = 2); well-middle, for which no certificate is in force.",
            result.Explanation,
            StringComparison.Ordinal);
    }

    [Fact]
    public void Only_wells_of_the_uniform_zone_are_compared()
    {
        CavityLab lab = new();
        Assert.Equal(200, Evaluate(lab with { Cavity = lab.Cavity with { UniformZone = new AxialRange(100, 200) } }).Value.Value, 1e-6);
        AssertNotDecided(
            Evaluate(lab with { Cavity = lab.Cavity with { UniformZone = new AxialRange(180, 200) } }), "only well-bottom gives a temperature in the uniform zone, and two wells are needed");
    }

    [Fact]
    public void An_axial_fault_fails() => Assert.Equal(Decision.Fail, Evaluate(new CavityLab { Front = 297 }).Decision);

    [Fact]
    public void A_silent_well_is_no_pass() => AssertNotDecided(
        Evaluate(new CavityLab(), (id, time, value) => id == "well-front" && time > WindowStart ? null : (value, ReadingQuality.None)), "well-front gave 1 of 180 readings");

    [Fact]
    public void A_change_of_set_point_is_no_failure() => AssertNotDecided(
        Evaluate(new CavityLab(), (id, time, value) => (id == "set-point" && time < WindowStart ? 200 : value, ReadingQuality.None)),
        "the set point changed from 200 to 300 degC");

    [Fact]
    public void A_source_away_from_its_set_point_is_not_judged() =>
        AssertNotDecided(Evaluate(new CavityLab { SetPoint = 350 }), "the source is not at its set point: it stands at 300 degC");

    [Fact]
    public void Without_a_certificate_for_the_reference_nothing_is_judged() =>
        AssertNotDecided(Evaluate(new CavityLab { Uncertified = ["well-bottom"] }), "no certificate is in force for well-bottom");

    [Fact]
    public void Readings_outside_a_certificate_are_not_judged() => AssertNotDecided(
        Evaluate(new CavityLab { Front = 601 }), "180 of 180 readings of well-front lie outside the range of its certificate (-50 to 600 degC)");

    [Fact]
    public void Scatter_within_the_window_counts_with_its_few_degrees_of_freedom()
    {
        CriterionResult result = Evaluate(
            new CavityLab { WellUncertainty = 1e-4 }, (id, time, value) => (id == "well-front" ? value + (0.1 * Math.Sin((time - WindowStart).TotalMinutes / 4)) : value, ReadingQuality.None));
        Assert.True(result.Value.StandardUncertainty > 10);
        Assert.InRange(result.Value.DegreesOfFreedom, 4.9, 5.1);
        Assert.InRange(result.CoverageFactor, 2.5, 2.7);
    }

    [Fact]
    public void It_applies_to_sources_with_two_wells_and_reads_no_comparator()
    {
        ReferenceSource source = new CavityLab().Snapshot().Sources[0];
        Assert.Equal(["well-bottom", "well-middle", "well-front", "indicator", "set-point", "lip", "ambient"], Criterion.Channels(source));
        Assert.Empty(Criterion.Channels(source with { Channels = [source.Channels[0], source.Channels[4]] }));
    }

    private static CriterionResult Evaluate(CavityLab lab, Func<string, Instant, double, (double Value, ReadingQuality Quality)?>? change = null) =>
        Assert.Single(lab.Evaluate(Criterion, change));

    private static double Figure(CriterionResult result, string name) => CriterionResult.Figure(result.Figures, name);

    private static void AssertNotDecided(CriterionResult result, string reason)
    {
        Assert.Equal(Decision.NotDecided, result.Decision);
        Assert.Null(result.ConformityProbability);
        Assert.StartsWith("Not decided: ", result.Explanation, StringComparison.Ordinal);
        Assert.Contains(reason, result.Explanation, StringComparison.Ordinal);
    }
}
