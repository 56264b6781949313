using LabWatch.Metrology.Radiometry;

namespace LabWatch.Metrology.Cavities;

/// <summary>
/// The weighted sum of 1 - L(T_i)/L(T_ref) over many zones of nearly one temperature. The radiance is interpolated between its values at 8 or 12 Chebyshev nodes of the
/// range, which costs less than as many radiances as there are zones. With a = half of ln(L_max/L_min) the error is 2 (a/2)^n/n! (as for an exponential): below 3e-12
/// relative in both cases; a wider range is computed directly.
/// </summary>
internal static class RadianceDeficit
{
    private const double NarrowHalf = 0.25;
    private const double WideHalf = 1.0;
    private static readonly double[] Cosines8 = Cosines(8);
    private static readonly double[] Cosines12 = Cosines(12);

    public static double Sum(ReadOnlySpan<double> weights, RadianceBand band, ReadOnlySpan<double> kelvin, double referenceKelvin)
    {
        double reference = band.Radiance(referenceKelvin), low = double.PositiveInfinity, high = double.NegativeInfinity;
        foreach (double t in kelvin)
        {
            if (t < low) low = t;
            if (t > high) high = t;
        }

        if (!(high > low)) return kelvin.IsEmpty ? 0 : Direct(weights, band, kelvin, reference);
        double half = band.Radiance(low) is > 0 and var least ? Math.Log(band.Radiance(high) / least) / 2 : double.PositiveInfinity;
        if (half < NarrowHalf && kelvin.Length > 12) return Interpolated(weights, band, kelvin, reference, low, high, 8, Cosines8);
        if (half < WideHalf && kelvin.Length > 18) return Interpolated(weights, band, kelvin, reference, low, high, 12, Cosines12);
        return Direct(weights, band, kelvin, reference);
    }

    private static double Direct(ReadOnlySpan<double> weights, RadianceBand band, ReadOnlySpan<double> kelvin, double reference)
    {
        double sum = 0;
        for (int i = 0; i < weights.Length; i++) sum += weights[i] * (1 - band.Radiance(kelvin[i]) / reference);
        return sum;
    }

    private static double Interpolated(
        ReadOnlySpan<double> weights, RadianceBand band, ReadOnlySpan<double> kelvin, double reference, double low, double high, int n, double[] cosines)
    {
        Span<double> values = stackalloc double[n], coefficients = stackalloc double[n];
        double middle = (low + high) / 2, reach = (high - low) / 2;
        for (int j = 0; j < n; j++) values[j] = 1 - band.Radiance(middle + reach * cosines[n + j]) / reference;
        for (int k = 0; k < n; k++)
        {
            double sum = 0;
            for (int j = 0; j < n; j++) sum += values[j] * cosines[k * n + j];
            coefficients[k] = sum * 2 / n;
        }

        double total = 0, scale = 2 / reach;
        for (int i = 0; i < weights.Length; i++)
        {
            // Clenshaw's recurrence.
            double twice = (kelvin[i] - middle) * scale, next = 0, after = 0;
            for (int k = n - 1; k > 0; k--) (next, after) = (coefficients[k] + twice * next - after, next);
            total += weights[i] * (coefficients[0] / 2 + twice / 2 * next - after);
        }

        return total;
    }

    /// <summary>cos(k pi (j + 1/2)/n), row k; row 1 holds the nodes themselves.</summary>
    private static double[] Cosines(int n)
    {
        double[] table = new double[n * n];
        for (int k = 0; k < n; k++)
        {
            for (int j = 0; j < n; j++) table[k * n + j] = Math.Cos(Math.PI * k * (j + 0.5) / n);
        }

        return table;
    }
}
