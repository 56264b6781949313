using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Metrology.Statistics;

/// <summary>
/// The trend of a long record that a few wrong values do not move: the median of the slopes of all pairs (H. Theil, 1950; P. K. Sen, J. Am. Stat. Assoc. 63 (1968)
/// 1379-1389) with the Mann-Kendall test and its interval (R. O. Gilbert, 1987, section 16.5). Values nearer than the correlation time are thinned out first.
/// </summary>
/// <param name="SlopePerDay">Median slope per day of 86 400 s.</param>
/// <param name="LowerPerDay">Lower end of the interval of the slope.</param>
/// <param name="UpperPerDay">Upper end of the interval of the slope.</param>
/// <param name="Test">The test for a trend.</param>
/// <param name="Count">Number of values after thinning.</param>
public readonly record struct TheilSenTrend(double SlopePerDay, double LowerPerDay, double UpperPerDay, MannKendall Test, int Count)
{
    private const double MicrosPerDay = 8.64e10;

    /// <summary>Most values that all pairs are made of; a longer record is thinned further.</summary>
    public const int MostValues = 1500;

    /// <summary>Finds the trend.</summary>
    /// <param name="timesMicros">Times in microseconds since 1970-01-01T00:00:00Z, rising.</param>
    /// <param name="values">One value a time; NaN is skipped.</param>
    /// <param name="correlationMicros">Correlation time in microseconds; of values nearer than this only the first is used. 0 or more.</param>
    /// <param name="probability">Probability of the interval, above 0, below 1.</param>
    public static TheilSenTrend Of(ReadOnlySpan<long> timesMicros, ReadOnlySpan<double> values, long correlationMicros, double probability = 0.95)
    {
        if (timesMicros.Length != values.Length) throw new ArgumentException("One value for each time is needed.", nameof(values));
        (double[] days, double[] kept) = Thin(timesMicros, values, correlationMicros);
        int n = kept.Length;
        MannKendall test = MannKendall.Of(kept);
        if (n < 3) return new TheilSenTrend(double.NaN, double.NaN, double.NaN, test, n);
        double[] slopes = new double[n * (n - 1) / 2];
        int pair = 0;
        for (int i = 0; i < n; i++)
        {
            for (int j = i + 1; j < n; j++) slopes[pair++] = (kept[j] - kept[i]) / (days[j] - days[i]);
        }

        double median = Median.InPlace(slopes);
        double reach = NormalDistribution.UpperQuantile((1 - probability) / 2) * Math.Sqrt(Math.Max(0, test.Variance));
        int low = (int)Math.Floor((slopes.Length - reach) / 2) - 1, high = (int)Math.Ceiling((slopes.Length + reach) / 2);
        return new TheilSenTrend(median, slopes[Math.Max(0, low)], slopes[Math.Min(slopes.Length - 1, high)], test, n);
    }

    private static (double[] Days, double[] Values) Thin(ReadOnlySpan<long> times, ReadOnlySpan<double> values, long apart)
    {
        List<int> kept = [];
        for (int i = 0; i < values.Length; i++)
        {
            if (double.IsFinite(values[i]) && (kept.Count == 0 || times[i] - times[kept[^1]] >= Math.Max(1, apart))) kept.Add(i);
        }

        int stride = (kept.Count + MostValues - 1) / MostValues;
        List<double> days = [], used = [];
        for (int i = 0; i < kept.Count; i += Math.Max(1, stride))
        {
            days.Add((times[kept[i]] - times[kept[0]]) / MicrosPerDay);
            used.Add(values[kept[i]]);
        }

        return ([.. days], [.. used]);
    }
}
