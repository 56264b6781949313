using LabWatch.Assessments;
using LabWatch.Assessments.Criteria;
using LabWatch.Lab;
using LabWatch.Lab.Instruments;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Time;
using LabWatch.Metrology.Thermometry;
using LabWatch.Metrology.Uncertainty;
using LabWatch.Readings;

namespace LabWatch.Tests.Assessments;

public sealed class StabilityCriterionTests
{
    private static readonly StabilityCriterion Criterion = new(StabilityCriterion.DefaultSchedule);
    private static readonly TimeWindow Window = new(TestLab.Noon, TestLab.Noon + TimeSpan.FromMinutes(30));
    private static readonly TimeWindow Span = StabilityCriterion.DefaultSchedule.SpanOf(Window);

    [Fact]
    public void Half_range_mean_deviation_and_slope_agree_with_an_independent_computation()
    {
        // The raw resistances are whole numbers of 1e-7 ohm. Expected values: 45-digit decimal arithmetic in another language, from the
        // definitions alone (inverse of the Callendar-Van Dusen quadratic with the coefficients of IEC 60751:2022, arithmetic means over
        // 10 s, half of largest less smallest, n - 1 standard deviation, ordinary least squares).
        IEnumerable<Reading> ohms = Enumerable.Range(0, 3600).Select(i => new Reading(
            TestLab.Well,
            Span.Start + TimeSpan.FromSeconds(i),
            (2_120_515_000L + ((Math.Abs((i % 900) - 450) - 225) * 490L) + ((((i * 7919L) % 101) - 50) * 40L) + (i * 3L)) / 1e7));
        CriterionResult result = Evaluate(
            TestLab.Snapshot([TestLab.ResistanceCertificate], unit: "Ohm", interval: TimeSpan.FromSeconds(1)),
            ohms.Concat(TestLab.SetPoints(Span.Start, Span.End, _ => 300)));
        Assert.Equal(30.864194099264016, result.Value.Value, 1e-8);
        Assert.Equal(300.00227429915007, Figure(result, FigureName.Mean), 1e-10);
        Assert.Equal(17.922061068870683, Figure(result, FigureName.StandardDeviation), 1e-8);
        Assert.Equal(0.0028296789506867268, Figure(result, FigureName.Slope), 1e-9);
        Assert.Equal(180, Figure(result, FigureName.MeanCount));
        Assert.Equal(1800, Figure(result, FigureName.ReadingCount));
        Assert.Equal(0.000280755252949796792855 / Math.Sqrt(24), Figure(result, "u-resolution"), 1e-9);
        Assert.Equal(Math.Sqrt(2) * 0.015 / 400 * 30.864194099264016, Figure(result, "u-scale"), 1e-9);
    }

    [Fact]
    public void Mean_and_deviation_of_a_certified_data_set_come_through_the_whole_criterion()
    {
        // NIST Statistical Reference Datasets, Michelso: certified mean 299.852400000000, standard deviation 0.0790105478190518.
        // One reading each 18 s, so that each lies in a bin of its own and the 100 values fill the window.
        double[] values = StrdMichelso.Values;
        IEnumerable<Reading> readings = TestLab.WellReadings(Span.Start, Window.Start, _ => 299.85, 18)
            .Concat(values.Select((value, index) => new Reading(TestLab.Well, Window.Start + TimeSpan.FromSeconds(18 * index), value)))
            .Concat(TestLab.SetPoints(Span.Start, Span.End, _ => 300));
        CriterionResult result = Evaluate(TestLab.Snapshot(interval: TimeSpan.FromSeconds(18)), readings);
        Assert.Equal(299.852400000000, Figure(result, FigureName.Mean), 1e-10);
        Assert.Equal(79.0105478190518, Figure(result, FigureName.StandardDeviation), 1e-8);
        Assert.Equal(1000 * (values.Max() - values.Min()) / 2, result.Value.Value, 1e-8);
        Assert.Equal(Decision.Fail, result.Decision);
    }

