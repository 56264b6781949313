using LabWatch.Assessments;
using LabWatch.Assessments.Criteria;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Tests.Assessments.Cavities;

public sealed class EffectiveEmissivityCriterionTests
{
    private static readonly EffectiveEmissivityCriterion Criterion = new(EffectiveEmissivityCriterion.DefaultSchedule, DemoRun.Models);

    [Fact]
    public void Each_band_and_each_comparator_is_a_scope_whatever_the_readings()
    {
        Assert.Equal(["8-14", "comparator"], new CavityLab().Evaluate(Criterion).Select(result => result.Scope));
        Assert.Equal(["8-14", "comparator"], new CavityLab().Evaluate(Criterion, (_, _, _) => null).Select(result => result.Scope));
        ReferenceSource source = new CavityLab().Snapshot().Sources[0];
        Assert.Equal("8-14", Criterion.BandOf(source, "8-14"));
        Assert.Equal("8-14", Criterion.BandOf(source, "comparator"));
        Assert.Null(Criterion.BandOf(source, "well-front"));
    }

    [Fact]
    public void Without_a_baseline_the_design_value_serves_and_only_the_profile_is_uncertain()
    {
        CriterionResult result = Model(new CavityLab());
        Assert.Equal(Decision.Pass, result.Decision);
        Assert.Equal("/", result.Unit);
        Assert.Equal(Figure(result, "isothermal-emissivity"), Figure(result, "baseline-emissivity"));
        Assert.Equal(Math.Abs(Figure(result, "effective-emissivity") - Figure(result, "isothermal-emissivity")), result.Value.Value, 1e-12);
        Assert.True(result.Value.StandardUncertainty < result.Figures.Single(figure => figure.Name == "effective-emissivity").Value.StandardUncertainty);
        Assert.Contains("design value of an isothermal cavity, because no baseline is on record", result.Explanation, StringComparison.Ordinal);
        Assert.Contains("Method: ring kernels for diffuse walls", result.Explanation, StringComparison.Ordinal);
        Assert.Contains("the limit is 0.005; by simple acceptance it passes", result.Explanation, StringComparison.Ordinal);
    }

    [Fact]
    public void Of_the_baselines_on_record_the_one_with_the_nearest_set_point_serves()
    {
        Instant before = CavityLab.Noon - TimeSpan.FromDays(30);
        CavityLab lab = new()
        {
            Baselines =
            [
                new("8-14", 100, new(0.99, 0.001), "commissioning", before),
                new("8-14", 290, new(0.985, 0.001), "commissioning", before),
                new("8-14", 290, new(0.992, 0.001), "recalibration", before + TimeSpan.FromDays(1)),
                new("8-14", 300, new(0.5, 0.001), "a later one", CavityLab.Noon + TimeSpan.FromDays(1)),
            ],
        };
        CriterionResult result = Model(lab);
        Assert.Equal(0.992, Figure(result, "baseline-emissivity"));
        Assert.Equal(Decision.Fail, result.Decision);
        Assert.Contains("(recalibration, at 290.0 degC, 2026-11-02", result.Explanation, StringComparison.Ordinal);
        Assert.True(result.Value.StandardUncertainty > 0.001);
    }

    [Fact]
    public void The_parts_of_the_uncertainty_make_up_the_whole()
    {
        CriterionResult result = Model(new CavityLab());
        double squares = new[] { "u-wall-emissivity", "u-diffuse-fraction", "u-wells", "u-well-to-wall", "u-lip", "u-zones", "u-method" }.Sum(name => Math.Pow(Figure(result, name), 2));
        Assert.Equal(Math.Sqrt(squares), result.Figures.Single(figure => figure.Name == "effective-emissivity").Value.StandardUncertainty, 1e-9);
    }

    [Fact]
    public void A_comparator_gives_a_value_with_its_uncertainty()
    {
        CriterionResult result = Comparator(new CavityLab { EmissivityLimit = 0.02 });
        Assert.Equal(Decision.Pass, result.Decision);
        Assert.InRange(Figure(result, "comparator-emissivity"), 0.99, 1.001);
        Assert.Matches(
            @"comparator shows 299\.700 degC \(u = 0\.10 K, through cal-comparator@1\), -\d+ mK \(U = \d+ mK\) from the model; that is e_eff = 0\.99\d+ \(U = 0\.00\d+, k = 2\.00\) in the band 8-14",
            result.Explanation);
        Assert.DoesNotContain("calibrated against", result.Explanation, StringComparison.Ordinal);
    }

