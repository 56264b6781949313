using LabWatch.Assessments;
using LabWatch.Assessments.Readiness;
using LabWatch.Lab;
using LabWatch.Lab.Alerts;
using LabWatch.Lab.Assessments;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Time;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Tests.Assessments;

public sealed class ReadinessEvaluatorTests
{
    private static readonly Instant Now = TestLab.Noon + TimeSpan.FromMinutes(35);

    [Fact]
    public void At_its_set_point_stable_certified_and_without_hazard_it_is_ready()
    {
        SourceReadiness readiness = Judge(Newest(), [Stability(Decision.Pass)]);
        Assert.Equal(ReadinessState.Ready, readiness.State);
        Assert.DoesNotContain(readiness.Reasons, reason => reason.Blocks);
        Assert.Contains(readiness.Reasons, reason => reason.Text == "It stands at 300.01 degC; the set point is 300 degC.");
        Assert.Contains(readiness.Reasons, reason => reason.Code == "stability" && reason.Text == "Half-range is 4 mK.");
    }

    [Fact]
    public void A_conditional_pass_does_not_stand_against_ready() =>
        Assert.Equal(ReadinessState.Ready, Judge(Newest(), [Stability(Decision.ConditionalPass)]).State);

    [Theory]
    [InlineData(Decision.Fail)]
    [InlineData(Decision.ConditionalFail)]
    public void A_failed_stability_makes_it_not_fit(Decision decision)
    {
        SourceReadiness readiness = Judge(Newest(), [Stability(decision)]);
        Assert.Equal(ReadinessState.NotFit, readiness.State);
        Assert.Equal("stability", readiness.Reasons[0].Code);
    }

    [Theory]
    [InlineData(250, 300, 900, ReadinessState.Heating, "It stands at 250 degC, 50 K below the set point of 300 degC.")]
    [InlineData(350, 300, 0, ReadinessState.Cooling, "It stands at 350 degC, 50 K above the set point of 300 degC.")]
    [InlineData(250, 300, 0, ReadinessState.Off, "It stands at 250 degC, 50 K below the set point of 300 degC, and the heater is off.")]
    public void On_its_way_it_says_where_it_stands(double celsius, double setPoint, double watt, ReadinessState expected, string text)
    {
        SourceReadiness readiness = Judge(Newest(celsius, setPoint, watt), [Stability(Decision.Pass, setPoint: 200)]);
        Assert.Equal(expected, readiness.State);
        Assert.Contains(readiness.Reasons, reason => reason.Text == text);
        Assert.Contains(readiness.Reasons, reason => reason.Text == "Its stability was last assessed at 200 degC, not at 300 degC.");
    }

    [Fact]
    public void Off_without_a_set_point_still_tells_how_hot_it_is()
    {
        SourceReadiness readiness = Judge([new(TestLab.Well, Now, 180), new("heater", Now, 0)], []);
        Assert.Equal(ReadinessState.Off, readiness.State);
        Assert.Contains(readiness.Reasons, reason => reason.Text.Contains("well-1 reads 180 degC", StringComparison.Ordinal));
    }

    [Fact]
    public void At_its_set_point_without_a_decision_it_is_settling_and_says_why()
    {
        Assert.Equal("Its stability has not been assessed yet.", Blocking(Judge(Newest(), [])));
        Assert.Equal("Half-range is 4 mK.", Blocking(Judge(Newest(), [Stability(Decision.NotDecided)])));
        Assert.Equal("The latest assessment of its stability is 4.0 h old.", Blocking(Judge(Newest(), [Stability(Decision.Pass)], now: TestLab.Noon + TimeSpan.FromHours(4.5))));
        Assert.Equal("Its stability was last assessed at 200 degC, not at 300 degC.", Blocking(Judge(Newest(), [Stability(Decision.Pass, 200)])));
    }

    [Fact]
    public void Without_readings_or_with_old_ones_it_is_unknown()
    {
        SourceReadiness none = Judge([], [Stability(Decision.Pass)]);
        Assert.Equal(ReadinessState.Unknown, none.State);
        Assert.Equal("There is no reading of well-1 yet.", Blocking(none, ReadinessState.Unknown));
        SourceReadiness old = Judge([.. Newest().Select(reading => reading with { Time = Now - TimeSpan.FromMinutes(12) })], [], now: Now);
        Assert.Equal("The newest reading of well-1 is 12 min old.", Blocking(old, ReadinessState.Unknown));
    }

