using LabWatch.Assessments.Forecasts;
using LabWatch.Lab.Assessments;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;
using LabWatch.Metrology.Radiometry;
using LabWatch.Metrology.Statistics;
using LabWatch.Metrology.Uncertainty;
using LabWatch.Tests.Api.Fakes;

namespace LabWatch.Tests.Assessments.Forecasts;

public sealed class DriftForecastsTests
{
    private const int DaysOfHistory = 60;
    private static readonly ReferenceSource Hazel = new SampleLab().Current.Sources.Single(source => source.Key.Source == "hazel");

    [Fact]
    public void A_straight_rise_reaches_its_limit_on_the_day_that_follows_by_hand()
    {
        // 2 mK at day 0 and 0.05 mK a day: 10 mK on day 160.
        DriftForecast forecast = Assert.Single(Forecasts(Enumerable.Range(0, 40).Select(day => MadeAssessments.Stability(day, 2 + (0.05 * day)))));

        Assert.Equal(0.05 * 365.25, forecast.SlopePerYear.Value, 1e-6);
        Assert.Equal(160, (forecast.Expected!.Value - Noon(0)).TotalDays, 0.01);
        Assert.Contains("reaches its limit of 10 mK about", forecast.Explanation, StringComparison.Ordinal);
    }

    [Fact]
    public void The_interval_holds_the_true_day_in_about_95_percent_of_series_with_autocorrelated_noise()
    {
        int held = 0;
        const int Trials = 300;
        for (int seed = 0; seed < Trials; seed++)
        {
            double[] noise = Noise(seed, DaysOfHistory, correlation: 0.4, deviation: 0.2);
            DriftForecast forecast = Assert.Single(Forecasts(noise.Select((error, day) => MadeAssessments.Stability(day, 2 + (0.05 * day) + error))));
            double truth = (10 - 2) / 0.05;
            held += (forecast.Earliest!.Value - Noon(0)).TotalDays <= truth && (forecast.Latest is not { } latest || (latest - Noon(0)).TotalDays >= truth) ? 1 : 0;
        }

        // 95 % less what an autocorrelation estimated from sixty days costs; the binomial standard deviation of 300 trials is 1.3 %.
        Assert.InRange(held / (double)Trials, 0.90, 1);
    }

    [Fact]
    public void Scatter_without_a_trend_is_no_drift_and_no_day_is_foretold()
    {
        double[] noise = Noise(7, DaysOfHistory, 0.3, 0.2);
        DriftForecast forecast = Assert.Single(Forecasts(noise.Select((error, day) => MadeAssessments.Stability(day, 5 + error))));

        Assert.False(forecast.IsSignificant);
        Assert.Contains("no more than chance makes", forecast.Explanation, StringComparison.Ordinal);
        Assert.DoesNotContain("At this rate", forecast.Explanation, StringComparison.Ordinal);
        Assert.Equal("none", forecast.Chart!.Signal);
    }

    [Fact]
    public void The_assessments_of_a_day_make_one_mean_and_what_was_not_decided_makes_none()
    {
        DriftForecast forecast = Assert.Single(Forecasts(
        [
            MadeAssessments.Stability(0, 4), MadeAssessments.Stability(0.02, 6), MadeAssessments.Stability(1, 7),
            MadeAssessments.Stability(2, 99, decision: Decision.NotDecided),
        ]));

        Assert.Equal([5, 7], forecast.Days.Select(day => day.Value));
        Assert.False(forecast.SlopePerYear.HasValue);
        Assert.StartsWith("No trend yet: 2 days with decided assessments at 37 degC, and 5 are needed.", forecast.Explanation, StringComparison.Ordinal);
    }

    [Fact]
    public void Set_points_are_not_mixed() =>
        Assert.Equal([30, 37], Forecasts([MadeAssessments.Stability(0, 4, setPoint: 37), MadeAssessments.Stability(1, 4, setPoint: 30)]).Select(one => one.Series.SetPointCelsius).Order());

    [Fact]
    public void A_new_certificate_begins_the_series_anew_so_that_its_step_is_no_drift()
    {
        IEnumerable<Assessment> before = Enumerable.Range(0, 20).Select(day => MadeAssessments.Stability(day, 2));
        IEnumerable<Assessment> after = Enumerable.Range(20, 12).Select(day => MadeAssessments.Stability(day, 4 + (0.01 * (day % 3)), certificate: "cert@2"));

        DriftForecast forecast = Assert.Single(Forecasts(before.Concat(after)));

        Assert.Equal(12, forecast.Days.Count);
        Assert.False(forecast.IsSignificant);
    }

