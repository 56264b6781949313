using LabWatch.Assessments;
using LabWatch.Assessments.Criteria;
using LabWatch.Assessments.Readiness;
using LabWatch.Lab;
using LabWatch.Lab.Assessments;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Instruments;
using LabWatch.Lab.Limits;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Runs;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Tests.Assessments;

/// <summary>The reasons beside stability: other criteria, other instruments, silence, the run in progress, and what is told about when.</summary>
public sealed class ReadinessReasonsTests
{
    private const string Longwave = "8-14";

    private static readonly Instant Now = TestLab.Noon + TimeSpan.FromMinutes(35);

    [Theory]
    [InlineData(Decision.Fail, ReadinessState.NotFit, true)]
    [InlineData(Decision.ConditionalFail, ReadinessState.NotFit, true)]
    [InlineData(Decision.ConditionalPass, ReadinessState.Ready, false)]
    [InlineData(Decision.Pass, ReadinessState.Ready, false)]
    [InlineData(Decision.NotDecided, ReadinessState.Ready, false)]
    public void Each_band_is_told_by_its_name_and_a_fail_blocks(Decision decision, ReadinessState expected, bool blocks)
    {
        SourceReadiness readiness = Judge([Stability(), Emissivity(decision)], Lab(Limit(CriterionCode.EffectiveEmissivity, "/", Longwave)));
        Assert.Equal(expected, readiness.State);
        ReadinessReason reason = Assert.Single(readiness.Reasons, reason => reason.Code == "effective-emissivity");
        Assert.Equal(("Effective emissivity (8 to 14 um): It moved by 0.002.", blocks), (reason.Text, reason.Blocks));
    }

    [Fact]
    public void What_has_a_limit_here_and_is_not_shown_here_is_waited_for()
    {
        LabSnapshot lab = Lab(Limit(CriterionCode.EffectiveEmissivity, "/", Longwave));
        Assert.Equal("Its effective emissivity has not been assessed yet.", Blocking(Judge([Stability()], lab)));
        Assert.Equal("Its effective emissivity (8 to 14 um) was last assessed at 200 degC, not at 300 degC.", Blocking(Judge([Stability(), Emissivity(Decision.Fail, setPoint: 200)], lab)));
        Assert.Equal("The latest assessment of its effective emissivity (8 to 14 um) is 4.0 h old.", Blocking(Judge([Stability(), Emissivity(Decision.Pass, Now - TimeSpan.FromHours(4))], lab)));
    }

    [Fact]
    public void What_has_no_limit_here_or_is_about_no_band_of_the_source_is_left_out()
    {
        Assert.Equal(ReadinessState.Ready, Judge([Stability(), Emissivity(Decision.Fail)], Lab()).State);
        AcceptanceLimit elsewhere = Limit(CriterionCode.EffectiveEmissivity, "/", Longwave) with { MinimumCelsius = 400, MaximumCelsius = 500 };
        Assert.Equal(ReadinessState.Ready, Judge([Stability(), Emissivity(Decision.Fail)], Lab(elsewhere)).State);
        Assert.DoesNotContain(
            Judge([Stability(), Emissivity(Decision.Pass), Emissivity(Decision.Fail) with { Scope = "3-5" }], Lab(Limit(CriterionCode.EffectiveEmissivity, "/", null))).Reasons, reason => reason.Blocks);
    }

    [Fact]
    public void Ages_go_by_the_schedule_that_is_set()
    {
        ICriterion seldom = new StabilityCriterion(new(TimeSpan.FromHours(2), TimeSpan.FromHours(2), TimeSpan.FromHours(1), TimeSpan.Zero));
        Assessment old = Stability(Now - TimeSpan.FromHours(3));
        Assert.Equal(ReadinessState.Settling, Judge([old]).State);
        Assert.Equal(ReadinessState.Ready, ReadinessEvaluator.Evaluate(Input([old]) with { Criteria = [seldom] }).State);
    }

    [Theory]
    [InlineData(Decision.Fail, 0, ReadinessState.NotFit)]
    [InlineData(Decision.Pass, 0, ReadinessState.Ready)]
    [InlineData(Decision.Fail, 5, ReadinessState.Ready)]
    public void Bad_data_of_the_last_hours_block(Decision decision, int hoursAgo, ReadinessState expected) => Assert.Equal(
        expected, Judge([Stability(), Of(CriterionCode.DataHealth, "", decision, Now - TimeSpan.FromHours(hoursAgo), "%")], Lab(Limit(CriterionCode.DataHealth, "%", null))).State);

