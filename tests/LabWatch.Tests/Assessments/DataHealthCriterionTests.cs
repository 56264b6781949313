using LabWatch.Assessments;
using LabWatch.Assessments.Criteria;
using LabWatch.Lab;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Limits;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Tests.Assessments;

/// <summary>
/// Data health by hand-made hours. Counts are exact, so the expected percentages are arithmetic: (M + (N - M) B/R)/N of N promised, M missing,
/// B bad among R received. Which faults are looked for: ISO/IEC 17025:2017, 7.11; how: common practice, no source.
/// </summary>
public sealed class DataHealthCriterionTests
{
    private const string Indicator = "indicator";

    private static readonly TimeWindow Window = new(TestLab.Noon, TestLab.Noon + TimeSpan.FromHours(1));
    private static readonly Instant LeadIn = TestLab.Noon - TimeSpan.FromMinutes(30);

    [Fact]
    public void An_hour_in_which_everything_came_has_lost_nothing_and_passes()
    {
        CriterionResult result = Judge(Healthy());
        Assert.Equal((0.0, "%", Decision.Pass, 1.0), (result.Value.Value, result.Unit, result.Decision, result.ConformityProbability));
        Assert.Equal(string.Empty, result.Scope);
        Assert.Equal("rowan-data@1", $"{result.Limit!.Id}@{result.Limit.Revision}");
        Assert.Equal("All channels that results or hazards rest on sent everything that they promise in the 60 min, and nothing in it is bad; the limit is 5 %; it passes.", result.Explanation);
        Assert.DoesNotContain(result.Figures, figure => figure.Name.Contains(TestLab.Well, StringComparison.Ordinal));
    }

    [Fact]
    public void Promised_readings_that_are_not_there_are_counted_with_the_longest_gap()
    {
        CriterionResult result = Judge(Without(Healthy(), TestLab.Well, minute => minute is >= 10 and < 22 or 40));
        Assert.Equal(100 * 78 / 360.0, result.Value.Value, 1e-9);
        Assert.Equal(Decision.Fail, result.Decision);
        Assert.Equal(78, Figure(result, "missing-well-1"));
        Assert.StartsWith(
            "Of the readings that well-1 promises in the 60 min, 21.7 % are missing or bad: 78 of 360 missing (longest gap 12 min from 2026-12-01 12:09 UTC); the limit is 5 %; it fails.",
            result.Explanation, StringComparison.Ordinal);
    }

    [Theory]
    [InlineData(0, 6)]
    [InlineData(54, 6)]
    [InlineData(0, 1)]
    public void Gaps_at_the_ends_of_the_window_count_within_it_alone(int fromMinute, int minutes) =>
        Assert.Equal(6 * minutes, Figure(Judge(Without(Healthy(), TestLab.Well, minute => minute >= fromMinute && minute < fromMinute + minutes)), "missing-well-1"));

    [Fact]
    public void Readings_that_come_a_little_early_or_late_or_more_often_than_promised_are_all_there()
    {
        IEnumerable<Reading> shaky = Healthy().Select(reading => reading with { Time = reading.Time + TimeSpan.FromSeconds(3 + (4.8 * TestLab.Noise(reading.Time))) });
        Assert.Equal(0, Judge(shaky).Value.Value);
        Assert.Equal(0, Judge(Healthy(everySeconds: 1)).Value.Value);
    }

    [Fact]
    public void A_source_that_was_silent_before_promises_from_its_first_reading_on()
    {
        CriterionResult result = Judge(Healthy().Where(reading => Minute(reading) >= 24 && (reading.Channel != TestLab.Well || Minute(reading) != 30)));
        Assert.Equal(100 * 6 / 216.0, result.Value.Value, 1e-9);
        Assert.StartsWith("Of the readings that well-1 promises in the 36 min since the source was first heard at 2026-12-01 12:24 UTC, 2.8 % are missing or bad", result.Explanation, StringComparison.Ordinal);
    }

    [Fact]
    public void A_channel_that_is_silent_all_the_hour_has_lost_everything()
    {
        CriterionResult result = Judge(Healthy().Where(reading => reading.Channel != TestLab.SetPoint || reading.Time < TestLab.Noon));
        Assert.Equal(100, result.Value.Value);
        Assert.Contains("set-point promises in the 60 min, 100.0 % are missing or bad: 360 of 360 missing (longest gap 60 min from 2026-12-01 12:00 UTC)", result.Explanation, StringComparison.Ordinal);
    }

