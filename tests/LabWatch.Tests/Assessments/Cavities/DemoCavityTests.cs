using LabWatch.Assessments;
using LabWatch.Assessments.Criteria;
using LabWatch.Lab.Time;
using LabWatch.Metrology.Uncertainty;
using LabWatch.Simulator.Faults;
using LabWatch.Simulator.Radiance;
using LabWatch.Simulator.Sources;

namespace LabWatch.Tests.Assessments.Cavities;

/// <summary>
/// Both criteria on the simulated laboratory, whose hidden truth (coating, diffuse fraction, drops, errors of the sensors) and whose own model of the radiance share nothing with the
/// assessments.
/// </summary>
public sealed class DemoCavityTests
{
    /// <summary>Tuesday 2026-11-03T00:00:00Z.</summary>
    private static readonly Instant Tuesday = Instant.FromUnixSeconds(1_793_664_000);

    /// <summary>Thursday: every source stands at set points at which its comparators can tell.</summary>
    private static readonly Instant Thursday = Tuesday + TimeSpan.FromDays(2);

    private static readonly EffectiveEmissivityCriterion Emissivity = new(EffectiveEmissivityCriterion.DefaultSchedule, DemoRun.Models);
    private static readonly AxialUniformityCriterion Uniformity = new(AxialUniformityCriterion.DefaultSchedule, DemoRun.Models);

    [Fact]
    public void A_healthy_working_day_passes_wherever_it_is_decided_and_every_source_is_decided()
    {
        DemoRun run = new(5, Thursday);
        string[] sources = ["fir", "rowan", "yew", "hazel"];
        run.SkipUntil(Thursday + TimeSpan.FromHours(6));
        run.RunUntil(Thursday + TimeSpan.FromHours(17.5), sources);
        foreach (string source in sources)
        {
            List<CriterionResult> all = [];
            for (Instant end = Thursday + TimeSpan.FromHours(8); end <= Thursday + TimeSpan.FromHours(17.5); end += TimeSpan.FromMinutes(30))
            {
                all.AddRange(run.Evaluate(Uniformity, source, end));
                all.AddRange(run.Evaluate(Emissivity, source, end));
            }

            Assert.All(all.Where(result => result.Decision != Decision.NotDecided), result => Assert.True(result.Decision == Decision.Pass, $"{source}: {result.Explanation}"));
            foreach (string scope in all.Select(result => result.Scope).Distinct())
            {
                Assert.True(all.Any(result => result.Scope == scope && result.Decision == Decision.Pass), $"{source} {scope}: {all.Last(result => result.Scope == scope).Explanation}");
            }
        }
    }

    [Fact]
    public void A_fall_of_the_coating_shows_as_a_fall_of_the_comparators_emissivity_as_large_as_it_is()
    {
        const double Fall = 0.3;
        DemoRun run = new(2, Tuesday);
        run.SkipUntil(At(14));
        run.RunUntil(At(15.5), "rowan");
        Assert.Empty(run.Simulation.Inject(new FaultOrder("rowan", FaultKind.CoatingFall) { Size = Fall }));
        run.RunUntil(At(17), "rowan");

        foreach (string band in new[] { "8-14", "3-5" })
        {
            CriterionResult before = Of(run, "comparator-" + band, 15.5), after = Of(run, "comparator-" + band, 17);
            double truth = TrueEmissivity(run, band, Fall) - TrueEmissivity(run, band, 0);
            double found = Figure(after) - Figure(before), expanded = 2 * after.Value.StandardUncertainty;
            Assert.True(truth < -0.005);
            Assert.Equal(truth, found, expanded);

            // What both windows share (certificate, drop, surroundings, size-of-source effect) cancels in the change; noise and the drift between the windows are left.
            Assert.Equal(1, found / truth, 0.05);
            Assert.Equal(Decision.Pass, before.Decision);
            Assert.Equal(Decision.Fail, after.Decision);
        }
    }

    [Fact]
    public void The_comparators_error_that_nobody_knows_lies_inside_the_stated_uncertainty()
    {
        for (long seed = 11; seed < 15; seed++)
        {
            DemoRun run = new(seed, Tuesday);
            run.SkipUntil(At(11));
            run.RunUntil(At(13), "rowan");
            foreach (string band in new[] { "8-14", "3-5" })
            {
                CriterionResult result = Of(run, "comparator-" + band, 13);
                double difference = Figure(result) - CriterionResult.Figure(result.Figures, "effective-emissivity");

                // Three standard uncertainties: eight draws of the simulator's errors, one in 50 of which may lie outside of two.
                Assert.True(Math.Abs(difference) < 3 * result.Figures.Single(figure => figure.Name == "comparator-emissivity").Value.StandardUncertainty, result.Explanation);
            }
        }
    }

    [Fact]
    public void A_well_that_no_longer_fits_the_profile_fails_the_uniformity()
    {
        DemoRun run = new(3, Tuesday);
        run.SkipUntil(At(10.9));
        Assert.Empty(run.Simulation.Inject(new FaultOrder("rowan", FaultKind.ThermometerDrift) { Channel = "well-front", Size = -3 }));
        run.RunUntil(At(13), "rowan");
        CriterionResult result = Assert.Single(run.Evaluate(Uniformity, "rowan", At(13)));
        Assert.True(result.Decision == Decision.Fail, result.Explanation);
    }

    private static CriterionResult Of(DemoRun run, string scope, double hour) => run.Evaluate(Emissivity, "rowan", At(hour)).Single(result => result.Scope == scope);

    private static double Figure(CriterionResult result) => CriterionResult.Figure(result.Figures, "comparator-emissivity");

    /// <summary>Effective emissivity with the temperatures of now by the simulator's own model: what walls and plate emit, over a blackbody at the wall beside the reference well.</summary>
    private static double TrueEmissivity(DemoRun run, string band, double fall)
    {
        SourceSimulation source = run.Simulation.Sources.Single(candidate => candidate.Design.Id == "rowan");
        HiddenTruth truth = run.Simulation.Truth("rowan");
        CavityView view = new(SourceNetwork.Exchange(source.Design.Cavity), SourceNetwork.Rings, source.Design.Cavity.ConeHalfAngleDegree);
        view.Evaluate(truth.Emissivity[band] - fall, truth.DiffuseFraction);
        BandRadiance radiance = band == "8-14" ? new(8, 14) : new(3, 5);
        double own = view.PlateWeight * radiance.At(source.Network.Celsius(source.Network.Lip) + 273.15);
        for (int i = 0; i < view.Weights.Length; i++)
        {
            own += view.Weights[i] * radiance.At(source.Network.Celsius(i) + 273.15);
        }

        return own / radiance.At(source.Network.WallCelsius(190) + 273.15);
    }

    private static Instant At(double hour) => Tuesday + TimeSpan.FromHours(hour);
}
