using LabWatch.Assessments;
using LabWatch.Assessments.Criteria;
using LabWatch.Assessments.Criteria.BalanceParts;
using LabWatch.Lab.Instruments;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;
using LabWatch.Metrology.Statistics;
using LabWatch.Metrology.Uncertainty;
using LabWatch.Simulator.Faults;
using LabWatch.Tests.Assessments.Cavities;

namespace LabWatch.Tests.Assessments;

/// <summary>Heater power and redundant thermometers against the simulator, whose heat balance, drifts and damage share nothing with the assessments.</summary>
public sealed class BalanceCriteriaTests
{
    /// <summary>Saturday 2026-11-07: rowan stands at 300 degC all day, its shutter closed.</summary>
    private static readonly Instant Saturday = Instant.FromUnixSeconds(1_794_009_600);
    private static readonly HeaterBalanceCriterion Heater = new(HeaterBalanceCriterion.DefaultSchedule);
    private static readonly ReferenceAgreementCriterion Agreement = new(ReferenceAgreementCriterion.DefaultSchedule);

    [Fact]
    public void Charts_call_a_steady_source_changed_once_in_a_year_of_ten_minute_values_or_less_often()
    {
        // Mean run lengths by the integral equation (Page 1954; Crowder 1987), which has its own tests against published values.
        const double Year = 365 * 24 * 6;
        Assert.InRange(RunLength.OfEwma(BalanceChart.Lambda, BalanceChart.EwmaLimit, 0), Year, 2 * Year);
        Assert.InRange(RunLength.OfTwoSidedCusum(BalanceChart.Reference, BalanceChart.Interval, 0), Year, 2 * Year);
        // A shift of one standard deviation is found within four hours on average.
        Assert.InRange(RunLength.OfTwoSidedCusum(BalanceChart.Reference, BalanceChart.Interval, 1), 1, 24);
    }

    [Fact]
    public void Damage_to_the_insulation_shows_as_the_power_that_it_takes_and_is_dated()
    {
        DemoRun run = new(4, Saturday);
        run.RunUntil(Saturday + TimeSpan.FromHours(20), "rowan");
        Instant damaged = run.Simulation.Now;
        CriterionResult before = run.Evaluate(Heater, "rowan", damaged)[0];
        Assert.True(before.Decision is Decision.Pass, before.Explanation);
        Assert.Contains("Control charts of the residuals show no change", before.Explanation, StringComparison.Ordinal);

        const double Bridge = 0.1;
        Assert.Empty(run.Simulation.Inject(new FaultOrder("rowan", FaultKind.InsulationDamage) { Size = Bridge }));
        run.RunUntil(Saturday + TimeSpan.FromHours(24), "rowan");
        CriterionResult after = run.Evaluate(Heater, "rowan", Saturday + TimeSpan.FromHours(24))[0];

        // The thermal bridge carries 0.1 W/K from the heater (somewhat above the 300 degC of the cavity) to the outer case at about 33 degC; what no longer flows through the insulation is small.
        Assert.Equal(Bridge * (300 - 33), after.Value.Value, 0.12 * Bridge * (300 - 33));
        Assert.Equal(Decision.Fail, after.Decision);
        Assert.Equal("W", after.Unit);
        Assert.Equal((Saturday + TimeSpan.FromHours(24) - damaged).TotalHours, Figure(after, "changed-hours-ago"), 0.5);
        Assert.Contains("Control charts of the residuals show a change, likeliest at 2026-11-07 20:", after.Explanation, StringComparison.Ordinal);
    }

    [Theory]
    [InlineData("well-middle")]
    [InlineData("well-bottom")]
    public void A_thermometer_that_shifts_is_told_by_its_size_whichever_of_the_two_it_is(string channel)
    {
        const double Shift = 0.1;
        DemoRun run = new(1, Saturday);
        run.RunUntil(Saturday + TimeSpan.FromHours(18), "rowan");
        CriterionResult before = run.Evaluate(Agreement, "rowan", Saturday + TimeSpan.FromHours(18))[0];
        Assert.Equal("well-middle", before.Scope);
        Assert.True(before.Decision is Decision.Pass, before.Explanation);
        Assert.Empty(run.Simulation.Inject(new FaultOrder("rowan", FaultKind.ThermometerDrift) { Channel = channel, Size = Shift }));
        run.RunUntil(Saturday + TimeSpan.FromHours(22), "rowan");
        CriterionResult after = run.Evaluate(Agreement, "rowan", Saturday + TimeSpan.FromHours(22))[0];

        double sign = channel == "well-middle" ? 1 : -1;
        Assert.Equal(sign * Shift, Figure(after, "residual") - Figure(before, "residual"), 3 * (before.Value.StandardUncertainty + after.Value.StandardUncertainty) / 1000);
        Assert.Equal(Decision.Fail, after.Decision);
        Assert.Equal("mK", after.Unit);
    }