    [Fact]
    public void Readings_without_a_value_or_outside_the_sensor_are_bad_each_once()
    {
        CriterionResult result = Judge(Healthy().Select(reading => reading.Channel != TestLab.Well ? reading : Minute(reading) switch
        {
            5 => reading with { Value = double.NaN, Quality = ReadingQuality.NoValue },
            6 => reading with { Value = 9999, Quality = ReadingQuality.OutsideSensorRange },
            7 => reading with { Quality = ReadingQuality.FromTheFuture },
            _ => reading,
        }));
        Assert.Equal(100 * 18 / 360.0, result.Value.Value, 1e-9);
        Assert.Equal((6.0, 6.0, 6.0), (Figure(result, "no-value-well-1"), Figure(result, "outside-range-well-1"), Figure(result, "from-the-future-well-1")));
        Assert.Contains("6 without a value, 6 outside the range of the sensor, 6 with a device time ahead of the clock", result.Explanation, StringComparison.Ordinal);
    }

    [Fact]
    public void A_radiation_thermometer_below_its_range_is_in_good_order()
    {
        CriterionResult result = Judge(Healthy().Select(reading =>
            reading.Channel == "comparator" ? reading with { Value = 590, Quality = ReadingQuality.OutsideSensorRange } : reading));
        Assert.Equal(0, result.Value.Value);
        Assert.Equal(360, Figure(result, "outside-range-comparator"));
    }

    [Fact]
    public void A_noisy_thermometer_that_repeats_one_value_is_stuck()
    {
        CriterionResult result = Judge(Stuck(TestLab.Noon + TimeSpan.FromMinutes(20), TestLab.Noon + TimeSpan.FromMinutes(32)));
        Assert.Equal(72, Figure(result, "stuck-well-1"));
        Assert.Equal(20, result.Value.Value, 1e-9);
        Assert.Contains("72 stuck at 300.001 degC for 12 min", result.Explanation, StringComparison.Ordinal);
    }

    [Fact]
    public void It_stays_stuck_when_nothing_else_is_to_be_seen_any_more()
    {
        CriterionResult fine = Judge(Stuck(LeadIn, Window.End));
        Assert.Equal((360.0, 100.0), (Figure(fine, "stuck-well-1"), fine.Value.Value));
        CriterionResult coarse = Judge(Stuck(LeadIn, Window.End, at: 300.1));
        Assert.Equal((0.0, Decision.Pass), (coarse.Value.Value, coarse.Decision));
        Assert.Contains("One value throughout, which its resolution may explain: well-1.", coarse.Explanation, StringComparison.Ordinal);
        CriterionResult contradicted = Judge(Stuck(LeadIn, Window.End, at: 300.1)
            .Select(reading => reading.Channel == Indicator ? reading with { Value = reading.Value + ((reading.Time - LeadIn).TotalHours * 2) } : reading));
        Assert.Equal(360, Figure(contradicted, "stuck-well-1"));
    }

    [Fact]
    public void Set_points_switches_heaters_and_what_rests_at_zero_are_never_stuck()
    {
        CriterionResult result = Judge(Healthy(flow: time => time < TestLab.Noon ? 5 + (0.1 * TestLab.Noise(time)) : 0));
        Assert.Equal(0, result.Value.Value);
        Assert.DoesNotContain("throughout", result.Explanation, StringComparison.Ordinal);
    }

    [Fact]
    public void Values_that_a_coarse_display_repeats_are_not_stuck() =>
        Assert.Equal(0, Judge(Healthy(celsius: time => Math.Round(TestLab.Steady(time) * 10) / 10)).Value.Value);

    [Fact]
    public void Spikes_are_found_and_ramps_steps_and_noise_are_none()
    {
        CriterionResult result = Judge(Healthy().Select(reading =>
            reading.Channel == TestLab.Well && Minute(reading) is 15 or 33 && reading.Time.Microseconds % 60_000_000 == 20_000_000 ? reading with { Value = reading.Value + 0.1 } : reading));
        Assert.Equal(2, Figure(result, "spikes-well-1"));
        Assert.Equal(100 * 2 / 360.0, result.Value.Value, 1e-9);
        Assert.Contains("2 spikes", result.Explanation, StringComparison.Ordinal);
        Assert.Equal(0, Judge(Healthy(celsius: time => 300 + (0.02 * TestLab.Noise(time)) + ((time - TestLab.Noon).TotalHours * 40))).Value.Value);
        Assert.Equal(0, Judge(Healthy(celsius: time => 300 + (0.02 * TestLab.Noise(time)) + (time < TestLab.Noon + TimeSpan.FromMinutes(30) ? 0 : 5))).Value.Value);
    }