    [Fact]
    public void A_lasting_shift_of_three_standard_deviations_is_signalled_within_days_with_its_direction()
    {
        double[] noise = Noise(3, 40, 0, 0.2);
        DriftForecast forecast = Assert.Single(Forecasts(noise.Select((error, day) => MadeAssessments.Stability(day, 5 + error - (day >= 30 ? 0.6 : 0)))));

        Assert.Equal("decrease", forecast.Chart!.Signal);
        Assert.InRange((forecast.Chart.SignalsSince!.Value - Noon(30)).TotalDays, 0, 6);
    }

    [Fact]
    public void The_charts_have_the_run_lengths_that_are_told()
    {
        Assert.Equal(1000, RunLength.OfEwma(ChartRules.Weight, ChartRules.EwmaLimit, 0), 0.1);
        Assert.Equal(1000, RunLength.OfTwoSidedCusum(ChartRules.ReferenceValue, ChartRules.CusumInterval, 0), 0.1);

        // Montgomery, Introduction to Statistical Quality Control, table 9.11 (from memory): weight 0.2, L = 2.962 gives 500 and 10.5.
        Assert.Equal(500, RunLength.OfEwma(0.2, 2.962, 0), 1.0);
        Assert.InRange(ChartRules.EwmaRunLengthAtOne, 10.5, 13);
    }

    [Fact]
    public void Emissivity_is_followed_from_its_baseline_and_as_an_offset_with_the_limit_in_millikelvin()
    {
        // A fall of 1e-5 a day from the baseline: the limit of 0.004 after 400 days.
        IReadOnlyList<DriftForecast> forecasts = Forecasts(Enumerable.Range(0, 30).Select(day => MadeAssessments.Emissivity(day, 0.9990 - (1e-5 * day))));

        DriftForecast departure = forecasts.Single(one => one.Series.Quantity == TrackedQuantity.EmissivityDeparture);
        Assert.Equal("lwir", departure.Band);
        Assert.Equal(400, (departure.Expected!.Value - Noon(0)).TotalDays, 0.1);

        DriftForecast offset = forecasts.Single(one => one.Series.Quantity == TrackedQuantity.RadianceOffset);
        RadianceBand band = RadianceBand.Of(8, 14);
        double kelvin = 0.004 * (band.Radiance(310.152) - band.Radiance(296.15)) / band.RadianceSlope(310.152);
        Assert.Equal(kelvin * 1000, offset.Limit!.Value, 1e-6);
    }

    [Fact]
    public void What_stood_at_an_earlier_window_is_made_of_the_windows_up_to_it()
    {
        TrackedPoint[] points = [.. Points(Enumerable.Range(0, 30).Select(day => MadeAssessments.Stability(day, 2 + (0.05 * day))))];

        DriftForecast then = Assert.Single(DriftForecasts.Of(Hazel, points, Noon(9)));

        Assert.Equal(10, then.Days.Count);
        Assert.NotEqual(then.Digest, Assert.Single(DriftForecasts.Of(Hazel, points)).Digest);
    }

    private static IReadOnlyList<DriftForecast> Forecasts(IEnumerable<Assessment> assessments) => DriftForecasts.Of(Hazel, Points(assessments));

    private static IEnumerable<TrackedPoint> Points(IEnumerable<Assessment> assessments) => assessments.SelectMany(assessment => TrackedPoints.Of(Hazel, assessment));

    private static Instant Noon(double day) => MadeAssessments.FirstDay + TimeSpan.FromDays(day) + TimeSpan.FromHours(12);

    private static double[] Noise(int seed, int count, double correlation, double deviation)
    {
        Random random = new(seed + 1);
        double Normal() => Math.Sqrt(-2 * Math.Log(1 - random.NextDouble())) * Math.Cos(2 * Math.PI * random.NextDouble());
        double[] noise = new double[count];
        double before = Normal();
        for (int i = 0; i < count; i++)
        {
            before = (correlation * before) + (Math.Sqrt(1 - (correlation * correlation)) * Normal());
            noise[i] = deviation * before;
        }

        return noise;
    }
}
