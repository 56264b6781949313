using LabWatch.Metrology.Attribution;
using LabWatch.Metrology.Radiometry;
using LabWatch.Metrology.Tests.Checks;
using LabWatch.Metrology.Tests.Statistics;
using Xunit;

namespace LabWatch.Metrology.Tests.Attribution;

public sealed class CombinationChecks : CheckSuiteTests<CombinationSuite>;

public sealed class AttributionTests
{
    private static readonly double[] Wavelengths = [0.9, 1.6, 3.9];

    [Fact]
    public void Deviations_like_chance_need_no_explanation()
    {
        AttributionResult result = DeviationAttribution.Explain(Deviations("rowan", "thermo", 773, new SimulatedNoise(1), _ => 0));

        Assert.Equal(AttributionVerdict.NothingToExplain, result.Verdict);
        Assert.Empty(result.Suspects);
    }

    [Fact]
    public void A_fall_of_emissivity_is_named_with_its_size()
    {
        AttributionResult result = DeviationAttribution.Explain(
            Deviations("rowan", "thermo", 773, new SimulatedNoise(2), d => -0.03 * d.KelvinPerEmissivity));

        Assert.Equal(AttributionVerdict.Explained, result.Verdict);
        Cause cause = Assert.Single(result.Suspects);
        Assert.Equal(CauseKind.CoatingEmissivity, cause.Kind);
        Assert.Equal(-0.03, result.Models[0].Sizes[0].Value, 4 * result.Models[0].Sizes[0].StandardUncertainty);
    }

    [Fact]
    public void A_thermometer_error_and_a_gradient_of_the_same_pattern_cannot_be_told_apart()
    {
        AttributionResult result = DeviationAttribution.Explain(Deviations("rowan", "thermo", 773, new SimulatedNoise(3), _ => -0.15));

        Assert.Equal(AttributionVerdict.CannotBeToldApart, result.Verdict);
        Assert.Contains(result.Suspects, cause => cause.Kind == CauseKind.ThermometerError);
        Assert.Contains(result.Suspects, cause => cause.Kind == CauseKind.Gradient);
        Assert.Contains(result.Alike, pair => pair.First.Kind == CauseKind.ThermometerError && pair.Second.Kind == CauseKind.Gradient);
        Assert.DoesNotContain(result.Suspects, cause => cause.Kind == CauseKind.CoatingEmissivity);
    }

    [Fact]
    public void One_band_of_one_source_is_comparator_or_absorption_and_nobody_can_say_which()
    {
        AttributionResult result = DeviationAttribution.Explain(
            Deviations("rowan", "thermo", 773, new SimulatedNoise(4), d => d.Band == "3.9" ? -0.01 * d.KelvinPerSignal : 0));

        Assert.Equal(AttributionVerdict.CannotBeToldApart, result.Verdict);
        Assert.All(result.Suspects.Take(2), cause => Assert.True(cause.Kind is CauseKind.ComparatorDrift or CauseKind.OneBandAbsorption));
        Assert.Equal(result.Inclusion[0].Probability, result.Inclusion[1].Probability, 1e-9);
    }

    [Fact]
    public void The_same_comparator_on_other_sources_decides_that_it_drifted()
    {
        var noise = new SimulatedNoise(5);
        double Drift(BandDeviation d) => d.Band == "3.9" ? -0.01 * d.KelvinPerSignal : 0;
        AttributionResult result = DeviationAttribution.Explain(
        [
            .. Deviations("rowan", "thermo", 773, noise, Drift),
            .. Deviations("yew", "thermo", 1273, noise, Drift),
            .. Deviations("oak", "thermo", 600, noise, Drift),
        ]);

        Assert.Equal(AttributionVerdict.Explained, result.Verdict);
        Assert.Equal(new Cause(CauseKind.ComparatorDrift, "thermo", "3.9"), Assert.Single(result.Suspects));
    }

    [Fact]
    public void The_same_comparator_on_other_sources_decides_that_the_source_absorbs()
    {
        var noise = new SimulatedNoise(6);
        AttributionResult result = DeviationAttribution.Explain(
        [
            .. Deviations("rowan", "thermo", 773, noise, d => d.Band == "3.9" ? -0.01 * d.KelvinPerSignal : 0),
            .. Deviations("yew", "thermo", 1273, noise, _ => 0),
            .. Deviations("oak", "thermo", 600, noise, _ => 0),
        ]);

        Assert.Equal(AttributionVerdict.Explained, result.Verdict);
        Assert.Equal(new Cause(CauseKind.OneBandAbsorption, "rowan", "3.9"), Assert.Single(result.Suspects));
    }

    [Fact]
    public void What_no_candidate_makes_is_unexplained()
    {
        double[] shape = [0.9, -1.1, 1.0, -0.9, 1.1];
        BandDeviation[] deviations = [.. shape.Select((kelvin, i) => new BandDeviation("rowan", "thermo", "b" + i, kelvin, 0.01, 10 + i, 1, 100))];

        Assert.Equal(AttributionVerdict.Unexplained, DeviationAttribution.Explain(deviations).Verdict);
    }

    [Fact]
    public void Probabilities_add_to_one_and_a_shared_error_takes_certainty_away()
    {
        BandDeviation[] deviations = Deviations("rowan", "thermo", 773, new SimulatedNoise(7), _ => -0.08);
        double[,] shared = GeneralisedFit.Independent([.. deviations.Select(d => d.StandardUncertainty)]);
        foreach (int i in Enumerable.Range(0, deviations.Length))
        {
            foreach (int j in Enumerable.Range(0, deviations.Length)) shared[i, j] += 0.05 * 0.05;
        }

        AttributionResult independent = DeviationAttribution.Explain(deviations), common = DeviationAttribution.Explain(deviations, covariance: shared);

        Assert.Equal(1, independent.Models.Sum(model => model.Probability), 1e-9);
        Assert.True(common.Models.Single(model => model.Causes.Count == 0).Probability > independent.Models.Single(model => model.Causes.Count == 0).Probability);
    }

    private static BandDeviation[] Deviations(string source, string comparator, double kelvin, SimulatedNoise noise, Func<BandDeviation, double> effect) =>
    [
        .. Wavelengths.Select(micrometre =>
        {
            double perSignal = PlanckLaw.EmissivitySensitivity(micrometre, kelvin);
            // Through a cavity a tenth of a change of the wall's emissivity arrives.
            var bare = new BandDeviation(
                source, comparator, micrometre.ToString(System.Globalization.CultureInfo.InvariantCulture), 0, 0.02, 0.1 * perSignal, 0.9, perSignal);
            return bare with { Kelvin = effect(bare) + 0.02 * noise.Normal() };
        }),
    ];
}