    [Fact]
    public void A_channel_on_which_nothing_rests_is_told_of_and_does_not_decide()
    {
        CriterionResult result = Judge(Healthy().Where(reading => reading.Channel != "heater"));
        Assert.Equal((0.0, Decision.Pass), (result.Value.Value, result.Decision));
        Assert.Contains("Others: heater 100.0 % (360 of 360 missing (longest gap 60 min from 2026-12-01 12:00 UTC)).", result.Explanation, StringComparison.Ordinal);
    }

    [Fact]
    public void Readings_that_came_late_are_told_of_and_are_as_good_as_others()
    {
        CriterionResult result = Judge(Healthy().Select(reading => reading with { Quality = ReadingQuality.Late }));
        Assert.Equal(0, result.Value.Value);
        Assert.Equal(Figure(result, "reading-count"), Figure(result, "late-count"));
        Assert.EndsWith("Of 2160 readings 2160 came late.", result.Explanation, StringComparison.Ordinal);
    }

    [Fact]
    public void Without_a_limit_in_percent_nothing_is_decided()
    {
        CriterionResult none = Judge(Healthy(), []);
        Assert.Equal((Decision.NotDecided, null), (none.Decision, none.ConformityProbability));
        Assert.StartsWith("Not decided: no acceptance limit for data health is in force. ", none.Explanation, StringComparison.Ordinal);
        Assert.Equal(Decision.NotDecided, Judge(Healthy(), [Limit with { Unit = "mK" }]).Decision);
    }

    private static AcceptanceLimit Limit { get; } =
        new("rowan-data", 1, TestLab.Rowan, CriterionCode.DataHealth, 5, "%", DecisionRule.SimpleAcceptance, TestLab.LongAgo);

    private static double Figure(CriterionResult result, string name) => CriterionResult.Figure(result.Figures, name);

    private static int Minute(Reading reading) => reading.Time < TestLab.Noon ? -1 : (int)(reading.Time - TestLab.Noon).TotalMinutes;

    private static IEnumerable<Reading> Without(IEnumerable<Reading> readings, string channel, Func<int, bool> isLost) =>
        readings.Where(reading => reading.Channel != channel || !isLost(Minute(reading)));

    private static IEnumerable<Reading> Stuck(Instant from, Instant until, double at = 300.001) =>
        Healthy().Select(reading => reading.Channel == TestLab.Well && reading.Time >= from && reading.Time < until ? reading with { Value = at } : reading);

    /// <summary>Every channel each 10 s over lead-in and window; thermometers with a resolution of 1 mK and noise of a few of it.</summary>
    private static IEnumerable<Reading> Healthy(Func<Instant, double>? celsius = null, Func<Instant, double>? flow = null, int everySeconds = 10)
    {
        celsius ??= time => Math.Round(300 + (0.02 * TestLab.Noise(time)), 3);
        flow ??= time => Math.Round(5 + (0.1 * TestLab.Noise(time)), 2);
        for (Instant time = LeadIn; time < Window.End; time += TimeSpan.FromSeconds(everySeconds))
        {
            yield return new Reading(TestLab.Well, time, celsius(time));
            yield return new Reading(Indicator, time, Math.Round(300.02 + (0.03 * TestLab.Noise(time + TimeSpan.FromSeconds(1))), 3));
            yield return new Reading(TestLab.SetPoint, time, 300);
            yield return new Reading("heater", time, 400);
            yield return new Reading("flow", time, flow(time));
            yield return new Reading("comparator", time, Math.Round(299.8 + (0.1 * TestLab.Noise(time + TimeSpan.FromSeconds(2))), 2));
        }
    }

    private static CriterionResult Judge(IEnumerable<Reading> readings, IReadOnlyList<AcceptanceLimit>? limits = null)
    {
        LabSnapshot lab = TestLab.Snapshot(limits: limits ?? [Limit]);
        ReferenceSource source = lab.Sources[0];
        source = source with
        {
            Channels = [.. source.Channels, Channel(Indicator, ChannelQuantity.WellThermometer, "Cel"), Channel("flow", ChannelQuantity.PurgeFlow, "l/min"), Channel("comparator", ChannelQuantity.ComparatorTemperature, "Cel")],
        };
        DataHealthCriterion criterion = new(DataHealthCriterion.DefaultSchedule);
        FakeReadingStore store = new();
        store.Add(TestLab.Rowan, readings);
        return Assert.Single(criterion.Evaluate(new CriterionInput(lab, source, Window, store.Read(TestLab.Rowan, criterion.Channels(source), criterion.Schedule.SpanOf(Window)))));
    }

    private static Channel Channel(string id, ChannelQuantity quantity, string unit) =>
        new(new ChannelKey(TestLab.Rowan, id), id, quantity, unit, TimeSpan.FromSeconds(10));
}
