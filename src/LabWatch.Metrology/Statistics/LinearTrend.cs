using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Metrology.Statistics;

/// <summary>A straight line through values over time, with errors that allow for autocorrelated noise.</summary>
/// <param name="SlopePerHour">Least-squares slope per hour with its standard error and degrees of freedom.</param>
/// <param name="Mean">Mean of the values (the height of the line at the mean time) with its standard error about the line.</param>
/// <param name="MeanTimeMicros">Mean of the times, microseconds since 1970-01-01T00:00:00Z, truncated.</param>
/// <param name="NoiseDeviation">Standard deviation of the noise about the line, corrected for what autocorrelated noise hides in the fit.</param>
/// <param name="Autocorrelation">Correlation of neighbouring residuals, corrected for the bias of short series, from 0 to below 1.</param>
/// <param name="LagMicros">The mean spacing of the neighbours that <paramref name="Autocorrelation"/> belongs to, microseconds.</param>
/// <param name="Count">Number of values used.</param>
/// <param name="EffectiveSampleSize">Number of independent values whose mean would be as uncertain, between 1 and <paramref name="Count"/>.</param>
public readonly record struct LinearTrend(
    Estimate SlopePerHour,
    Estimate Mean,
    long MeanTimeMicros,
    double NoiseDeviation,
    double Autocorrelation,
    double LagMicros,
    int Count,
    double EffectiveSampleSize)
{
    /// <summary>A trend of fewer than three values: no slope.</summary>
    public static LinearTrend None(int count) => new(Estimate.None, Estimate.None, 0, double.NaN, double.NaN, double.NaN, count, double.NaN);

    /// <summary>
    /// Fits a line by ordinary least squares and takes its errors from a stationary first-order autoregressive noise: the correlation of two residuals a time d apart
    /// is r^(d/lag), which holds across gaps as it stands.
    /// </summary>
    /// <remarks>
    /// r comes from the pairs of neighbours that lie at most 1.5 median spacings apart, so that a gap adds no pair, and is corrected for the bias that fitting a line
    /// leaves: E(r) = rho - (2 + 4 rho)/n (M. G. Kendall, Biometrika 41 (1954) 403-404, and F. H. C. Marriott and J. A. Pope, ibid. 390-402, for two fitted terms).
    /// A negative r counts as 0: the error is never made smaller than that of white noise.
    /// With R the correlation matrix, x the centred times and S = sum x^2: noise variance = SSR/(n - 1'R1/n - x'Rx/S), u(slope)^2 = variance x'Rx/S^2,
    /// n_eff = n^2/(1'R1), which for equal spacing is n/(1 + 2 sum (1 - k/n) rho^k) (G. V. Bayley and J. M. Hammersley, J. R. Stat. Soc. Suppl. 8 (1946) 184-197).
    /// The degrees of freedom are n_eff - 2, at least 1.
    /// </remarks>
    /// <param name="timesMicros">Times in microseconds since 1970-01-01T00:00:00Z, rising.</param>
    /// <param name="values">One finite value a time.</param>
    /// <exception cref="ArgumentException">The spans differ in length or a time does not rise.</exception>
    public static LinearTrend Fit(ReadOnlySpan<long> timesMicros, ReadOnlySpan<double> values) => LinearTrendFit.Run(timesMicros, values);
}
