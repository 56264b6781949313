using LabWatch.Assessments;
using LabWatch.Assessments.Criteria;
using LabWatch.Lab.Time;
using LabWatch.Metrology.Uncertainty;
using LabWatch.Simulator;
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
    /// <summary>Tuesday 2026-11-03T00:00:00Z: all four sources are in use.</summary>
    private static readonly Instant Tuesday = Instant.FromUnixSeconds(1_793_664_000);

    private static readonly EffectiveEmissivityCriterion Emissivity = new(EffectiveEmissivityCriterion.DefaultSchedule, DemoRun.Models);
    private static readonly AxialUniformityCriterion Uniformity = new(AxialUniformityCriterion.DefaultSchedule, DemoRun.Models);

    [Fact]
    public void A_healthy_working_day_passes_wherever_it_is_decided_and_every_source_is_decided()
    {
        DemoRun run = new(5, Tuesday);
        string[] sources = ["fir", "rowan", "yew", "hazel"];
        run.SkipUntil(At(6));
        run.RunUntil(At(17.5), sources);
        foreach (string source in sources)
        {
            CriterionResult[] all = [.. Ends(8, 17.5).SelectMany(end => run.Evaluate(Uniformity, source, end).Concat(run.Evaluate(Emissivity, source, end)))];
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
            double emissivity = run.Simulation.Truth("rowan").Emissivity[band], diffuse = run.Simulation.Truth("rowan").DiffuseFraction;
            double truth = TrueEmissivity(emissivity - Fall, diffuse) - TrueEmissivity(emissivity, diffuse);
            double found = Figure(after) - Figure(before), expanded = 2 * after.Value.StandardUncertainty;
            Assert.True(truth < -0.005);
            Assert.Equal(truth, found, expanded);

            // What both windows share (certificate, drop, surroundings) cancels in the change; the zones of the two models differ.
            Assert.Equal(1, found / truth, 0.1);
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

    /// <summary>Isothermal effective emissivity by the simulator's own model: one minus what it reflects of room and plate.</summary>
    private static double TrueEmissivity(double emissivity, double diffuseFraction)
    {
        CavityDesign cavity = DemoLab.Designs.Single(design => design.Id == "rowan").Cavity;
        CavityView view = new(SourceNetwork.Exchange(cavity), SourceNetwork.Rings, cavity.ConeHalfAngleDegree);
        view.Evaluate(emissivity, diffuseFraction);
        return 1 - view.BackgroundWeight - view.PlateWeight;
    }

    private static Instant At(double hour) => Tuesday + TimeSpan.FromHours(hour);

    private static IEnumerable<Instant> Ends(double from, double until)
    {
        for (double hour = from; hour <= until; hour += 0.5)
        {
            yield return At(hour);
        }
    }
}