    [Fact]
    public void Certificates_of_other_wells_block_and_of_a_comparator_that_only_checks_inform()
    {
        Certificate overdue = TestLab.IndicatorCertificate with { Id = "cal-2", Number = "HV-2", DueAt = Now - TimeSpan.FromDays(10) };
        SourceReadiness well = Judge([Stability()], Lab(overdue with { Instrument = "ind-2" }));
        Assert.Equal(ReadinessState.NotFit, well.State);
        Assert.Equal("Certificate HV-2 of well-2 has been overdue for 10 days.", well.Reasons[0].Text);
        SourceReadiness comparator = Judge([Stability()], Lab(overdue with { Instrument = "rad-1" }));
        Assert.Equal(ReadinessState.Ready, comparator.State);
        Assert.Contains(comparator.Reasons, reason => reason.Text == "Certificate HV-2 of comparator has been overdue for 10 days." && !reason.Blocks);
        LabSnapshot lab = Lab(overdue with { Instrument = "rad-1" });
        ReadinessInput radiometric = Input([Stability()], lab);
        Assert.Equal(ReadinessState.NotFit, ReadinessEvaluator.Evaluate(radiometric with { Source = radiometric.Source with { Route = TraceabilityRoute.Radiometric } }).State);
    }

    [Fact]
    public void Silent_sensors_are_told_and_do_not_block()
    {
        SourceReadiness readiness = ReadinessEvaluator.Evaluate(Input([Stability()]) with
        {
            Newest = [new(TestLab.Well, Now, 300), new(TestLab.SetPoint, Now, 300), new("heater", Now - TimeSpan.FromHours(1), 400), new("well-2", Now - TimeSpan.FromMinutes(12), 300)],
        });
        Assert.Equal(ReadinessState.Ready, readiness.State);
        Assert.Contains(readiness.Reasons, reason => reason.Text == "Silent: well-2 for 12 min; comparator, never heard." && !reason.Blocks);
    }

    [Fact]
    public void A_run_in_progress_is_told_with_who_and_what()
    {
        CalibrationRun run = new(Guid.CreateVersion7(), TestLab.Rowan, "J-7", "radiation thermometer 12", 300, TestLab.Noon, "a.person", "ready") { Band = Longwave };
        SourceReadiness readiness = ReadinessEvaluator.Evaluate(Input([Stability()]) with { OpenRun = run });
        Assert.Equal(ReadinessState.Ready, readiness.State);
        Assert.Contains(readiness.Reasons, reason => reason.Code == "run"
            && reason.Text == "In use since 2026-12-01 12:00 UTC by a.person: job J-7, radiation thermometer 12, 300 degC, 8 to 14 um." && !reason.Blocks);
        Assert.DoesNotContain(ReadinessEvaluator.Evaluate(Input([Stability()]) with { OpenRun = run with { EndedAt = Now } }).Reasons, reason => reason.Code == "run");
    }

    [Fact]
    public void A_controller_that_reports_zero_while_it_is_off_is_off()
    {
        SourceReadiness readiness = ReadinessEvaluator.Evaluate(Input([Stability()]) with
        {
            Newest = [new(TestLab.Well, Now, 180), new(TestLab.SetPoint, Now, 0), new("heater", Now, 0)],
        });
        Assert.Equal(ReadinessState.Off, readiness.State);
        Assert.Contains(readiness.Reasons, reason => reason.Text == "The heater is off, and the set point of 0 degC is outside the range of the source (100 to 500 degC); well-1 reads 180 degC.");
        Assert.DoesNotContain(readiness.Reasons, reason => reason.Text.Contains("outside the range of certificate", StringComparison.Ordinal));
    }

    [Fact]
    public void What_somebody_must_cure_goes_before_what_waiting_cures_and_what_informs_comes_last()
    {
        SourceReadiness readiness = ReadinessEvaluator.Evaluate(Input([], Lab(TestLab.IndicatorCertificate with { Id = "cal-2", Instrument = "ind-2", DueAt = Now - TimeSpan.FromDays(10) })) with
        {
            Newest = [new(TestLab.Well, Now, 250), new(TestLab.SetPoint, Now, 300), new("heater", Now, 400)],
        });
        int[] weights = [.. readiness.Reasons.Select(reason => reason.Blocks ? (reason.PassesByWaiting ? 1 : 0) : 2)];
        Assert.Equal(weights.Order(), weights);
        Assert.Equal([0, 1, 2], weights.Distinct());
    }