    [Fact]
    public void An_overdue_certificate_makes_it_not_fit_even_while_it_heats()
    {
        SourceReadiness readiness = Judge(
            Newest(250, 300, 900), [Stability(Decision.Pass)], TestLab.Snapshot([TestLab.IndicatorCertificate with { DueAt = Now - TimeSpan.FromDays(4) }]));
        Assert.Equal(ReadinessState.NotFit, readiness.State);
        Assert.Contains(readiness.Reasons, reason => reason.Blocks && reason.Text == "Certificate HV-2026-11 of well-1 has been overdue for 4 days.");
        Assert.Contains(readiness.Reasons, reason => reason.Code == "at-temperature");
    }

    [Fact]
    public void A_certificate_that_is_due_soon_is_told_and_does_not_block()
    {
        SourceReadiness readiness = Judge(
            Newest(), [Stability(Decision.Pass)], TestLab.Snapshot([TestLab.IndicatorCertificate with { DueAt = Now + TimeSpan.FromDays(9) }]));
        Assert.Equal(ReadinessState.Ready, readiness.State);
        Assert.Contains(readiness.Reasons, reason => reason.Text == "Certificate HV-2026-11 of well-1 is due in 9 days.");
    }

    [Fact]
    public void A_set_point_outside_the_certificate_makes_it_not_fit() =>
        Assert.Equal(
            "300 degC is outside the range of certificate HV-2026-11 of well-1 (100 to 290 degC).",
            Blocking(Judge(Newest(), [Stability(Decision.Pass)], TestLab.Snapshot([TestLab.IndicatorCertificate with { MaximumCelsius = 290 }])), ReadinessState.NotFit));

    [Theory]
    [InlineData(HazardCode.HotSurface, ReadinessState.Ready)]
    [InlineData(HazardCode.HazardSilent, ReadinessState.Ready)]
    [InlineData(HazardCode.PurgeLost, ReadinessState.NotFit)]
    [InlineData(HazardCode.CutoutTripped, ReadinessState.NotFit)]
    public void Hazards_are_told_and_those_that_spoil_the_measurement_block(string code, ReadinessState expected)
    {
        SourceReadiness readiness = Judge(Newest(), [Stability(Decision.Pass)], alerts: [Hazard(code)]);
        Assert.Equal(expected, readiness.State);
        Assert.Contains(readiness.Reasons, reason => reason.Code == code && reason.Text == "Told in one line.");
    }

    [Fact]
    public void A_hazard_that_has_gone_away_does_not_block() =>
        Assert.Equal(
            ReadinessState.Ready, Judge(Newest(), [Stability(Decision.Pass)], alerts: [Hazard(HazardCode.PurgeLost) with { ReturnedAt = Now }]).State);

    private static SourceReadiness Judge(
        IReadOnlyList<Reading> newest,
        IReadOnlyList<Assessment> assessments,
        LabSnapshot? snapshot = null,
        IReadOnlyList<Alert>? alerts = null,
        Instant? now = null)
    {
        LabSnapshot lab = snapshot ?? TestLab.Snapshot();
        Instant at = now ?? Now;
        IReadOnlyList<Reading> fresh = now is { } other && other != Now ? [.. newest.Select(reading => reading with { Time = other })] : newest;
        return ReadinessEvaluator.Evaluate(new(lab, lab.Sources[0], fresh, assessments, alerts ?? [], at));
    }

    private static string Blocking(SourceReadiness readiness, ReadinessState expected = ReadinessState.Settling)
    {
        Assert.Equal(expected, readiness.State);
        return Assert.Single(readiness.Reasons, reason => reason.Blocks).Text;
    }

    private static IReadOnlyList<Reading> Newest(double celsius = 300.01, double setPoint = 300, double watt = 400) =>
        [new(TestLab.Well, Now, celsius), new(TestLab.SetPoint, Now, setPoint), new("heater", Now, watt)];

    private static Assessment Stability(Decision decision, double setPoint = 300) => new(
        TestLab.Rowan, "stability", "", new(TestLab.Noon, TestLab.Noon + TimeSpan.FromMinutes(30)), 1, new Estimate(4, 1), "mK", 50, 2, decision, null,
        [new(FigureName.SetPoint, new Estimate(setPoint, 0), "Cel")], "Half-range is 4 mK.", new("", [], [], null, "test"), TestLab.Noon, null);

    private static Alert Hazard(string code) => new(
        Guid.CreateVersion7(), TestLab.Rowan, code, "", AlertPriority.High, AlertState.RaisedUnacknowledged, Now, "Told in one line.", "", null, null, "");
}
