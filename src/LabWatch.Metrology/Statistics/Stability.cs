using System.Buffers;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Metrology.Statistics;

/// <summary>
/// Stability of a source in the senses that laboratories use: half-range over a window (by analogy with the 30 min half-range of EURAMET cg-13 for block calibrators),
/// standard deviation and slope (CCT-WG5 2008, uncertainty budgets for radiation-thermometer calibrations).
/// </summary>
public static class Stability
{
    /// <summary>Ten seconds in microseconds: the width of a bin in common use for a 30 min window (180 means).</summary>
    public const long TenSeconds = 10_000_000;

    /// <summary>Evaluates the readings of one window.</summary>
    /// <param name="timesMicros">Times in microseconds since 1970-01-01T00:00:00Z, never falling.</param>
    /// <param name="values">One value a time, any unit; NaN and infinities are skipped.</param>
    /// <param name="binMicros">Width of a bin in microseconds, positive.</param>
    /// <returns>The result; with fewer than three means slope and uncertainty are <see cref="Estimate.None"/> or NaN.</returns>
    /// <exception cref="ArgumentException">The spans differ in length, the width is not positive, or the times fall.</exception>
    public static StabilityResult Evaluate(ReadOnlySpan<long> timesMicros, ReadOnlySpan<double> values, long binMicros = TenSeconds)
    {
        long[] starts = ArrayPool<long>.Shared.Rent(Math.Max(1, timesMicros.Length));
        double[] means = ArrayPool<double>.Shared.Rent(Math.Max(1, timesMicros.Length));
        try
        {
            int bins = TimeBins.Means(timesMicros, values, binMicros, starts, means);
            return OfMeans(starts.AsSpan(0, bins), means.AsSpan(0, bins), binMicros, CountFinite(values));
        }
        finally
        {
            ArrayPool<long>.Shared.Return(starts);
            ArrayPool<double>.Shared.Return(means);
        }
    }

    private static StabilityResult OfMeans(ReadOnlySpan<long> starts, ReadOnlySpan<double> means, long binMicros, int readings)
    {
        if (means.IsEmpty) return new StabilityResult(Estimate.None, double.NaN, LinearTrend.None(0), 0, 0, 0, binMicros, 0, 0);
        Summary summary = Summary.Of(means);
        LinearTrend trend = LinearTrend.Fit(starts, means);
        var halfRange = new Estimate(summary.HalfRange, HalfRangeSampling.StandardUncertainty(starts, trend), Math.Max(1, trend.EffectiveSampleSize - 1));
        int spanned = checked((int)((starts[^1] - starts[0]) / binMicros + 1));
        return new StabilityResult(
            halfRange, summary.StandardDeviation, trend, means.Length, spanned - means.Length, readings, binMicros, starts[0], starts[^1]);
    }

    private static int CountFinite(ReadOnlySpan<double> values)
    {
        int count = 0;
        foreach (double value in values)
        {
            if (double.IsFinite(value)) count++;
        }

        return count;
    }
}
