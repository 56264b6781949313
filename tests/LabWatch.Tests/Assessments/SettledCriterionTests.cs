using LabWatch.Assessments;
using LabWatch.Assessments.Criteria;
using LabWatch.Lab.Limits;
using LabWatch.Lab.Time;
using LabWatch.Metrology.Uncertainty;
using LabWatch.Tests.Assessments.Cavities;

namespace LabWatch.Tests.Assessments;

/// <summary>
/// The R-statistic and its distribution have their own tests against published values in the metrology. Here: the criterion on sources whose slope and time constant are known.
/// </summary>
public sealed class SettledCriterionTests
{
    private static readonly SettledCriterion Criterion = new(SettledCriterion.DefaultSchedule);
    private static readonly TimeWindow Window = Criterion.Schedule.EndingAt(TestLab.Noon);
    private static readonly TimeWindow Span = Criterion.Schedule.SpanOf(Window);
    private static readonly AcceptanceLimit Limit = TestLab.Limit with { Id = "rowan-settled", Criterion = CriterionCode.Settled, Maximum = 100, Unit = "mK/h" };

    [Fact]
    public void A_source_at_rest_passes_and_says_so_with_numbers()
    {
        CriterionResult result = Evaluate(TestLab.Steady);
        Assert.Equal(Decision.Pass, result.Decision);
        Assert.Equal("mK/h", result.Unit);
        Assert.InRange(result.Value.Value, 0, 3 * result.Value.StandardUncertainty);
        Assert.StartsWith("Slope over 20 min is ", result.Explanation, StringComparison.Ordinal);
        Assert.Contains("the limit is 100 mK/h; with the guard band of", result.Explanation, StringComparison.Ordinal);
    }

    [Fact]
    public void A_ramp_gives_its_slope_and_the_error_of_white_noise()
    {
        // White noise of 4/sqrt(12) mK in each reading, 6 in a minute mean; the slope over n = 20 means in T = 1/3 h has u = s sqrt(12/n)/T (least squares, long n).
        CriterionResult result = Evaluate(time => TestLab.Steady(time) + (1.0 * (time - Window.End).TotalHours));
        double expected = 4 / Math.Sqrt(12) / Math.Sqrt(6) * Math.Sqrt(12.0 / 20) / (1.0 / 3);
        Assert.Equal(1000, result.Value.Value, 4 * expected);
        Assert.InRange(result.Value.StandardUncertainty, 0.7 * expected, 2 * expected);
        Assert.Equal(Decision.Fail, result.Decision);
    }

    [Fact]
    public void An_approach_after_a_change_of_set_point_is_not_decided_and_tells_when_it_ends()
    {
        // Exponential of 20 K with tau = 10 min that began 40 min before: its slope of 120 K/h exp(-t/tau) is 100 mK/h after tau ln(1200) = 70.9 min, 30.9 min from now.
        Instant change = Window.End - TimeSpan.FromMinutes(40);
        CriterionResult result = Evaluate(
            time => time < change ? 280 : 300 - (20 * Math.Exp(-(time - change).TotalMinutes / 10)) + (0.0004 * TestLab.Noise(time)), time => time < change ? 280 : 300);
        Assert.Equal(Decision.NotDecided, result.Decision);
        Assert.Equal(10, Figure(result, "time-constant"), 0.1);
        Assert.InRange(30.9, Figure(result, "settles-earliest") - 0.5, Figure(result, "settles-latest") + 0.5);
        Assert.InRange(Figure(result, "settles-latest") - Figure(result, "settles-earliest"), 0, 5);
        Assert.StartsWith("Not decided: it has not settled yet: it moves by ", result.Explanation, StringComparison.Ordinal);
        Assert.Contains("if it goes on so it can have settled in ", result.Explanation, StringComparison.Ordinal);
    }

    [Fact]
    public void A_source_passes_as_soon_as_it_is_at_rest_after_a_change_of_set_point()
    {
        Instant change = Window.End - TimeSpan.FromMinutes(60);
        CriterionResult result = Evaluate(
            time => time < change ? 280 : 300 - (20 * Math.Exp(-(time - change).TotalMinutes / 2)) + (0.004 * TestLab.Noise(time)), time => time < change ? 280 : 300);
        Assert.True(result.Decision is Decision.Pass, result.Explanation);
        Assert.InRange(Figure(result, "r-statistic"), 0, Figure(result, "r-critical"));
    }

    [Fact]
    public void Motion_that_the_noise_hides_from_the_slope_is_seen_by_the_r_statistic()
    {
        // A swing of 8 mK over the window leaves no slope.
        Instant change = Window.End - TimeSpan.FromMinutes(90);
        CriterionResult result = Evaluate(
            time => 300 + (0.008 * Math.Cos(2 * Math.PI * (time - Window.Start) / Window.Duration)) + (0.0004 * TestLab.Noise(time)), time => time < change ? 299 : 300);
        Assert.Equal(Decision.NotDecided, result.Decision);
        Assert.Contains("its R-statistic is", result.Explanation, StringComparison.Ordinal);
    }

    [Fact]
    public void A_source_that_leaves_its_set_point_fails()
    {
        CriterionResult result = Evaluate(time => 300 - (time < Window.Start ? 0 : 20 * (time - Window.Start).TotalHours));
        Assert.Equal(Decision.Fail, result.Decision);
    }

    [Fact]
    public void A_set_point_that_the_source_is_not_used_at_is_not_judged()
    {
        CriterionResult result = Evaluate(_ => 25, _ => 0);
        Assert.Equal(Decision.NotDecided, result.Decision);
        Assert.Contains("the set point of 0 degC is none that the source is used at", result.Explanation, StringComparison.Ordinal);
    }

    [Fact]
    public void The_simulated_furnace_settles_after_its_changes_of_set_point_and_never_fails_in_a_working_day()
    {
        Instant tuesday = Instant.FromUnixSeconds(1_793_664_000);
        DemoRun run = new(1, tuesday);
        run.SkipUntil(tuesday + TimeSpan.FromHours(4));
        run.RunUntil(tuesday + TimeSpan.FromHours(14), "rowan", "hazel");
        foreach (string source in new[] { "rowan", "hazel" })
        {
            List<CriterionResult> results = [];
            for (Instant end = tuesday + TimeSpan.FromHours(6.5); end <= tuesday + TimeSpan.FromHours(14); end += Criterion.Schedule.Every)
            {
                results.AddRange(run.Evaluate(Criterion, source, end));
            }

            Assert.DoesNotContain(results, result => result.Decision is Decision.Fail or Decision.ConditionalFail);
            Assert.InRange(results.Count(result => result.Decision is Decision.Pass), results.Count / 3, results.Count - 1);
        }
    }

    private static double Figure(CriterionResult result, string name) => CriterionResult.Figure(result.Figures, name);

    private static CriterionResult Evaluate(Func<Instant, double> celsius, Func<Instant, double>? setPoint = null)
    {
        FakeReadingStore store = new();
        store.Add(TestLab.Rowan, TestLab.Run(Span.Start, Span.End, celsius, setPoint));
        LabWatch.Lab.LabSnapshot lab = TestLab.Snapshot(limits: [Limit, TestLab.Limit]);
        return Criterion.Evaluate(new(lab, lab.Sources[0], Window, store.Read(TestLab.Rowan, null, Span)))[0];
    }
}