    [Fact]
    public void On_its_way_it_tells_between_when_it_will_be_there()
    {
        // Exponential approach with a time constant of 10 min, 26 K to go: to be within 2.77 K takes ln(26/2.77) of it, 22.4 min. The straight line takes 23.2/26 of it, 8.9 min.
        SourceReadiness readiness = OnItsWay(time => 300 - (26 * Math.Exp((Now - time).TotalMinutes / 10)), 274);
        Assert.Equal(ReadinessState.Heating, readiness.State);
        ReadyForecast forecast = readiness.Forecast!;
        Assert.InRange((forecast.ArrivesEarliest!.Value - Now).TotalMinutes, 4, 9);
        Assert.InRange((forecast.ArrivesLatest!.Value - Now).TotalMinutes, 22, 40);
        Assert.Equal(Instant.From(new DateTimeOffset(2026, 12, 1, 13, 50, 30, TimeSpan.Zero)), forecast.ReadyNotBefore);
        Assert.Contains(readiness.Reasons, reason => reason.Code == "expected" && reason.Text.StartsWith("If it goes on as in the last 10 min (", StringComparison.Ordinal));
        Assert.EndsWith("its stability there can have been shown at 2026-12-01 13:50 UTC at the earliest.", Assert.Single(readiness.Reasons, reason => reason.Code == "expected").Text, StringComparison.Ordinal);
    }

    [Theory]
    [InlineData(0)]
    [InlineData(-20)]
    public void A_source_that_does_not_near_its_set_point_is_not_forecast(double kelvinPerHour)
    {
        SourceReadiness readiness = OnItsWay(time => 250 + (kelvinPerHour * (time - Now).TotalHours), 250);
        Assert.Equal(new ReadyForecast(null, null, null), readiness.Forecast);
        Assert.Contains(readiness.Reasons, reason => reason.Text == "When it will be at its set point cannot be told from its recent readings.");
    }

    [Fact]
    public void While_it_settles_it_tells_when_the_next_window_that_counts_is_judged()
    {
        ReadinessInput input = Input([]);
        FakeReadingStore store = new();
        store.Add(TestLab.Rowan, TestLab.SetPoints(TestLab.Noon - TimeSpan.FromHours(1), Now, time => time < TestLab.Noon + TimeSpan.FromMinutes(3) ? 200 : 300));
        SourceReadiness changed = ReadinessEvaluator.Evaluate(input with { Recent = store.Read(TestLab.Rowan, null, new(Now - TimeSpan.FromHours(1), Now)) });
        Assert.Equal(Instant.From(new DateTimeOffset(2026, 12, 1, 13, 10, 30, TimeSpan.Zero)), changed.Forecast!.ReadyNotBefore);
        FakeReadingStore fresh = new();
        fresh.Add(TestLab.Rowan, TestLab.Run(TestLab.Noon + TimeSpan.FromMinutes(20), Now));
        SourceReadiness begun = ReadinessEvaluator.Evaluate(input with { Recent = fresh.Read(TestLab.Rowan, null, new(Now - TimeSpan.FromHours(1), Now)) });
        Assert.Equal(Instant.From(new DateTimeOffset(2026, 12, 1, 13, 10, 30, TimeSpan.Zero)), begun.Forecast!.ReadyNotBefore);
        SourceReadiness steady = ReadinessEvaluator.Evaluate(input);
        Assert.Equal(Instant.From(new DateTimeOffset(2026, 12, 1, 12, 40, 30, TimeSpan.Zero)), steady.Forecast!.ReadyNotBefore);
        Assert.Null(Judge([Stability()]).Forecast);
    }

    private static SourceReadiness OnItsWay(Func<Instant, double> celsius, double celsiusNow)
    {
        FakeReadingStore store = new();
        store.Add(TestLab.Rowan, TestLab.Run(Now - TimeSpan.FromMinutes(40), Now, time => celsius(time) + (0.004 * TestLab.Noise(time))));
        return ReadinessEvaluator.Evaluate(Input([]) with
        {
            Newest = [new(TestLab.Well, Now, celsiusNow), new(TestLab.SetPoint, Now, 300), new("heater", Now, 900)],
            Recent = store.Read(TestLab.Rowan, null, new(Now - TimeSpan.FromHours(1), Now)),
        });
    }

