namespace LabWatch.Metrology.Cavities;

/// <summary>
/// Traces of one geometry and view over the diffuse fraction D, so that D and its uncertainty can be carried without new rays. Between the traces 1 - e_eff follows the
/// cubic through the four nearest (all with the same rays, so that their differences are quieter than each).
/// </summary>
public sealed class DiffuseFractionGrid
{
    private static readonly double[] DefaultFractions = [0, 0.1, 0.25, 0.5, 0.75, 0.9, 1];
    private readonly double[] _fractions;
    private readonly HitCounts[] _counts;

    private DiffuseFractionGrid(double[] fractions, HitCounts[] counts) => (_fractions, _counts) = (fractions, counts);

    /// <summary>The diffuse fractions traced, rising.</summary>
    public IReadOnlyList<double> Fractions => _fractions;

    /// <summary>The counts at each of them.</summary>
    public IReadOnlyList<HitCounts> Counts => _counts;

    /// <summary>Traces the grid.</summary>
    /// <param name="geometry">Geometry.</param>
    /// <param name="view">View.</param>
    /// <param name="options">For Monte Carlo.</param>
    /// <param name="fractions">Diffuse fractions, rising, from 0 to 1, at least four; seven of them by default.</param>
    public static DiffuseFractionGrid Trace(CavityGeometry geometry, CavityView view, MonteCarloOptions? options = null, IReadOnlyList<double>? fractions = null)
    {
        double[] used = [.. fractions ?? DefaultFractions];
        if (used.Length < 4) throw new ArgumentException("At least four diffuse fractions are needed.", nameof(fractions));
        return new DiffuseFractionGrid(used, [.. used.Select(d => CavityTrace.Run(geometry, view, d, options: options))]);
    }

    /// <summary>1 - e_eff of an isothermal cavity, its derivatives and its numerical standard error.</summary>
    /// <param name="emissivity">Wall emissivity.</param>
    /// <param name="diffuseFraction">Diffuse fraction, inside of the grid.</param>
    /// <returns>The value, its slope with respect to D, its slope with respect to the wall emissivity, the Monte Carlo standard error.</returns>
    public (double Complement, double SlopeOfDiffuseFraction, double SlopeOfEmissivity, double StandardError) At(double emissivity, double diffuseFraction)
    {
        if (!(diffuseFraction >= _fractions[0] && diffuseFraction <= _fractions[^1]))
        {
            throw new ArgumentOutOfRangeException(nameof(diffuseFraction), "The diffuse fraction lies outside of the grid.");
        }

        int above = 1;
        while (above < _fractions.Length - 1 && _fractions[above] < diffuseFraction) above++;
        int first = Math.Clamp(above - 2, 0, _fractions.Length - 4);
        double value = 0, slope = 0, byEmissivity = 0, variance = 0;
        for (int i = first; i < first + 4; i++)
        {
            (double basis, double derivative) = Lagrange(first, i, diffuseFraction);
            ZoneWeights weights = _counts[i].Weights(emissivity);
            value += basis * weights.IsothermalComplement;
            slope += derivative * weights.IsothermalComplement;
            byEmissivity += basis * weights.Slopes().IsothermalComplement;
            variance += basis * basis * weights.StandardError * weights.StandardError;
        }

        return (value, slope, byEmissivity, Math.Sqrt(variance));
    }

    private (double Value, double Derivative) Lagrange(int first, int i, double x)
    {
        double value = 1, derivative = 0;
        for (int j = first; j < first + 4; j++)
        {
            if (j == i) continue;
            double scale = 1 / (_fractions[i] - _fractions[j]);
            derivative = derivative * (x - _fractions[j]) * scale + value * scale;
            value *= (x - _fractions[j]) * scale;
        }

        return (value, derivative);
    }
}