    [Fact]
    public void Allan_deviations_of_a_published_data_set_come_through_the_whole_criterion()
    {
        // NBS 9-point data set, NIST SP 1065 (2008), table 30: Allan deviation 91.22945 for one value in a mean, overlapping 85.95287 for two. As mK, one value each ten seconds.
        double[] values = [892, 809, 823, 798, 671, 644, 883, 903, 677];
        IEnumerable<Reading> readings = TestLab.WellReadings(Span.Start, Window.Start, _ => 300)
            .Concat(values.Select((value, index) => new Reading(TestLab.Well, Window.Start + TimeSpan.FromSeconds(10 * index), 300 + (value / 1000))))
            .Concat(TestLab.SetPoints(Span.Start, Span.End, _ => 300));
        CriterionResult result = Evaluate(TestLab.Snapshot(), readings);
        Assert.Equal(91.22945, Figure(result, "allan-10-s"), 5e-5);
        Assert.Equal(85.95287, Figure(result, "allan-20-s"), 5e-5);
    }

    [Fact]
    public void A_quiet_source_passes_and_says_so_with_numbers_and_units()
    {
        CriterionResult result = Evaluate(TestLab.Snapshot(), TestLab.Run(Span.Start, Span.End));
        Assert.Equal(Decision.Pass, result.Decision);
        Assert.Equal("mK", result.Unit);
        Assert.InRange(result.Value.Value, 1.9, 2.0);
        Assert.True(result.ConformityProbability > 0.999);
        Assert.Matches(
            @"^Half-range over 30 min is \d\.\d+ mK \(U = 0\.\d+ mK, k = 2\.\d\d\); the limit is 50 mK; with the guard band of 0\.\d+ mK a value up to \d\d\.\d+ mK passes, so it passes\. "
            + @"Probability of conformity .+\. Mean 300\.000 degC at set point 300 degC, standard deviation 1\.\d mK, slope -?\d[.\d]* mK/h \(U = [.\d]+ mK/h\), "
            + @"from 180 ten-second means of 180 readings of well-1 through certificate cal-well@1\.$",
            result.Explanation);
    }

    [Fact]
    public void A_drift_beyond_the_limit_fails()
    {
        CriterionResult result = Evaluate(
            TestLab.Snapshot(), TestLab.Run(Span.Start, Span.End, time => TestLab.Steady(time) + (0.3 * (time - Window.Start).TotalHours)));
        Assert.Equal(Decision.Fail, result.Decision);
        Assert.Equal(75, result.Value.Value, 3.0);
        Assert.Contains("so it fails.", result.Explanation, StringComparison.Ordinal);
    }

    [Theory]
    [InlineData(0.180, Decision.ConditionalPass)]
    [InlineData(0.210, Decision.ConditionalFail)]
    public void Near_the_limit_the_guard_band_decides_conditionally(double amplitude, Decision expected)
    {
        // White noise alone: half-range about 0.27 of its full width of 0.55 times amplitude, uncertain by some per cent.
        CriterionResult result = Evaluate(
            TestLab.Snapshot(limits: [TestLab.Limit with { Maximum = 97 }]), TestLab.Run(Span.Start, Span.End, time => 300 + (amplitude * TestLab.Noise(time))));
        Assert.Equal(expected, result.Decision);
        Assert.Contains("conditionally", result.Explanation, StringComparison.Ordinal);
    }

    [Fact]
    public void A_limit_in_kelvin_gives_the_value_in_kelvin()
    {
        CriterionResult result = Evaluate(TestLab.Snapshot(limits: [TestLab.Limit with { Maximum = 0.05, Unit = "K" }]), TestLab.Run(Span.Start, Span.End));
        Assert.Equal("K", result.Unit);
        Assert.InRange(result.Value.Value, 0.0019, 0.0020);
        Assert.Equal(Decision.Pass, result.Decision);
    }

    [Fact]
    public void A_change_of_set_point_in_the_window_or_shortly_before_is_no_failure()
    {
        Instant change = Window.Start - TimeSpan.FromMinutes(10);
        CriterionResult result = Evaluate(
            TestLab.Snapshot(),
            TestLab.Run(Span.Start, Span.End, time => time < change ? 200 : 300 - Math.Exp(-(time - change).TotalMinutes / 5) * 100, time => time < change ? 200 : 300));
        AssertNotDecided(result, "the set point changed from 200 to 300 degC at 2026-12-01 11:50 UTC; windows count that begin at least 30 min later");
    }

