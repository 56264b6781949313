using LabWatch.Assessments.Forecasts;
using LabWatch.Lab.Time;
using LabWatch.Service.Api.Views;

namespace LabWatch.Service.Api.Insight;

/// <summary>Forecasts as the API shows them.</summary>
internal static class ForecastViews
{
    private const double DaysPerYear = 365.25;
    private const double MicrosecondsPerHour = Instant.MicrosecondsPerHour;

    /// <summary>One forecast.</summary>
    public static ForecastView Of(DriftForecast forecast)
    {
        bool hasTrend = forecast.SlopePerYear.HasValue;
        return new(
            forecast.Series.Criterion,
            forecast.Series.Scope,
            forecast.Band,
            forecast.Series.Quantity,
            forecast.Series.Unit,
            Numbers.OrNull(forecast.Series.SetPointCelsius),
            forecast.Reference,
            forecast.Limit,
            [.. forecast.Days.Select(day => new DayMeanView(day.At, day.Value, day.Count))],
            hasTrend && double.IsFinite(forecast.CoverageFactor * forecast.SlopePerYear.StandardUncertainty)
                ? new(forecast.SlopePerYear.Value, forecast.CoverageFactor * forecast.SlopePerYear.StandardUncertainty, forecast.CoverageFactor)
                : null,
            forecast.IsSignificant,
            forecast.MedianSlope is { } median ? Numbers.OrNull(median.SlopePerDay * DaysPerYear) : null,
            forecast.MedianSlope is { } tested ? Numbers.OrNull(tested.Test.Probability) : null,
            hasTrend ? Numbers.OrNull(forecast.Trend.Autocorrelation) : null,
            hasTrend ? [Height(forecast, forecast.Days[0].At), Height(forecast, forecast.Days[^1].At)] : null,
            forecast.Expected,
            forecast.Earliest,
            forecast.Latest,
            forecast.Chart is { } chart ? Of(chart) : null,
            forecast.Assessments,
            forecast.Digest,
            forecast.Explanation);
    }

    private static double Height(DriftForecast forecast, Instant at) =>
        forecast.Trend.Mean.Value + (forecast.Trend.SlopePerHour.Value * (at.Microseconds - forecast.Trend.MeanTimeMicros) / MicrosecondsPerHour);

    private static ChartStateView Of(ChartState chart) => new(
        chart.ReferenceDays,
        chart.ChartedDays,
        chart.Target,
        chart.StandardDeviation,
        chart.Autocorrelation,
        chart.Ewma,
        chart.EwmaLimit,
        ChartRules.RunLength,
        ChartRules.EwmaRunLengthAtOne,
        chart.CusumUpper,
        chart.CusumLower,
        chart.CusumLimit,
        ChartRules.RunLength,
        ChartRules.CusumRunLengthAtOne,
        chart.Signal,
        chart.SignalsSince);
}