    [Fact]
    public void A_comparator_calibrated_against_this_source_shows_change_only_and_says_so() =>
        Assert.Contains(
            "It was calibrated against this very source, so it shows change only",
            Comparator(new CavityLab { CalibratedAgainst = CavityLab.Key }).Explanation,
            StringComparison.Ordinal);

    [Fact]
    public void Near_room_temperature_a_comparator_is_refused_with_the_numbers() => AssertNotDecided(
        Comparator(new CavityLab { SetPoint = 37, Bottom = 37, Middle = 37, Front = 37, Lip = 30, Comparator = 36.95, EmissivityLimit = 0.005 }),
        "comparator cannot tell: its u(T_rad) of 0.10 K at 36.95 degC, against surroundings of 23.0 degC, leaves U(e_eff) = 0.01");

    [Fact]
    public void A_closed_shutter_refuses_the_comparator_alone()
    {
        CavityLab lab = new() { Shutter = 0 };
        AssertNotDecided(Comparator(lab), "the shutter was closed in 180 of 180 readings");
        Assert.Equal(Decision.Pass, Model(lab).Decision);
    }

    [Fact]
    public void Under_range_and_a_missing_certificate_refuse_the_comparator()
    {
        AssertNotDecided(
            Assert.Single(new CavityLab { Comparator = -30 }.Evaluate(Criterion, (id, _, value) => (value, id == "comparator" ? ReadingQuality.OutsideSensorRange : ReadingQuality.None)), result => result.Scope == "comparator"),
            "180 of 180 readings of comparator have no value or one that it cannot give (-20 to 1000 Cel): its sign for under-range or saturation");
        AssertNotDecided(Comparator(new CavityLab { Uncertified = ["comparator"] }), "no certificate is in force for comparator");
    }

    [Fact]
    public void A_source_that_has_not_settled_is_judged_in_no_scope() =>
        Assert.All(new CavityLab { SetPoint = 350 }.Evaluate(Criterion), result => AssertNotDecided(result, "the source is not at its set point"));

    [Fact]
    public void Without_a_lip_the_shape_of_the_front_is_in_the_uncertainty()
    {
        CriterionResult with = Model(new CavityLab()), without = Assert.Single(
            new CavityLab().Evaluate(Criterion, (id, _, value) => id == "lip" ? null : (value, ReadingQuality.None)), result => result.Scope == "8-14");
        Assert.Contains("No lip thermometer gives a usable value", without.Explanation, StringComparison.Ordinal);
        Assert.True(Figure(without, "u-lip") >= Figure(with, "u-lip"));
        Assert.True(Figure(without, "effective-emissivity") > Figure(with, "effective-emissivity"));
    }

    [Fact]
    public void A_geometry_that_cannot_be_is_a_reason_and_no_crash()
    {
        CavityLab lab = new();
        Assert.All(
            (lab with { Cavity = lab.Cavity with { Shape = CavityShape.CylinderInwardCone, ConeHalfAngleDegree = 5 } }).Evaluate(Criterion),
            result => AssertNotDecided(result, "The re-entrant cone reaches the aperture plane"));
    }

    [Fact]
    public void The_same_input_gives_the_same_result_to_the_last_bit_with_a_model_traced_anew()
    {
        CavityLab lab = new() { Cavity = new CavityLab().Cavity with { Coating = [new("8-14", new(0.94, 0.006), new(0.9, 0.03))] } };
        EffectiveEmissivityCriterion anew = new(
            EffectiveEmissivityCriterion.DefaultSchedule,
            new LabWatch.Assessments.Cavities.CavityModels(new(null, Microsoft.Extensions.Logging.Abstractions.NullLogger<LabWatch.Assessments.Cavities.CavityTraces>.Instance)));
        foreach ((CriterionResult one, CriterionResult other) in lab.Evaluate(Criterion).Zip(lab.Evaluate(anew)))
        {
            Assert.Equal((one.Value, one.Explanation), (other.Value, other.Explanation));
            Assert.Equal(one.Figures, other.Figures);
        }
    }

    private static CriterionResult Model(CavityLab lab) => lab.Evaluate(Criterion)[0];

    private static CriterionResult Comparator(CavityLab lab) => lab.Evaluate(Criterion)[1];

    private static double Figure(CriterionResult result, string name) => CriterionResult.Figure(result.Figures, name);

    private static void AssertNotDecided(CriterionResult result, string reason)
    {
        Assert.Equal(Decision.NotDecided, result.Decision);
        Assert.Null(result.ConformityProbability);
        Assert.StartsWith("Not decided: ", result.Explanation, StringComparison.Ordinal);
        Assert.Contains(reason, result.Explanation, StringComparison.Ordinal);
    }
}
