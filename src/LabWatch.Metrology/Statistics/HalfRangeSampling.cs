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
    private const ulong Seed = 0x5354_4142;
    private const int MostDraws = 100_000;

    public static double StandardUncertainty(ReadOnlySpan<long> timesMicros, in LinearTrend trend)
    {
        double sigma = trend.NoiseDeviation;
        if (double.IsNaN(sigma)) return double.NaN;
        if (sigma <= 0) return 0;
        int replicates = Math.Clamp(MostDraws / timesMicros.Length, 128, 512);
        var random = new Xoshiro256(Seed);
        double sum = 0, squares = 0;
        for (int i = 0; i < replicates; i++)
        {
            // In units of sigma and about the order of one, so plain sums lose nothing.
            double halfRange = Draw(timesMicros, trend, sigma, ref random);
            sum += halfRange;
            squares += halfRange * halfRange;
        }

        double mean = sum / replicates;
        return sigma * Math.Sqrt(Math.Max(0, squares / replicates - mean * mean) * replicates / (replicates - 1));
    }

    private static double Draw(ReadOnlySpan<long> timesMicros, in LinearTrend trend, double sigma, ref Xoshiro256 random)
    {
        double slope = trend.SlopePerHour.Value / sigma / 3.6e9;
        double noise = random.NextNormal(), min = noise, max = noise;
        double step = -1, decay = 0, fresh = 1;
        for (int i = 1; i < timesMicros.Length; i++)
        {
            double gap = timesMicros[i] - timesMicros[i - 1];
            if (gap != step)
            {
                step = gap;
                decay = trend.Autocorrelation > 0 ? Math.Pow(trend.Autocorrelation, gap / trend.LagMicros) : 0;
                fresh = Math.Sqrt(1 - decay * decay);
            }

            noise = decay * noise + fresh * random.NextNormal();
            double value = noise + slope * (timesMicros[i] - timesMicros[0]);
            min = Math.Min(min, value);
            max = Math.Max(max, value);
        }

        return (max - min) / 2;
    }
}
