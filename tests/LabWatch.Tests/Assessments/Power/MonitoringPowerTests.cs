using LabWatch.Assessments.Forecasts;
using LabWatch.Assessments.Power;
using LabWatch.Lab.Sources;
using LabWatch.Tests.Api.Fakes;
using LabWatch.Tests.Assessments.Forecasts;

namespace LabWatch.Tests.Assessments.Power;

public sealed class MonitoringPowerTests
{
    private static readonly ReferenceSource Hazel = new SampleLab().Current.Sources.Single(source => source.Key.Source == "hazel");

    [Fact]
    public void The_smallest_shift_is_that_of_the_domain_for_one_check_a_working_day()
    {
        // With 250 checks a year, 0.1 false alarms and 95 % power: about 5.3 u at the next check, 2.4 u within five, 1.2 u within twenty. Here every day is checked, which moves
        // the limits by 0.1 u.
        DriftPower row = Assert.Single(Of(limit: 100));

        Assert.InRange(row.AtNextCheck / row.Noise, 5.2, 5.5);
        Assert.InRange(row.WithinFive / row.Noise, 2.3, 3.5);
        Assert.InRange(row.WithinTwenty / row.Noise, 1.15, 1.8);
        Assert.Equal(365.25, row.ChecksPerYear, 0.01);
        Assert.Equal(PowerVerdict.SeenAtOnce, row.Verdict);
    }

    [Fact]
    public void A_limit_inside_of_the_noise_cannot_be_seen_and_it_is_said()
    {
        DriftPower row = Assert.Single(Of(limit: 5.05));

        Assert.Equal(PowerVerdict.CannotBeSeen, row.Verdict);
        Assert.Contains("The limit cannot be seen", row.Explanation, StringComparison.Ordinal);
    }

    [Fact]
    public void Before_the_noise_is_known_nothing_is_promised() =>
        Assert.Equal(PowerVerdict.TooFewDays, Assert.Single(MonitoringPower.Of(DriftForecasts.Of(Hazel, TrackedPoints.Of(Hazel, MadeAssessments.Stability(0, 5))))).Verdict);

    private static IReadOnlyList<DriftPower> Of(double limit)
    {
        double[] swing = [0.1, -0.2, 0.15, -0.1, 0.2, -0.15, 0.05, -0.05, 0.12, -0.12];
        return MonitoringPower.Of(DriftForecasts.Of(
            Hazel, Enumerable.Range(0, 60).SelectMany(day => TrackedPoints.Of(Hazel, MadeAssessments.Stability(day, 5 + swing[(day * 7) % 10], limit)))));
    }
}
