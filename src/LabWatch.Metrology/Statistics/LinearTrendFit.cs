using System.Buffers;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Metrology.Statistics;

/// <summary>The arithmetic of <see cref="LinearTrend.Fit"/>.</summary>
internal static class LinearTrendFit
{
    private const double MicrosPerHour = 3.6e9;

    // A correlation nearer to one cannot be told from a random walk in any window that is assessed here; it keeps the sums finite.
    private const double LargestCorrelation = 0.999;

    public static LinearTrend Run(ReadOnlySpan<long> timesMicros, ReadOnlySpan<double> values)
    {
        if (timesMicros.Length != values.Length) throw new ArgumentException("One value for each time is needed.", nameof(values));
        int n = values.Length;
        if (n < 3) return LinearTrend.None(n);
        double[] buffer = ArrayPool<double>.Shared.Rent(2 * n);
        try
        {
            Span<double> x = buffer.AsSpan(0, n), residuals = buffer.AsSpan(n, n);
            double meanTime = CentredHours(timesMicros, x);
            double mean = Summary.Of(values).Mean;
            (double slope, double sxx) = Slope(x, values, mean);
            for (int i = 0; i < n; i++) residuals[i] = values[i] - mean - slope * x[i];
            (double r, double lag) = Correlation(x, residuals);
            return Result(x, residuals, slope, sxx, mean, timesMicros[0] + (long)meanTime, r, lag);
        }
        finally
        {
            ArrayPool<double>.Shared.Return(buffer);
        }
    }

    private static LinearTrend Result(ReadOnlySpan<double> x, ReadOnlySpan<double> residuals, double slope, double sxx, double mean, long meanTime, double r, double lag)
    {
        int n = x.Length;
        (double ones, double times) = CorrelationSums(x, r, lag);
        CompensatedSum ssr = default;
        foreach (double e in residuals) ssr.Add(e * e);
        double left = n - ones / n - times / sxx;
        double variance = left > 0 ? ssr.Value / left : double.PositiveInfinity;
        double effective = Math.Min(n, (double)n * n / ones);
        double degrees = Math.Max(1, effective - 2);
        return new LinearTrend(
            new Estimate(slope, Math.Sqrt(variance * times) / sxx, degrees),
            new Estimate(mean, Math.Sqrt(variance / effective), degrees),
            meanTime,
            Math.Sqrt(variance),
            r,
            lag * MicrosPerHour,
            n,
            effective);
    }

    /// <summary>Times in hours from their mean; differences are taken as integers first, so a shift of all times changes nothing.</summary>
    private static double CentredHours(ReadOnlySpan<long> timesMicros, Span<double> x)
    {
        CompensatedSum sum = default;
        for (int i = 0; i < x.Length; i++)
        {
            if (i > 0 && timesMicros[i] <= timesMicros[i - 1]) throw new ArgumentException("Times must rise.", nameof(timesMicros));
            x[i] = timesMicros[i] - timesMicros[0];
            sum.Add(x[i]);
        }

        double mean = sum.Value / x.Length;
        for (int i = 0; i < x.Length; i++) x[i] = (x[i] - mean) / MicrosPerHour;
        return mean;
    }

    private static (double Slope, double Sxx) Slope(ReadOnlySpan<double> x, ReadOnlySpan<double> values, double mean)
    {
        CompensatedSum sxx = default, sxy = default;
        for (int i = 0; i < x.Length; i++)
        {
            sxx.Add(x[i] * x[i]);
            sxy.Add(x[i] * (values[i] - mean));
        }

        return (sxy.Value / sxx.Value, sxx.Value);
    }

    /// <summary>Correlation of neighbours without those across gaps, and their mean spacing in hours.</summary>
    private static (double R, double Lag) Correlation(ReadOnlySpan<double> x, ReadOnlySpan<double> residuals)
    {
        int n = x.Length, pairs = 0;
        double limit = 1.5 * MedianSpacing(x);
        CompensatedSum products = default, squares = default, spacing = default;
        for (int i = 0; i < n; i++)
        {
            squares.Add(residuals[i] * residuals[i]);
            if (i == 0 || x[i] - x[i - 1] > limit) continue;
            products.Add(residuals[i] * residuals[i - 1]);
            spacing.Add(x[i] - x[i - 1]);
            pairs++;
        }

        double lag = spacing.Value / pairs;
        if (squares.Value <= 0 || n < 5) return (0, lag);
        double raw = products.Value / (pairs + 1) / (squares.Value / n);
        return (Math.Clamp((n * raw + 2) / (n - 4), 0, LargestCorrelation), lag);
    }

    private static double MedianSpacing(ReadOnlySpan<double> x)
    {
        double[] buffer = ArrayPool<double>.Shared.Rent(x.Length - 1);
        Span<double> spacing = buffer.AsSpan(0, x.Length - 1);
        for (int i = 0; i < spacing.Length; i++) spacing[i] = x[i + 1] - x[i];
        spacing.Sort();
        double median = spacing[spacing.Length / 2];
        ArrayPool<double>.Shared.Return(buffer);
        return median;
    }

    /// <summary>The sums 1'R1 and x'Rx for R = r^(d/lag), in one pass: the correlated sum over all earlier times decays by r^(step/lag) at each step.</summary>
    private static (double Ones, double Times) CorrelationSums(ReadOnlySpan<double> x, double r, double lag)
    {
        CompensatedSum ones = default, times = default;
        double earlierOnes = 0, earlierTimes = 0;
        for (int i = 0; i < x.Length; i++)
        {
            if (i > 0 && r > 0)
            {
                double decay = Math.Pow(r, (x[i] - x[i - 1]) / lag);
                earlierOnes = decay * (earlierOnes + 1);
                earlierTimes = decay * (earlierTimes + x[i - 1]);
            }

            ones.Add(1 + 2 * earlierOnes);
            times.Add(x[i] * (x[i] + 2 * earlierTimes));
        }

        return (ones.Value, times.Value);
    }
}
