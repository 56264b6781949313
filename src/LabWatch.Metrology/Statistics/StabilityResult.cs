using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Metrology.Statistics;

/// <summary>How steady a quantity was over one window, from means over bins of time; every number is in the unit of the readings.</summary>
/// <param name="HalfRange">Half of the difference between the largest and the smallest mean, with the standard uncertainty that the noise of the window gives it.</param>
/// <param name="StandardDeviation">Sample standard deviation of the means about their mean (n - 1), drift included.</param>
/// <param name="Trend">Slope per hour with a standard error corrected for autocorrelation, mean, noise about the line, effective sample size.</param>
/// <param name="MeanCount">Number of means, that is of bins with at least one reading.</param>
/// <param name="MissingMeans">Bins without a reading between the first and the last bin.</param>
/// <param name="ReadingCount">Number of finite readings used.</param>
/// <param name="BinMicros">Width of a bin in microseconds: the sampling that the half-range belongs to.</param>
/// <param name="FirstBinMicros">Start of the first bin, microseconds since 1970-01-01T00:00:00Z; 0 without readings.</param>
/// <param name="LastBinMicros">Start of the last bin, microseconds since 1970-01-01T00:00:00Z; 0 without readings.</param>
public readonly record struct StabilityResult(
    Estimate HalfRange,
    double StandardDeviation,
    LinearTrend Trend,
    int MeanCount,
    int MissingMeans,
    int ReadingCount,
    long BinMicros,
    long FirstBinMicros,
    long LastBinMicros)
{
    /// <summary>Least-squares slope per hour with its standard error, corrected for autocorrelation.</summary>
    public Estimate SlopePerHour => Trend.SlopePerHour;

    /// <summary>Mean of the means, with the standard error of the mean.</summary>
    public Estimate Mean => Trend.Mean;

    /// <summary>Number of independent means whose average would be as uncertain.</summary>
    public double EffectiveSampleSize => Trend.EffectiveSampleSize;
}
