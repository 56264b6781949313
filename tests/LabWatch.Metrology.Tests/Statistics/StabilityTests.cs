using LabWatch.Metrology.Statistics;
using LabWatch.Metrology.Uncertainty;
using Xunit;

namespace LabWatch.Metrology.Tests.Statistics;

public sealed class StabilityTests
{
    private const long Second = 1_000_000;
    private const long Start = 1_700_000_000_000_000;

    [Fact]
    public void Readings_of_a_bin_are_averaged_and_empty_bins_are_left_out()
    {
        long[] times = [Start, Start + Second, Start + 9_999_999, Start + 10 * Second, Start + 30 * Second];
        double[] values = [1, 2, 6, double.NaN, 5];

        StabilityResult result = Stability.Evaluate(times, values);

        Assert.Equal(2, result.MeanCount);
        Assert.Equal(2, result.MissingMeans);
        Assert.Equal(4, result.ReadingCount);
        Assert.Equal(1.0, result.HalfRange.Value);
        Assert.Equal(Start, result.FirstBinMicros);
        Assert.Equal(Start + 30 * Second, result.LastBinMicros);
    }

    [Theory]
    [InlineData(-1, -10)]
    [InlineData(-10, -10)]
    [InlineData(0, 0)]
    [InlineData(9, 0)]
    [InlineData(10, 10)]
    public void Bins_are_aligned_to_the_epoch_on_both_sides(long time, long start) => Assert.Equal(start, TimeBins.StartOf(time, 10));

    [Fact]
    public void No_reading_gives_no_value()
    {
        StabilityResult result = Stability.Evaluate([], []);

        Assert.False(result.HalfRange.HasValue);
        Assert.False(result.SlopePerHour.HasValue);
        Assert.Equal(0, result.MeanCount);
    }

    [Fact]
    public void One_reading_has_a_half_range_of_zero_and_no_slope()
    {
        StabilityResult result = Stability.Evaluate([Start], [7.0]);

        Assert.Equal(0, result.HalfRange.Value);
        Assert.True(double.IsNaN(result.HalfRange.StandardUncertainty));
        Assert.False(result.SlopePerHour.HasValue);
    }

    [Fact]
    public void Falling_times_and_unequal_lengths_are_refused()
    {
        Assert.Throws<ArgumentException>(() => Stability.Evaluate([Start, Start - 20 * Second], [1, 2]));
        Assert.Throws<ArgumentException>(() => Stability.Evaluate([Start], [1, 2]));
        Assert.Throws<ArgumentOutOfRangeException>(() => Stability.Evaluate([Start], [1], 0));
    }

    [Fact]
    public void An_exact_ramp_has_its_slope_and_no_error()
    {
        (long[] times, double[] values) = Series(180, i => 0.36 * i / 360.0);

        StabilityResult result = Stability.Evaluate(times, values);

        Assert.Equal(0.36, result.SlopePerHour.Value, 1e-12);
        Assert.Equal(0, result.SlopePerHour.StandardUncertainty, 1e-12);
        Assert.Equal(0.36 * 179 / 360 / 2, result.HalfRange.Value, 1e-12);
    }

    [Theory]
    [InlineData(30, 2.05)] // Expected range of 30 normal values, d2/2 = 4.086/2 (Tippett 1925, table of d2)
    [InlineData(1800, 3.4)] // the same for 1800
    public void White_noise_has_the_expected_half_range(int means, double expected)
    {
        var noise = new SimulatedNoise(1);
        double sum = 0;
        const int Windows = 400;
        for (int w = 0; w < Windows; w++) sum += Summary.Of(noise.Autoregressive(means, 0)).HalfRange;

        Assert.Equal(expected, sum / Windows, 0.05);
    }

