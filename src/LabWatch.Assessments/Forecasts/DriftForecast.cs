using LabWatch.Lab.Time;
using LabWatch.Metrology.Statistics;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Assessments.Forecasts;

/// <summary>How a quantity has moved at one set point, and when it would reach its limit.</summary>
/// <param name="Series">What it is about.</param>
/// <param name="Band">Id of the working band; null where it is about none.</param>
/// <param name="Days">Day means since the basis of comparison last changed, oldest first.</param>
/// <param name="Reference">What the limits lie around: 0, or the mean of the first days where zero means nothing for the quantity.</param>
/// <param name="Limit">Distance of the limit from the reference, in the unit; null where none applies.</param>
/// <param name="SlopePerYear">Least-squares slope per 365.25 days with its standard error for first-order autoregressive noise; without a value below <see cref="DriftForecasts.LeastDays"/> days.</param>
/// <param name="Trend">The line through the day means.</param>
/// <param name="MedianSlope">Theil-Sen slope with the Mann-Kendall test, on days thinned beyond their correlation time; null below <see cref="DriftForecasts.LeastDays"/> days.</param>
/// <param name="Expected">When the line reaches the limit; null where it moves away, or not within <see cref="DriftForecasts.Horizon"/>.</param>
/// <param name="Earliest">Earliest end of the 95 % interval; null where the limit is not within reach.</param>
/// <param name="Latest">Latest end; null where it may never be reached.</param>
/// <param name="Chart">Where the control charts stand; null while there are too few days.</param>
/// <param name="Assessments">Number of assessments that it rests on.</param>
/// <param name="Digest">SHA-256 over their ids in the order of their windows, one a line.</param>
/// <param name="Explanation">All of it in plain words.</param>
public sealed record DriftForecast(
    SeriesKey Series,
    string? Band,
    IReadOnlyList<DayMean> Days,
    double Reference,
    double? Limit,
    Estimate SlopePerYear,
    LinearTrend Trend,
    TheilSenTrend? MedianSlope,
    Instant? Expected,
    Instant? Earliest,
    Instant? Latest,
    ChartState? Chart,
    int Assessments,
    string Digest,
    string Explanation)
{
    /// <summary>Coverage factor of the slope's expanded uncertainty.</summary>
    public double CoverageFactor => SlopePerYear.HasValue ? Metrology.Uncertainty.CoverageFactor.For(SlopePerYear.DegreesOfFreedom) : double.NaN;

    /// <summary>Whether the slope is larger than its expanded uncertainty.</summary>
    public bool IsSignificant => SlopePerYear.HasValue && Math.Abs(SlopePerYear.Value) > CoverageFactor * SlopePerYear.StandardUncertainty;
}