    [Fact]
    public void A_thermometer_calibrated_since_needs_a_new_baseline()
    {
        DemoRun run = new(1, Saturday);
        run.RunUntil(Saturday + TimeSpan.FromHours(12), "hazel");
        Certificate recent = run.Lab.Certificates.Single(certificate => certificate.Instrument == "prt-402") with { Id = "cert-prt-402-b", ValidFrom = Saturday - TimeSpan.FromDays(5) };
        LabWatch.Lab.LabSnapshot lab = new(run.Lab.Site, run.Lab.Sources, run.Lab.Instruments, run.Lab.Installations, [.. run.Lab.Certificates, recent], run.Lab.Limits, run.Lab.Notifiers);
        TimeWindow window = Agreement.Schedule.EndingAt(Saturday + TimeSpan.FromHours(12));
        ReferenceSource source = run.Source("hazel");
        CriterionResult result = Agreement.Evaluate(new(lab, source, window, run.Read("hazel", Agreement.Channels(source), Agreement.Schedule.SpanOf(window))))[0];
        Assert.Equal(Decision.NotDecided, result.Decision);
        Assert.Contains("well-middle has been calibrated or exchanged since the baseline was learnt", result.Explanation, StringComparison.Ordinal);
        Assert.Equal(Decision.Pass, run.Evaluate(Agreement, "hazel", Saturday + TimeSpan.FromHours(12))[0].Decision);
    }

    [Fact]
    public void What_is_learnt_from_days_in_order_predicts_the_day_after()
    {
        Instant start = Saturday + TimeSpan.FromDays(2);
        DemoRun run = new(9, start);
        run.RunUntil(start + TimeSpan.FromDays(4), "hazel");
        ReferenceSource source = run.Source("hazel");
        BalanceLearning learning = new(run.Lab, source, source.FindChannel("heater-power")!);
        for (int day = 0; day < 3; day++)
        {
            TimeWindow part = new(start + TimeSpan.FromDays(day), start + TimeSpan.FromDays(day + 1));
            learning.Add(part, run.Read("hazel", learning.Channels, part));
        }

        LearntBalance balance = learning.Learn()!;
        Assert.Contains(balance.Terms, term => term.Kind is BalanceTermKind.RadiationOpen);
        Assert.Equal(64, balance.ReadingsDigest!.Length);
        Assert.InRange(balance.ResidualDeviation, 1e-4, 0.01);
        TimeWindow last = new(start + TimeSpan.FromDays(3), start + TimeSpan.FromDays(4));
        BalanceBlocks blocks = BalanceBlocks.Of(run.Lab, source, source.FindChannel("heater-power")!, last, run.Read("hazel", learning.Channels, last));
        BalanceResiduals residuals = BalanceResiduals.Of(balance, blocks, last);
        Assert.InRange(residuals.Values.Count, 80, 108);
        Assert.All(residuals.Values, value => Assert.InRange(value.Value, -8 * balance.ResidualDeviation, 8 * balance.ResidualDeviation));
    }

    [Fact]
    public void A_source_without_a_learnt_balance_is_not_judged()
    {
        ReferenceSource bare = new DemoRun(1, Saturday).Source("rowan") with { Balances = [] };
        Assert.Empty(Heater.Channels(bare));
        Assert.Empty(Agreement.Channels(bare));
        Assert.Empty(new BalanceLearning(TestLab.Snapshot(), bare, bare.ReferenceChannel!).Channels);
    }

    private static double Figure(CriterionResult result, string name) => CriterionResult.Figure(result.Figures, name);
}
