namespace LabWatch.Metrology.Cavities;

/// <summary>
/// What one trace of a geometry, view and diffuse fraction found: the mean number of hits in each zone after so many earlier reflections, and the mean number of
/// escapes at the reflection that follows. It serves every wall emissivity, wavelength and temperature profile.
/// </summary>
public sealed class HitCounts
{
    private readonly HitOrder[] _orders;
    private readonly double[][] _hits;
    private readonly double[][] _escapes;
    private readonly bool[] _isSecond;
    private readonly long _rays;

    internal HitCounts(HitTally tally, CavityMethod method, double diffuseFraction, double relativeError, long rays = 0)
        : this(tally.Grid, method, diffuseFraction, relativeError, rays, tally.Second, tally.Orders, tally.MeanHits(), tally.Escapes)
    {
    }

    internal HitCounts(
        ZoneGrid grid, CavityMethod method, double diffuseFraction, double relativeError, long rays, SecondMaterial second, HitOrder[] orders, double[][] hits, double[][] escapes)
    {
        (Grid, Method, DiffuseFraction, RelativeError) = (grid, method, diffuseFraction, relativeError);
        (_orders, _hits, _escapes, Second, _rays) = (orders, hits, escapes, second, rays);
        _isSecond = [.. Grid.Zones.Select(zone => HitTally.IsSecond(second, zone.Surface))];
        Depth = _orders[^1].Total + 1;
    }

    /// <summary>The zones.</summary>
    public ZoneGrid Grid { get; }

    /// <summary>The method that made the counts.</summary>
    public CavityMethod Method { get; }

    /// <summary>Diffuse fraction of the reflection that the counts hold for.</summary>
    public double DiffuseFraction { get; }

    /// <summary>Surfaces of the second material.</summary>
    public SecondMaterial Second { get; }

    /// <summary>Estimated numerical error of 1 - e_eff, relative, apart from the Monte Carlo standard error.</summary>
    public double RelativeError { get; }

    /// <summary>Number of reflections followed; later ones go on in a fixed ratio.</summary>
    public int Depth { get; }

    /// <summary>Number of rays traced; zero for the deterministic methods.</summary>
    public long Rays => _rays;

    /// <summary>The orders that hits are counted by.</summary>
    public IReadOnlyList<HitOrder> Orders => _orders;

    internal double[][] AllHits => _hits;

    internal double[][] AllEscapes => _escapes;

    /// <summary>Mean hits in each zone, for one order.</summary>
    public ReadOnlySpan<double> Hits(int order) => _hits[order];

    /// <summary>The zone weights and 1 - e_eff for one emissivity of all walls.</summary>
    /// <param name="emissivity">Wall emissivity, above 0, at most 1.</param>
    public ZoneWeights Weights(double emissivity) => Weights(emissivity, emissivity);

    /// <summary>The zone weights and 1 - e_eff for two materials.</summary>
    /// <param name="first">Emissivity of the first material, above 0, at most 1.</param>
    /// <param name="second">Emissivity of the second material, above 0, at most 1.</param>
    public ZoneWeights Weights(double first, double second)
    {
        if (!(first > 0 && first <= 1)) throw new ArgumentOutOfRangeException(nameof(first), "An emissivity lies above 0 and is at most 1.");
        if (!(second > 0 && second <= 1)) throw new ArgumentOutOfRangeException(nameof(second), "An emissivity lies above 0 and is at most 1.");
        double[] weights = new double[_isSecond.Length];
        (double[] factors, double tail) = Factors(1 - first, 1 - second);
        for (int o = 0; o < _orders.Length; o++)
        {
            double factor = factors[o] * (_orders[o].Total == Depth - 1 ? 1 + tail : 1);
            if (factor == 0) continue;
            double[] hits = _hits[o];
            for (int i = 0; i < weights.Length; i++) weights[i] += factor * hits[i];
        }

        for (int i = 0; i < weights.Length; i++) weights[i] *= _isSecond[i] ? second : first;
        double[] complements = [.. _escapes.Select(escapes => Complement(escapes, factors, tail, 1 - first, 1 - second))];
        Statistics.Summary summary = Statistics.Summary.Of(complements);
        double error = complements.Length > 1 ? Math.Max(summary.StandardDeviation / Math.Sqrt(complements.Length), Resolution(complements, summary.Mean)) : 0;
        return new ZoneWeights(this, first, second, weights, summary.Mean, error);
    }

    /// <summary>
    /// The reflectance of each order, (1 - e1)^a (1 - e2)^b, and what all later orders add to the last in units of it: they fall by what is absorbed and leaves at
    /// the last, the slowest mode of the cavity, so that weights and 1 - e_eff keep adding to one.
    /// </summary>
    private (double[] Factors, double Tail) Factors(double firstRho, double secondRho)
    {
        double[] factors = new double[_orders.Length];
        double last = 0, next = 0;
        for (int o = 0; o < factors.Length; o++)
        {
            HitOrder order = _orders[o];
            factors[o] = Power(firstRho, order.First) * Power(secondRho, order.Second);
            if (order.Total != Depth - 1) continue;
            for (int i = 0; i < _isSecond.Length; i++)
            {
                last += factors[o] * _hits[o][i];
                next += factors[o] * _hits[o][i] * (_isSecond[i] ? secondRho : firstRho);
            }

            foreach (double[] escapes in _escapes) next -= factors[o] * (firstRho * escapes[2 * o] + secondRho * escapes[2 * o + 1]) / _escapes.Length;
        }

        double ratio = last > 0 ? next / last : 0;
        return (factors, ratio is > 0 and < 1 ? ratio / (1 - ratio) : 0);
    }

    /// <summary>1 - e_eff: what leaves after each order, with the reflectance of the material that reflects last.</summary>
    private double Complement(double[] escapes, double[] factors, double tail, double firstRho, double secondRho)
    {
        double sum = 0;
        for (int o = 0; o < factors.Length; o++)
        {
            double factor = factors[o] * (_orders[o].Total == Depth - 1 ? 1 + tail : 1);
            sum += factor * (firstRho * escapes[2 * o] + secondRho * escapes[2 * o + 1]);
        }

        return sum;
    }

    /// <summary>Where all randomisations agree to the last bits, their scatter says nothing: then the part of one ray is as much as is known.</summary>
    private double Resolution(double[] complements, double mean)
    {
        foreach (double value in complements)
        {
            if (Math.Abs(value - mean) > 1e-14 * mean) return 0;
        }

        return mean / Math.Max(1, _rays);
    }

    private static double Power(double value, int exponent)
    {
        double power = 1;
        for (int i = 0; i < exponent; i++) power *= value;
        return power;
    }
}
