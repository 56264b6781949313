using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Metrology.Statistics;

/// <summary>When a drifting quantity will reach a limit, with an interval.</summary>
/// <param name="ExpectedMicros">Time at which the line reaches the limit, microseconds since 1970-01-01T00:00:00Z; null where it moves away or stands still.</param>
/// <param name="EarliestMicros">Earliest time of the interval; null where the limit may never be reached.</param>
/// <param name="LatestMicros">Latest time of the interval; null where it may never be reached, as while the slope is not significant.</param>
/// <param name="Trend">The line.</param>
public readonly record struct LimitCrossing(long? ExpectedMicros, long? EarliestMicros, long? LatestMicros, LinearTrend Trend)
{
    private const double MicrosPerHour = 3.6e9;

    /// <summary>
    /// Forecasts from a line with first-order autoregressive noise. The interval is Fieller's (E. C. Fieller, J. R. Stat. Soc. B 16 (1954) 175-185): all times at
    /// which the line, within k standard errors, may lie at the limit; it is open where the slope is not significant. Only what lies after the last value counts.
    /// </summary>
    /// <param name="timesMicros">Times in microseconds since 1970-01-01T00:00:00Z, rising.</param>
    /// <param name="values">One finite value a time.</param>
    /// <param name="limit">The limit in the unit of the values.</param>
    /// <param name="probability">Probability of the interval, above 0, below 1.</param>
    public static LimitCrossing Forecast(ReadOnlySpan<long> timesMicros, ReadOnlySpan<double> values, double limit, double probability = 0.95)
    {
        LinearTrend trend = LinearTrend.Fit(timesMicros, values);
        if (!trend.SlopePerHour.HasValue) return new LimitCrossing(null, null, null, trend);
        double k = StudentDistribution.UpperQuantile((1 - probability) / 2, trend.SlopePerHour.DegreesOfFreedom);
        double now = (timesMicros[^1] - trend.MeanTimeMicros) / MicrosPerHour;
        double distance = limit - trend.Mean.Value, slope = trend.SlopePerHour.Value;
        double expected = distance / slope;
        (double early, double late) = Interval(distance, slope, k * trend.Mean.StandardUncertainty, k * trend.SlopePerHour.StandardUncertainty, now);
        return new LimitCrossing(At(trend, expected >= now ? expected : double.NaN), At(trend, early), At(trend, late), trend);
    }

    /// <summary>Hours x from the mean time, at or after now, with (distance - slope x)^2 at most margin^2 + steepness^2 x^2; NaN or infinite where there are none.</summary>
    private static (double Early, double Late) Interval(double distance, double slope, double margin, double steepness, double now)
    {
        bool MayBe(double x) => (distance - slope * x) * (distance - slope * x) <= margin * margin + steepness * steepness * x * x;
        double a = slope * slope - steepness * steepness, b = -distance * slope, c = distance * distance - margin * margin;
        double root = b * b - a * c;
        double[] edges = root < 0 || a == 0 ? [] : [(-b - Math.Sqrt(root)) / a, (-b + Math.Sqrt(root)) / a];
        double early = MayBe(now) ? now : edges.Where(x => x > now).DefaultIfEmpty(double.NaN).Min();
        // A significant slope closes the interval; otherwise the limit may be reached late or never.
        double late = a > 0 ? edges.Where(x => x >= now).DefaultIfEmpty(double.NaN).Max() : double.PositiveInfinity;
        return (early, late);
    }

    private static long? At(LinearTrend trend, double hours)
    {
        double micros = trend.MeanTimeMicros + hours * MicrosPerHour;
        return double.IsFinite(micros) && Math.Abs(micros) < 9e18 ? (long)micros : null;
    }
}