    private static SourceReadiness Judge(IReadOnlyList<Assessment> assessments, LabSnapshot? lab = null) => ReadinessEvaluator.Evaluate(Input(assessments, lab));

    private static string Blocking(SourceReadiness readiness)
    {
        Assert.Equal(ReadinessState.Settling, readiness.State);
        return Assert.Single(readiness.Reasons, reason => reason.Blocks).Text;
    }

    private static ReadinessInput Input(IReadOnlyList<Assessment> assessments, LabSnapshot? lab = null)
    {
        lab ??= Lab();
        IReadOnlyList<Reading> newest =
            [new(TestLab.Well, Now, 300.01), new(TestLab.SetPoint, Now, 300), new("heater", Now, 400), new("well-2", Now, 300), new("comparator", Now, 299)];
        return new ReadinessInput(lab, lab.Sources[0], newest, assessments, [], Now)
        {
            Criteria = [new StabilityCriterion(StabilityCriterion.DefaultSchedule), new DataHealthCriterion(DataHealthCriterion.DefaultSchedule), new ByBand()],
        };
    }

    private static LabSnapshot Lab(params object[] extra)
    {
        LabSnapshot plain = TestLab.Snapshot();
        ReferenceSource rowan = plain.Sources[0] with { Bands = [new WorkingBand(Longwave, "8 to 14 um", 8, 14)] };
        rowan = rowan with
        {
            Channels =
            [
                .. rowan.Channels,
                new Channel(new ChannelKey(TestLab.Rowan, "well-2"), "Well 2", ChannelQuantity.WellThermometer, "Cel", TimeSpan.FromSeconds(10)),
                new Channel(new ChannelKey(TestLab.Rowan, "comparator"), "Comparator", ChannelQuantity.ComparatorTemperature, "Cel", TimeSpan.FromSeconds(10)) { Band = Longwave },
            ],
        };
        return new(
            plain.Site, [rowan], plain.Instruments,
            [.. plain.Installations, new Installation("ind-2", new(TestLab.Rowan, "well-2"), TestLab.LongAgo, null), new Installation("rad-1", new(TestLab.Rowan, "comparator"), TestLab.LongAgo, null)],
            [.. plain.Certificates, .. extra.OfType<Certificate>()], [.. plain.Limits, .. extra.OfType<AcceptanceLimit>()], []);
    }

    private static AcceptanceLimit Limit(string criterion, string unit, string? band) =>
        new($"rowan-{criterion}", 1, TestLab.Rowan, criterion, 1, unit, DecisionRule.SimpleAcceptance, TestLab.LongAgo) { Band = band };

    private static Assessment Stability(Instant? end = null) => Of(CriterionCode.Stability, "", Decision.Pass, end ?? Now, "mK", 300) with { Explanation = "Half-range is 4 mK." };

    private static Assessment Emissivity(Decision decision, Instant? end = null, double setPoint = 300) => Of(CriterionCode.EffectiveEmissivity, Longwave, decision, end ?? Now, "/", setPoint);

    private static Assessment Of(string criterion, string scope, Decision decision, Instant end, string unit, double? setPoint = null) => new(
        TestLab.Rowan, criterion, scope, new(end - TimeSpan.FromMinutes(30), end), 1, new Estimate(0.002, 0), unit, 1, 2, decision, null,
        setPoint is { } celsius ? [new(FigureName.SetPoint, new Estimate(celsius, 0), "Cel")] : [], "It moved by 0.002. More follows.", new("", [], [], null, "test"), end, null);

    /// <summary>A criterion with one scope a band.</summary>
    private sealed class ByBand : ICriterion
    {
        public string Code => CriterionCode.EffectiveEmissivity;

        public CriterionSchedule Schedule { get; } = new(TimeSpan.FromMinutes(30), TimeSpan.FromMinutes(30), TimeSpan.Zero, TimeSpan.Zero);

        public IReadOnlyList<string> Channels(ReferenceSource source) => [TestLab.Well];

        public string? BandOf(ReferenceSource source, string scope) => scope;

        public IReadOnlyList<CriterionResult> Evaluate(CriterionInput input) => throw new NotSupportedException();
    }
}
