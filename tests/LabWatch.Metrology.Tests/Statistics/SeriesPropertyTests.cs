using LabWatch.Metrology.Statistics;
using LabWatch.Metrology.Uncertainty;
using Xunit;

namespace LabWatch.Metrology.Tests.Statistics;

public sealed class SeriesPropertyTests
{
    private const long Day = 86_400_000_000;
    private const long Start = 1_700_000_000_000_000;

    [Fact]
    public void Allan_deviations_of_white_noise_fall_with_the_root_of_the_interval_and_gaps_do_not_move_them()
    {
        double[] values = new SimulatedNoise(1).Autoregressive(20_000, 0);
        double[] gapped = [.. values.Select((value, i) => i % 11 == 3 || i is > 7000 and < 9000 ? double.NaN : value)];
        for (int m = 1; m <= 256; m *= 4)
        {
            AllanPoint whole = AllanDeviation.Overlapping(values, m), holed = AllanDeviation.Overlapping(gapped, m);
            double tolerance = 4 / Math.Sqrt(2 * whole.DegreesOfFreedom);

            Assert.Equal(1, whole.Deviation * Math.Sqrt(m), tolerance);
            // Means of 10/11 of the values are that much noisier.
            Assert.Equal(1, holed.Deviation * Math.Sqrt(m * (m > 8 ? 10.0 / 11 : 1)), 1.5 * tolerance);
            Assert.True(holed.Count < whole.Count);
        }
    }

    [Fact]
    public void Allan_deviation_without_enough_values_is_none()
    {
        Assert.True(double.IsNaN(AllanDeviation.Overlapping([1, 2, 3], 2).Deviation));
        Assert.True(double.IsNaN(AllanDeviation.Modified([1, double.NaN, 3, double.NaN, 4], 1).Deviation));
        Assert.Empty(AllanDeviation.Octaves([1, 2, 3]));
    }

    [Fact]
    public void A_constant_added_changes_no_deviation_and_no_trend()
    {
        double[] values = new SimulatedNoise(2).Autoregressive(300, 0.4), shifted = [.. values.Select(value => value + 1000)];
        long[] times = [.. values.Select((_, i) => Start + i * Day)], later = [.. times.Select(time => time + 77 * Day)];

        Assert.Equal(1, AllanDeviation.Modified(values, 8).Deviation / AllanDeviation.Modified(shifted, 8).Deviation, 1e-9);
        Assert.Equal(HadamardDeviation.Total(values, 8), HadamardDeviation.Total(shifted, 8), 1e-9);
        TheilSenTrend a = TheilSenTrend.Of(times, values, 3 * Day), b = TheilSenTrend.Of(later, shifted, 3 * Day);
        Assert.Equal(100, a.Count);
        Assert.Equal(a.Test, b.Test);
        Assert.Equal(a.SlopePerDay, b.SlopePerDay, 1e-10);
    }

    [Fact]
    public void A_spike_is_an_outlier_and_noise_is_not()
    {
        double[] values = [.. new SimulatedNoise(3).Autoregressive(500, 0).Select(value => 100 + 0.01 * value)];
        values[200] += 1;
        values[300] = double.NaN;
        bool[] outliers = new bool[values.Length];

        int found = HampelFilter.Find(values, 10, 5, 0, outliers);

        Assert.True(outliers[200]);
        Assert.False(outliers[300]);
        Assert.InRange(found, 1, 3);
    }

    [Fact]
    public void A_sensor_stuck_between_two_digits_has_no_outliers_above_its_resolution()
    {
        double[] values = [.. Enumerable.Range(0, 100).Select(i => i % 10 == 0 ? 25.01 : 25.00)];

        Assert.Equal(0, HampelFilter.Find(values, 5, 3, 0.01, new bool[100]));
        Assert.Equal(10, HampelFilter.Find(values, 5, 3, 0, new bool[100]));
    }

    [Fact]
    public void Interval_of_the_Theil_Sen_slope_holds_the_slope_in_about_95_percent_of_records()
    {
        var noise = new SimulatedNoise(4);
        int inside = 0;
        for (int record = 0; record < 300; record++)
        {
            double[] values = [.. noise.Autoregressive(60, 0).Select((value, i) => value + 0.02 * i)];
            TheilSenTrend trend = TheilSenTrend.Of([.. values.Select((_, i) => Start + i * Day)], values, 0);
            if (trend.LowerPerDay <= 0.02 && trend.UpperPerDay >= 0.02) inside++;
        }

        Assert.InRange(inside, 272, 297);
    }

