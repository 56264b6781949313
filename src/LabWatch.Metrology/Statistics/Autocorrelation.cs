namespace LabWatch.Metrology.Statistics;

/// <summary>Autocorrelation and what it leaves of a number of values.</summary>
public static class Autocorrelation
{
    /// <summary>Correlation of neighbouring values about the mean of all (G. E. P. Box and G. M. Jenkins); NaN for fewer than two values or without scatter.</summary>
    /// <param name="values">Evenly spaced finite values.</param>
    public static double OfNeighbours(ReadOnlySpan<double> values)
    {
        double mean = Summary.Of(values).Mean;
        CompensatedSum products = default, squares = default;
        for (int i = 0; i < values.Length; i++)
        {
            double d = values[i] - mean;
            squares.Add(d * d);
            if (i > 0) products.Add(d * (values[i - 1] - mean));
        }

        return squares.Value > 0 ? products.Value / squares.Value : double.NaN;
    }

    /// <summary>
    /// Number of independent values whose mean is as uncertain as that of n values of a first-order autoregressive process: n/(1 + 2 sum (1 - k/n) rho^k)
    /// (G. V. Bayley and J. M. Hammersley, J. R. Stat. Soc. Suppl. 8 (1946) 184-197), in closed form.
    /// </summary>
    /// <param name="n">Number of values, positive.</param>
    /// <param name="rho">Correlation of neighbours, above -1, below 1.</param>
    public static double EffectiveSampleSize(int n, double rho)
    {
        // sum over k of (1 - k/n) rho^k = rho/(1 - rho) - rho (1 - rho^n)/(n (1 - rho)^2).
        double left = 1 - rho;
        double sum = rho / left - rho * (1 - Math.Pow(rho, n)) / (n * left * left);
        return n / (1 + 2 * sum);
    }

    /// <summary>The same for long series: n (1 - rho)/(1 + rho).</summary>
    public static double AsymptoticSampleSize(int n, double rho) => n * (1 - rho) / (1 + rho);
}
