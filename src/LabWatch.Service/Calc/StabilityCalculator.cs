using LabWatch.Metrology.Statistics;

namespace LabWatch.Service.Calc;

/// <summary>Stability of one window of readings.</summary>
internal sealed class StabilityCalculator : Calculator
{
    public override string Name => "stability";

    public override string Summary => "Half-range, standard deviation and slope of a window of readings, from means over bins of time.";

    public override IReadOnlyList<string> Formula { get; } =
    [
        "means over bins [k b, (k + 1) b) aligned to time zero; half-range = (largest mean - smallest mean)/2; standard deviation with n - 1",
        "slope by least squares; its standard error with noise of correlation r^(d/lag) between residuals a time d apart",
        "effective sample size = n^2/sum of all correlations; degrees of freedom = that less 2",
        "u(half-range): scatter over 512 (fewer above 195 means) simulated windows with the same line and noise, seeded",
        "white noise has an expected half-range of 2.05 sigma for 30 means and 3.4 sigma for 1800: state the sampling with it",
    ];

    public override IReadOnlyList<string> Source { get; } =
    [
        "EURAMET cg-13 by analogy (block calibrators); CCT-WG5 2008",
        "G. V. Bayley and J. M. Hammersley, J. R. Stat. Soc. Suppl. 8 (1946) 184-197; M. G. Kendall, Biometrika 41 (1954) 403-404",
        "B. Efron and R. J. Tibshirani, An Introduction to the Bootstrap, 1993, section 6.5",
    ];

    public override IReadOnlyList<CalcField> Fields { get; } =
    [
        CalcField.Numbers("value", "readings in any one unit, in the order of time; null for none") with { AllowsGaps = true },
        .. CalcTimes.Fields,
        CalcField.Positive("bin_s", "width of a bin, seconds; 10 where missing").Optional() with { Maximum = 1e9 },
    ];

    public override IReadOnlyList<(string Name, string Description)> Outputs { get; } =
    [
        ("half_range", "half-range of the means, unit of the readings"),
        ("u_half_range", "its standard uncertainty from the sampling of the noise"),
        ("standard_deviation", "standard deviation of the means"),
        ("slope_per_h", "slope per hour; null for fewer than three means"),
        ("u_slope_per_h", "its standard error, corrected for autocorrelation"),
        ("slope_degrees_of_freedom", "degrees of freedom of the slope"),
        ("mean", "mean of the means"),
        ("u_mean", "its standard error"),
        ("means", "number of means"),
        ("missing_means", "bins without a reading between the first and the last"),
        ("effective_sample_size", "number of independent means that would do as well"),
    ];

    public override string Example =>
        """{ "value": [80.012, 80.015, 80.011, 80.018, null, 80.02, 80.016, 80.021, 80.019, 80.024, 80.022, 80.025], "step_s": 10, "bin_s": 10 }""";

    public override void Evaluate(CalcInput input, CalcResult result)
    {
        double[] values = input.Numbers("value");
        if (CalcTimes.Read(input, values.Length) is not { } times) return;
        StabilityResult stability = Stability.Evaluate(times, values, Math.Max(1, (long)Math.Round(input.Number("bin_s", 10) * 1e6)));
        result.Add("half_range", "u_half_range", stability.HalfRange)
            .Add("standard_deviation", stability.StandardDeviation)
            .Add("slope_per_h", "u_slope_per_h", stability.SlopePerHour)
            .Add("slope_degrees_of_freedom", stability.SlopePerHour.DegreesOfFreedom)
            .Add("mean", "u_mean", stability.Mean)
            .Add("means", stability.MeanCount)
            .Add("missing_means", stability.MissingMeans)
            .Add("effective_sample_size", stability.EffectiveSampleSize)
            .Step("readings", stability.ReadingCount)
            .Step("neighbour_correlation", stability.Trend.Autocorrelation)
            .Step("lag_s", stability.Trend.LagMicros / 1e6)
            .Step("noise_deviation", stability.Trend.NoiseDeviation);
    }
}