    [Theory]
    [InlineData(0.0)]
    [InlineData(0.5)]
    public void Interval_of_the_crossing_holds_the_true_date_in_about_95_percent_of_records(double rho)
    {
        var noise = new SimulatedNoise(5);
        int inside = 0;
        for (int record = 0; record < 400; record++)
        {
            double[] values = [.. noise.Autoregressive(100, rho).Select((value, i) => value + 0.1 * i)];
            long[] times = [.. values.Select((_, i) => Start + i * Day)];
            LimitCrossing crossing = LimitCrossing.Forecast(times, values, 20);
            long truth = Start + 200 * Day;
            if (crossing.EarliestMicros <= truth && (crossing.LatestMicros is null || crossing.LatestMicros >= truth)) inside++;
        }

        Assert.InRange(inside, 368, 396);
    }

    [Fact]
    public void Without_a_significant_slope_the_crossing_may_never_come()
    {
        double[] values = new SimulatedNoise(6).Autoregressive(60, 0.3);
        LimitCrossing crossing = LimitCrossing.Forecast([.. values.Select((_, i) => Start + i * Day)], values, 50);

        Assert.Null(crossing.LatestMicros);
    }

    [Fact]
    public void A_slope_away_from_the_limit_reaches_it_never()
    {
        double[] values = [.. new SimulatedNoise(7).Autoregressive(60, 0).Select((value, i) => 0.1 * value - i)];
        LimitCrossing crossing = LimitCrossing.Forecast([.. values.Select((_, i) => Start + i * Day)], values, 50);

        Assert.Null(crossing.ExpectedMicros);
        Assert.Null(crossing.EarliestMicros);
    }

    // Source: smallest detectable drift for one check a band and working day, 95 % power, 0.1 false alarms a source-year: about 5.3 u, 2.4 u within 5, 1.2 u within 20 checks
    // (common practice, no source).
    [Theory]
    [InlineData(1, 5.3)]
    [InlineData(5, 2.4)]
    [InlineData(20, 1.2)]
    public void Smallest_detectable_drift_is_as_known_and_formula_and_simulation_agree(int checks, double known)
    {
        var drift = new DetectableDrift(1, Bands: 2);

        Assert.Equal(known, drift.ByFormula(checks), 0.07);
        Assert.InRange(drift.BySimulation(checks) / drift.ByFormula(checks), 0.93, 1.01);
    }

    [Theory]
    [InlineData(1)]
    [InlineData(5)]
    public void False_alarms_are_not_more_than_asked_for(int checks)
    {
        double alarms = new DetectableDrift(1, FalseAlarmsPerYear: 1).SimulatedFalseAlarms(checks, 400);

        Assert.InRange(alarms, checks == 1 ? 0.8 : 0.2, 1.2);
    }

    [Fact]
    public void Charts_find_a_shift_after_about_their_average_run_length()
    {
        var noise = new SimulatedNoise(8);
        double sumEwma = 0, sumCusum = 0;
        const int Runs = 400;
        for (int run = 0; run < Runs; run++)
        {
            var ewma = new EwmaChart(0.2, 2.962);
            for (; !ewma.Signals; sumEwma++) ewma.Add(1 + noise.Normal());
            var cusum = new CusumChart(0.5, 5);
            for (; !cusum.SignalsIncrease; sumCusum++) cusum.Add(1 + noise.Normal());
        }

        Assert.Equal(RunLength.OfEwma(0.2, 2.962, 1), sumEwma / Runs, 1.2);
        Assert.Equal(RunLength.OfCusum(0.5, 5, 1), sumCusum / Runs, 1.2);
    }

    [Fact]
    public void Regressors_that_depend_on_each_other_determine_nothing()
    {
        double[][] design = [.. Enumerable.Range(0, 10).Select(i => new double[] { 1, i, 2 * i })];

        Assert.Null(LeastSquares.Fit(design, new double[10]));
        Assert.Null(LeastSquares.Fit([[1, 2]], [3.0]));
    }

    [Fact]
    public void Prediction_interval_widens_away_from_the_data()
    {
        LeastSquares fit = LeastSquares.Fit([[1, 0], [1, 1], [1, 2], [1, 3]], [0.1, 0.9, 2.1, 2.9])!;

        Estimate inside = fit.Predict([1, 1.5]), outside = fit.Predict([1, 10]);

        Assert.Equal(1.5, inside.Value, 1e-12);
        Assert.True(outside.StandardUncertainty > 3 * inside.StandardUncertainty);
    }
}
