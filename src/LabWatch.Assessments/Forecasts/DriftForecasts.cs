using System.Security.Cryptography;
using System.Text;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;
using LabWatch.Metrology.Statistics;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Assessments.Forecasts;

/// <summary>
/// Makes forecasts out of the points of a source. The assessments of a UTC day make one mean, because within a day they share the room and the hand that set
/// the source; the days have first-order autoregressive noise (see <see cref="LinearTrend"/>), and the crossing has Fieller's interval (see <see cref="LimitCrossing"/>).
/// </summary>
internal static class DriftForecasts
{
    /// <summary>Days that a trend needs at least.</summary>
    public const int LeastDays = 5;

    private const double HoursPerYear = 365.25 * 24;
    private const double Probability = 0.95;

    /// <summary>No further than this is anything forecast: beyond, the line says nothing.</summary>
    public static TimeSpan Horizon { get; } = TimeSpan.FromDays(3653);

    /// <summary>The forecasts, the soonest crossing first.</summary>
    /// <param name="source">The source.</param>
    /// <param name="points">Its points.</param>
    /// <param name="upTo">Only windows that end up to then count; null for all.</param>
    public static IReadOnlyList<DriftForecast> Of(ReferenceSource source, IEnumerable<TrackedPoint> points, Instant? upTo = null) =>
    [
        .. points.Where(point => double.IsFinite(point.Value) && (upTo is not { } last || point.WindowEnd <= last))
            .GroupBy(point => point.Series)
            .Select(group => One(source, group.Key, [.. group.OrderBy(point => point.WindowEnd)]))
            .OrderBy(forecast => forecast.Expected ?? Instant.MaxValue)
            .ThenBy(forecast => forecast.Series.Criterion, StringComparer.Ordinal)
            .ThenBy(forecast => forecast.Series.Scope, StringComparer.Ordinal)
            .ThenBy(forecast => forecast.Series.Quantity, StringComparer.Ordinal)
            .ThenBy(forecast => forecast.Series.SetPointCelsius),
    ];

    private static DriftForecast One(ReferenceSource source, SeriesKey series, TrackedPoint[] all)
    {
        TrackedPoint[] points = Comparable(all);
        DayMean[] days = [.. points.GroupBy(point => point.WindowEnd.Microseconds / (24 * Instant.MicrosecondsPerHour)).Select(Mean)];
        double? limit = points[^1].Limit;
        double reference = TrackedQuantity.HasZero(series.Quantity) ? 0 : days.Take(Math.Min(days.Length, ChartRules.ReferenceDays)).Average(day => day.Value);
        string? band = source.Bands.Any(candidate => candidate.Id == series.Scope) ? series.Scope : source.FindChannel(series.Scope)?.Band;
        DriftForecast bare = new(
            series, band, days, reference, limit, Estimate.None, LinearTrend.None(days.Length), null, null, null, null, DriftCharts.Of(days), points.Length, Digest(points), string.Empty);
        DriftForecast made = days.Length < LeastDays ? bare : WithTrend(bare);
        return made with { Explanation = ForecastText.Of(made) };
    }

    private static DriftForecast WithTrend(DriftForecast bare)
    {
        long[] times = [.. bare.Days.Select(day => day.At.Microseconds)];
        double[] values = [.. bare.Days.Select(day => day.Value)];
        LinearTrend trend = LinearTrend.Fit(times, values);
        Estimate slope = new(trend.SlopePerHour.Value * HoursPerYear, trend.SlopePerHour.StandardUncertainty * HoursPerYear, trend.SlopePerHour.DegreesOfFreedom);
        DriftForecast made = bare with { Trend = trend, SlopePerYear = slope, MedianSlope = TheilSenTrend.Of(times, values, CorrelationTime(trend)) };
        return bare.Limit is { } limit ? WithCrossing(made, times, values, limit) : made;
    }

    /// <summary>Each limit by itself; the line reaches the one it moves to, chance may carry it to either.</summary>
    private static DriftForecast WithCrossing(DriftForecast made, long[] times, double[] values, double limit)
    {
        List<LimitCrossing> crossings = [LimitCrossing.Forecast(times, values, made.Reference + limit, Probability)];
        if (TrackedQuantity.IsSigned(made.Series.Quantity))
        {
            crossings.Add(LimitCrossing.Forecast(times, values, made.Reference - limit, Probability));
        }

        long end = times[^1] + (Horizon.Ticks / TimeSpan.TicksPerMicrosecond);
        Instant? Within(IEnumerable<long?> candidates) =>
            candidates.Where(time => time is { } value && value <= end).Min() is { } first ? new Instant(first) : null;
        Instant? expected = Within(crossings.Select(crossing => crossing.ExpectedMicros));
        return made with
        {
            Expected = expected,
            Earliest = Within(crossings.Select(crossing => crossing.EarliestMicros)),
            Latest = expected is { } due && made.IsSignificant
                ? Within(crossings.Where(crossing => crossing.ExpectedMicros == due.Microseconds).Select(crossing => crossing.LatestMicros))
                : null,
        };
    }

    /// <summary>How far apart two days must be to be correlated by less than 0.1.</summary>
    private static long CorrelationTime(in LinearTrend trend) =>
        trend.Autocorrelation > 0.1 ? (long)(trend.LagMicros * Math.Ceiling(Math.Log(0.1) / Math.Log(trend.Autocorrelation))) : 0;

    /// <summary>The points since certificates and baseline last changed: a step between two calibrations is no drift of the source.</summary>
    private static TrackedPoint[] Comparable(TrackedPoint[] points)
    {
        int first = points.Length - 1;
        while (first > 0 && points[first - 1].Basis == points[^1].Basis)
        {
            first--;
        }

        return points[first..];
    }

    private static DayMean Mean(IGrouping<long, TrackedPoint> day)
    {
        long start = day.Key * 24 * Instant.MicrosecondsPerHour;
        return new(new Instant(start + (long)day.Average(point => point.WindowEnd.Microseconds - start)), day.Average(point => point.Value), day.Count());
    }

    private static string Digest(TrackedPoint[] points) =>
        Convert.ToHexStringLower(SHA256.HashData(Encoding.UTF8.GetBytes(string.Concat(points.Select(point => point.Assessment + "\n")))));
}