    [Fact]
    public void A_source_away_from_its_set_point_is_not_judged() =>
        AssertNotDecided(
            Evaluate(TestLab.Snapshot(), TestLab.Run(Span.Start, Span.End, time => 250 + TestLab.Noise(time))),
            "the source is not at its set point: it stands at 250");

    [Fact]
    public void A_source_that_still_creeps_towards_its_set_point_is_not_judged() =>
        AssertNotDecided(
            Evaluate(TestLab.Snapshot(), TestLab.Run(Span.Start, Span.End, time => 300 - (1.2 * Math.Exp(-(time - Span.Start).TotalMinutes / 15)))),
            "the source was still approaching its set point");

    [Fact]
    public void A_source_that_leaves_its_set_point_fails()
    {
        CriterionResult result = Evaluate(
            TestLab.Snapshot(), TestLab.Run(Span.Start, Span.End, time => TestLab.Steady(time) - Math.Max(0, (time - Window.Start).TotalMinutes)));
        Assert.Equal(Decision.Fail, result.Decision);
    }

    [Fact]
    public void Too_few_readings_are_no_failure_and_are_counted() =>
        AssertNotDecided(
            Evaluate(TestLab.Snapshot(), TestLab.Run(Span.Start, Window.Start + TimeSpan.FromMinutes(10))),
            "only 60 of 180 ten-second means have a reading of well-1, and 144 are needed");

    [Fact]
    public void Without_readings_before_the_window_nobody_can_tell_whether_it_had_settled() =>
        AssertNotDecided(
            Evaluate(TestLab.Snapshot(), TestLab.Run(Window.Start, Window.End)),
            "there are too few readings in the 30 min before the window");

    [Fact]
    public void A_silent_thermometer_with_a_set_point_has_no_value()
    {
        CriterionResult result = Evaluate(TestLab.Snapshot(), TestLab.SetPoints(Span.Start, Span.End, _ => 300));
        AssertNotDecided(result, "only 0 of 180");
        Assert.False(result.Value.HasValue);
        Assert.Contains("There is no temperature of well-1 in the window.", result.Explanation, StringComparison.Ordinal);
    }

    [Fact]
    public void A_silent_set_point_is_not_guessed() =>
        AssertNotDecided(
            Evaluate(TestLab.Snapshot(), TestLab.WellReadings(Span.Start, Span.End, TestLab.Steady)),
            "the set point is not known: it has no reading in the window");

    [Fact]
    public void A_source_without_a_set_point_channel_takes_its_limit_by_its_temperature()
    {
        CriterionResult result = Evaluate(
            TestLab.Snapshot(limits: [TestLab.Limit with { MinimumCelsius = 290, MaximumCelsius = 310 }], withSetPoint: false),
            TestLab.WellReadings(Span.Start, Span.End, TestLab.Steady));
        Assert.Equal(Decision.Pass, result.Decision);
    }

    [Fact]
    public void Readings_outside_the_range_of_the_certificate_are_flagged_and_decide_nothing()
    {
        CriterionResult result = Evaluate(
            TestLab.Snapshot([TestLab.IndicatorCertificate with { MaximumCelsius = 299.9999 }]), TestLab.Run(Span.Start, Span.End));
        AssertNotDecided(result, "readings lie outside the range of the certificate (100 to 300 degC)");
        Assert.InRange(Figure(result, FigureName.OutsideCertificateCount), 50, 130);
    }

    [Fact]
    public void Without_a_certificate_nothing_is_decided() =>
        AssertNotDecided(Evaluate(TestLab.Snapshot([]), TestLab.Run(Span.Start, Span.End)), "no certificate is in force for well-1");

    [Fact]
    public void A_change_of_certificate_within_the_window_is_no_instability()
    {
        Certificate next = TestLab.IndicatorCertificate with
        {
            Id = "cal-next",
            ValidFrom = Window.Start + TimeSpan.FromMinutes(15),
            Characteristic = new CorrectionTableCharacteristic(0.03, 2, [new CorrectionPoint(300, 0.1)]),
        };
        AssertNotDecided(
            Evaluate(TestLab.Snapshot([TestLab.IndicatorCertificate, next]), TestLab.Run(Span.Start, Span.End)),
            "the certificate or the instrument in force changed within the window");
    }