    // Source: the scatter of half-ranges in simulated windows; the noise comes from another generator than the one inside.
    [Theory]
    [InlineData(30, 0.0, 0.0)]
    [InlineData(180, 0.0, 0.0)]
    [InlineData(180, 0.7, 0.0)]
    [InlineData(180, 0.0, 4.0)]
    [InlineData(180, 0.7, 4.0)]
    [InlineData(60, 0.4, 20.0)]
    public void Uncertainty_of_the_half_range_is_its_scatter_over_like_windows(int means, double rho, double drift)
    {
        var noise = new SimulatedNoise(2);
        const int Windows = 300;
        double[] halfRanges = new double[Windows];
        double stated = 0;
        for (int w = 0; w < Windows; w++)
        {
            double[] series = noise.Autoregressive(means, rho);
            (long[] times, double[] values) = Series(means, i => series[i] + drift * i / means);
            halfRanges[w] = Summary.Of(values).HalfRange;
            if (w % 10 == 0) stated += Stability.Evaluate(times, values).HalfRange.StandardUncertainty / (Windows / 10);
        }

        double seen = Summary.Of(halfRanges).StandardDeviation;
        Assert.InRange(stated / seen, 0.85, 1.15);
    }

    [Theory]
    [InlineData(180, 0.0, false)]
    [InlineData(180, 0.5, false)]
    [InlineData(180, 0.9, false)]
    [InlineData(180, 0.5, true)]
    [InlineData(40, 0.3, false)]
    public void Slope_lies_inside_its_95_percent_interval_in_about_95_percent_of_windows(int means, double rho, bool gaps)
    {
        var noise = new SimulatedNoise(3);
        const int Windows = 1000;
        int inside = 0;
        for (int w = 0; w < Windows; w++)
        {
            double[] series = noise.Autoregressive(means, rho);
            int[] kept = [.. Enumerable.Range(0, means).Where(i => !gaps || i is <= 40 or >= 90 && i % 7 != 3)];
            Estimate slope = LinearTrend.Fit([.. kept.Select(i => Start + 10 * Second * i)], [.. kept.Select(i => series[i])]).SlopePerHour;
            double k = MathNet.Numerics.Distributions.StudentT.InvCDF(0, 1, slope.DegreesOfFreedom, 0.975);
            if (Math.Abs(slope.Value) <= k * slope.StandardUncertainty) inside++;
        }

        TestContext.Current.TestOutputHelper?.WriteLine($"{inside} of {Windows}");
        Assert.InRange(inside / (double)Windows, 0.925, 0.98);
    }

    [Theory]
    [InlineData(50, 0.5)]
    [InlineData(100, 0.8)]
    [InlineData(180, 0.9)]
    public void Autocorrelation_is_nearly_free_of_bias(int means, double rho)
    {
        var noise = new SimulatedNoise(4);
        double sum = 0;
        for (int w = 0; w < 1000; w++)
        {
            double[] series = noise.Autoregressive(means, rho);
            (long[] times, double[] values) = Series(means, i => series[i]);
            sum += LinearTrend.Fit(times, values).Autocorrelation / 1000;
        }

        Assert.Equal(rho, sum, 0.02);
    }

    [Fact]
    public void A_shift_of_all_times_by_whole_bins_changes_nothing_else()
    {
        double[] series = new SimulatedNoise(5).Autoregressive(180, 0.6);
        (long[] times, double[] values) = Series(180, i => series[i]);
        long[] shifted = [.. times.Select(t => t + 86_400 * Second)];

        StabilityResult a = Stability.Evaluate(times, values), b = Stability.Evaluate(shifted, values);

        Assert.Equal(a.HalfRange, b.HalfRange);
        Assert.Equal(a.SlopePerHour, b.SlopePerHour);
        Assert.Equal(a.EffectiveSampleSize, b.EffectiveSampleSize);
    }

    private static (long[] Times, double[] Values) Series(int count, Func<int, double> value) =>
        ([.. Enumerable.Range(0, count).Select(i => Start + 10 * Second * i)], [.. Enumerable.Range(0, count).Select(value)]);
}
