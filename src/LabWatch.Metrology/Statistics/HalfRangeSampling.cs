using System.Buffers;

namespace LabWatch.Metrology.Statistics;

/// <summary>
/// The standard uncertainty of a half-range from the sampling of the noise: by how much it would scatter over windows with the same drift and the same noise.
/// </summary>
/// <remarks>
/// Model: value = fitted line + stationary first-order autoregressive normal noise with the standard deviation and the correlation that the window itself shows,
/// at the times that have a mean. The scatter is taken from a seeded parametric bootstrap (B. Efron and R. J. Tibshirani, An Introduction to the Bootstrap, 1993,
/// section 6.5), because no closed form holds for drift, correlation and gaps together; for white noise without drift it agrees with d3(n)/2 times sigma.
/// Errors that all readings of the window share (calibration, emissivity) cancel in a half-range and are not in it.
/// </remarks>
internal static class HalfRangeSampling
{
    private const int MostDraws = 100_000;

    public static double StandardUncertainty(ReadOnlySpan<long> timesMicros, in LinearTrend trend)
    {
        double sigma = trend.NoiseDeviation;
        if (double.IsNaN(sigma)) return double.NaN;
        if (sigma <= 0) return 0;
        int n = timesMicros.Length;
        double[] buffer = ArrayPool<double>.Shared.Rent(3 * n);
        Span<double> decay = buffer.AsSpan(0, n), fresh = buffer.AsSpan(n, n), drift = buffer.AsSpan(2 * n, n);
        Model(timesMicros, trend, sigma, decay, fresh, drift);
        int replicates = Math.Clamp(MostDraws / n, 128, 512);
        ReadOnlySpan<double> normals = SeededNormals.First(replicates * n);
        double sum = 0, squares = 0;
        for (int i = 0; i < replicates; i++)
        {
            // In units of sigma and about the order of one, so plain sums lose nothing.
            double halfRange = Draw(normals.Slice(i * n, n), decay, fresh, drift);
            sum += halfRange;
            squares += halfRange * halfRange;
        }

        ArrayPool<double>.Shared.Return(buffer);
        double mean = sum / replicates;
        return sigma * Math.Sqrt(Math.Max(0, squares / replicates - mean * mean) * replicates / (replicates - 1));
    }

    /// <summary>What every replicate has in common: how much noise is kept from one time to the next, how much is new, and the drift in units of sigma.</summary>
    private static void Model(ReadOnlySpan<long> timesMicros, in LinearTrend trend, double sigma, Span<double> decay, Span<double> fresh, Span<double> drift)
    {
        double slope = trend.SlopePerHour.Value / sigma / 3.6e9;
        double step = -1;
        (decay[0], fresh[0], drift[0]) = (0, 1, 0);
        for (int i = 1; i < timesMicros.Length; i++)
        {
            double gap = timesMicros[i] - timesMicros[i - 1];
            bool same = gap == step && i > 1;
            decay[i] = same ? decay[i - 1] : trend.Autocorrelation > 0 ? Math.Pow(trend.Autocorrelation, gap / trend.LagMicros) : 0;
            fresh[i] = same ? fresh[i - 1] : Math.Sqrt(1 - decay[i] * decay[i]);
            drift[i] = slope * (timesMicros[i] - timesMicros[0]);
            step = gap;
        }
    }

    private static double Draw(ReadOnlySpan<double> normals, ReadOnlySpan<double> decay, ReadOnlySpan<double> fresh, ReadOnlySpan<double> drift)
    {
        double noise = normals[0], min = noise, max = noise;
        for (int i = 1; i < normals.Length; i++)
        {
            noise = decay[i] * noise + fresh[i] * normals[i];
            double value = noise + drift[i];
            min = value < min ? value : min;
            max = value > max ? value : max;
        }

        return (max - min) / 2;
    }
}
