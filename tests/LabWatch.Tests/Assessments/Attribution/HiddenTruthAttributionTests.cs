using LabWatch.Assessments;
using LabWatch.Assessments.Attribution;
using LabWatch.Assessments.Criteria;
using LabWatch.Assessments.Forecasts;
using LabWatch.Lab.Assessments;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;
using LabWatch.Metrology.Attribution;
using LabWatch.Simulator.Faults;
using LabWatch.Tests.Assessments.Cavities;

namespace LabWatch.Tests.Assessments.Attribution;

/// <summary>
/// Attribution on the simulated laboratory: five working days with nothing wrong, then a cause that only the simulator knows. Its own model of the radiance, its
/// hidden coating, drops and errors of the sensors share nothing with the assessments.
/// </summary>
public sealed class HiddenTruthAttributionTests
{
    /// <summary>Monday 2026-11-02T00:00:00Z.</summary>
    private static readonly Instant Monday = Instant.FromUnixSeconds(1_793_577_600);

    private static readonly EffectiveEmissivityCriterion Emissivity = new(EffectiveEmissivityCriterion.DefaultSchedule, DemoRun.Models);
    private static readonly AxialUniformityCriterion Uniformity = new(AxialUniformityCriterion.DefaultSchedule, DemoRun.Models);

    [Fact]
    public void Each_cause_that_only_the_simulator_knows_is_named_with_its_size_or_said_to_be_inseparable()
    {
        DemoRun run = new(4, Monday);
        List<TrackedPoint> reference = [.. ((int[])[0, 1, 2, 3, 4]).SelectMany(day => Day(run, day))];

        AttributionFinding healthy = Explain(run, [.. reference, .. Day(run, 7)]);
        Assert.True(healthy.Result!.Verdict == AttributionVerdict.NothingToExplain, healthy.Explanation);
        Assert.Equal(2, healthy.Observations.Select(one => one.Deviation.Band).Distinct().Count());

        // First order in a fall of 0.1 from 0.94, with the stated diffuse fraction: the true one (0.92 +- 0.02) and the convex response make the size larger by up to 0.08.
        AttributionFinding coating = With(run, reference, 8, new FaultOrder("rowan", FaultKind.CoatingFall) { Size = 0.1 });
        Assert.True(coating.Result!.Verdict == AttributionVerdict.Explained, coating.Explanation);
        Assert.Equal(CauseKind.CoatingEmissivity, Assert.Single(coating.Result.Suspects).Kind);
        Assert.InRange(coating.Result.Models[0].Sizes[0].Value, -0.18, -0.08);

        // The bands alone see no difference between a thermometer and a gradient: the other wells decide.
        AttributionFinding thermometer = With(run, reference, 10, new FaultOrder("rowan", FaultKind.ThermometerDrift) { Channel = "well-bottom", Size = 0.4 });
        Assert.True(thermometer.Result!.Verdict == AttributionVerdict.Explained, thermometer.Explanation);
        Assert.Equal(CauseKind.ThermometerError, Assert.Single(thermometer.Result.Suspects).Kind);
        Assert.Equal(0.4, thermometer.Result.Models[0].Sizes[0].Value, 0.08);

        AttributionFinding comparator = With(run, reference, 11, new FaultOrder("rowan", FaultKind.ComparatorDrift) { Channel = "comparator-3-5", Size = 0.8 });
        Assert.True(comparator.Result!.Verdict == AttributionVerdict.CannotBeToldApart, comparator.Explanation);
        Assert.Equal([CauseKind.ComparatorDrift, CauseKind.OneBandAbsorption], comparator.Result.Suspects.Select(cause => cause.Kind).Order());
        Assert.Contains(comparator.WouldSeparate, sentence => sentence.Contains("same comparator on another source", StringComparison.Ordinal));
    }

    private static AttributionFinding With(DemoRun run, List<TrackedPoint> reference, int day, FaultOrder fault)
    {
        run.SkipUntil(At(day, 0));
        Assert.Empty(run.Simulation.Inject(fault));
        AttributionFinding finding = Explain(run, [.. reference, .. Day(run, day)]);
        foreach (ActiveFault active in run.Simulation.ActiveFaults.ToList())
        {
            Assert.Empty(run.Simulation.Clear(active.Id));
        }

        return finding;
    }

    private static AttributionFinding Explain(DemoRun run, IEnumerable<TrackedPoint> points)
    {
        ReferenceSource source = run.Source("rowan");
        return Attributions.Of(run.Lab, source, DriftForecasts.Of(source, points), DemoRun.Models).Single(finding => finding.Basis == "change");
    }

    private static List<TrackedPoint> Day(DemoRun run, int day)
    {
        List<TrackedPoint> points = [];
        run.SkipUntil(At(day, 8));
        run.RunUntil(At(day, 17), "rowan");
        for (Instant end = At(day, 9); end <= At(day, 17); end += TimeSpan.FromMinutes(30))
        {
            points.AddRange(Judged(run, Emissivity, end).Concat(Judged(run, Uniformity, end)).SelectMany(assessment => TrackedPoints.Of(run.Source("rowan"), assessment)));
        }

        return points;
    }

    private static IEnumerable<Assessment> Judged(DemoRun run, ICriterion criterion, Instant end) =>
        run.Evaluate(criterion, "rowan", end).Select(result => new Assessment(
            run.Source("rowan").Key, criterion.Code, result.Scope, criterion.Schedule.EndingAt(end), 1, result.Value, result.Unit, result.Limit?.Maximum, result.CoverageFactor,
            result.Decision, result.ConformityProbability, result.Figures, result.Explanation, new Provenance("d", [], ["c@1"], null, "test"), end, null));

    private static Instant At(int day, double hour) => Monday + TimeSpan.FromDays(day) + TimeSpan.FromHours(hour);
}