    [Fact]
    public void Without_a_limit_the_value_is_given_for_information()
    {
        CriterionResult result = Evaluate(TestLab.Snapshot(limits: []), TestLab.Run(Span.Start, Span.End));
        AssertNotDecided(result, "no acceptance limit for stability is in force at 300 degC");
        Assert.Contains("for information only", result.Explanation, StringComparison.Ordinal);
        Assert.InRange(result.Value.Value, 1.9, 2.0);
    }

    [Fact]
    public void Readings_that_the_sensor_cannot_give_are_left_out_and_counted()
    {
        Reading broken = new(TestLab.Well, Window.Start + TimeSpan.FromSeconds(5), 850, ReadingQuality.OutsideSensorRange);
        CriterionResult result = Evaluate(TestLab.Snapshot(), TestLab.Run(Span.Start, Span.End).Append(broken));
        Assert.Equal(Decision.Pass, result.Decision);
        Assert.Equal(1, Figure(result, FigureName.LeftOutCount));
    }

    [Fact]
    public void An_offset_of_the_calibration_cancels()
    {
        Certificate offset = TestLab.IndicatorCertificate with
        {
            Characteristic = new CorrectionTableCharacteristic(0.03, 2, [new CorrectionPoint(100, 0.5), new CorrectionPoint(500, 0.5)]),
        };
        CriterionResult plain = Evaluate(TestLab.Snapshot(), TestLab.Run(Span.Start, Span.End));
        CriterionResult shifted = Evaluate(TestLab.Snapshot([offset]), TestLab.Run(Span.Start, Span.End));
        Assert.Equal(plain.Value.Value, shifted.Value.Value, 1e-6);
        Assert.Equal(plain.Value.StandardUncertainty, shifted.Value.StandardUncertainty, 1e-6);
        Assert.Equal(Figure(plain, FigureName.Mean) + 0.5, Figure(shifted, FigureName.Mean), 1e-9);
    }

    [Fact]
    public void Coarse_readings_make_the_half_range_less_certain()
    {
        // Rounded to 10 mK: the resolution contributes 10 mK/sqrt(24) = 2.04 mK.
        CriterionResult result = Evaluate(
            TestLab.Snapshot(), TestLab.Run(Span.Start, Span.End, time => Math.Round(300 + (0.03 * TestLab.Noise(time)), 2)));
        Assert.Equal(2.0412, Figure(result, "u-resolution"), 1e-3);
        Assert.True(result.Value.StandardUncertainty >= 2.04);
    }

    [Fact]
    public void The_same_input_gives_the_same_result_to_the_last_bit() =>
        Assert.Equal(
            Evaluate(TestLab.Snapshot(), TestLab.Run(Span.Start, Span.End)) with { Figures = [] },
            Evaluate(TestLab.Snapshot(), TestLab.Run(Span.Start, Span.End)) with { Figures = [] } with { Limit = TestLab.Limit });

    private static CriterionResult Evaluate(LabSnapshot snapshot, IEnumerable<Reading> readings)
    {
        FakeReadingStore store = new();
        store.Add(TestLab.Rowan, readings);
        ReadingWindow seen = store.Read(TestLab.Rowan, Criterion.Channels(snapshot.Sources[0]), Span);
        return Assert.Single(Criterion.Evaluate(new CriterionInput(snapshot, snapshot.Sources[0], Window, seen)));
    }

    private static double Figure(CriterionResult result, string name) => CriterionResult.Figure(result.Figures, name);

    private static void AssertNotDecided(CriterionResult result, string reason)
    {
        Assert.Equal(Decision.NotDecided, result.Decision);
        Assert.Null(result.ConformityProbability);
        Assert.StartsWith("Not decided: ", result.Explanation, StringComparison.Ordinal);
        Assert.Contains(reason, result.Explanation, StringComparison.Ordinal);
    }
}
