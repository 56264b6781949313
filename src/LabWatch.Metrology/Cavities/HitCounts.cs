namespace LabWatch.Metrology.Cavities;

/// <summary>
/// What one trace of a geometry, view and diffuse fraction found: the mean number of hits in each zone after k earlier reflections, and the mean number of escapes at
/// that reflection. It serves every wall emissivity, wavelength and temperature profile.
/// </summary>
public sealed class HitCounts
{
    private readonly double[][] _counts;
    private readonly double[] _escapes;
    private readonly double[][]? _replicateEscapes;

    internal HitCounts(
        ZoneGrid grid, CavityMethod method, double diffuseFraction, double[][] counts, double[] escapes, double relativeError, double[][]? replicateEscapes = null)
    {
        (Grid, Method, DiffuseFraction, RelativeError) = (grid, method, diffuseFraction, relativeError);
        (_counts, _escapes, _replicateEscapes) = (counts, escapes, replicateEscapes);
    }

    /// <summary>The zones.</summary>
    public ZoneGrid Grid { get; }

    /// <summary>The method that made the counts.</summary>
    public CavityMethod Method { get; }

    /// <summary>Diffuse fraction of the reflection that the counts hold for.</summary>
    public double DiffuseFraction { get; }

    /// <summary>Estimated numerical error of 1 - e_eff, relative, apart from the Monte Carlo standard error.</summary>
    public double RelativeError { get; }

    /// <summary>Number of reflections followed; later ones go on in a fixed ratio.</summary>
    public int Depth => _counts.Length;

    /// <summary>Mean hits in each zone after <paramref name="reflections"/> earlier reflections.</summary>
    public ReadOnlySpan<double> Hits(int reflections) => _counts[reflections];

    /// <summary>Mean escapes through the aperture at the reflection after <paramref name="reflections"/> earlier ones.</summary>
    public double Escapes(int reflections) => _escapes[reflections];

    /// <summary>The zone weights and 1 - e_eff for one emissivity of all walls.</summary>
    /// <param name="emissivity">Wall emissivity, above 0, at most 1.</param>
    public ZoneWeights Weights(double emissivity)
    {
        if (!(emissivity > 0 && emissivity <= 1)) throw new ArgumentOutOfRangeException(nameof(emissivity), "An emissivity lies above 0 and is at most 1.");
        double rho = 1 - emissivity;
        int zones = Grid.Zones.Count, last = Depth - 1;
        double[] weights = new double[zones], slopes = new double[zones];
        double power = 1;
        for (int k = 0; k < Depth; k++)
        {
            // w = e sum rho^k H_k, dw/de = sum (rho^k - k e rho^(k-1)) H_k.
            double slope = power - (k == 0 ? 0 : k * emissivity * Math.Pow(rho, k - 1));
            for (int i = 0; i < zones; i++)
            {
                weights[i] += emissivity * power * _counts[k][i];
                slopes[i] += slope * _counts[k][i];
            }

            power *= rho;
        }

        // All later orders: sum over m >= 1 of rho^(last + m) ratio^m H_last.
        double ratio = TailRatio(), closed = 1 - rho * ratio;
        double tail = power * ratio / closed;
        double tailSlope = tail - emissivity * Math.Pow(rho, last) * ratio * (Depth * closed + rho * ratio) / (closed * closed);
        for (int i = 0; i < zones; i++)
        {
            weights[i] += emissivity * tail * _counts[last][i];
            slopes[i] += tailSlope * _counts[last][i];
        }

        return new ZoneWeights(this, emissivity, weights, slopes, Complement(_escapes, rho, ratio), StandardError(rho, ratio));
    }

    /// <summary>Ratio of the hits of two successive late reflections: the slowest mode of the cavity.</summary>
    private double TailRatio()
    {
        if (Depth < 2) return 0;
        double before = _counts[Depth - 2].Sum(), after = _counts[Depth - 1].Sum();
        return before > 0 ? Math.Clamp(after / before, 0, 1) : 0;
    }

    private double StandardError(double rho, double ratio)
    {
        if (_replicateEscapes is not { Length: > 1 } replicates) return 0;
        double[] values = [.. replicates.Select(escapes => Complement(escapes, rho, ratio))];
        return Statistics.Summary.Of(values).StandardDeviation / Math.Sqrt(values.Length);
    }

    private static double Complement(double[] escapes, double rho, double ratio)
    {
        double sum = 0, power = rho;
        foreach (double escape in escapes)
        {
            sum += power * escape;
            power *= rho;
        }

        return sum + power * ratio * escapes[^1] / (1 - rho * ratio);
    }
}
