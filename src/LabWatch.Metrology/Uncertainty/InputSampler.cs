using LabWatch.Metrology.Statistics;

namespace LabWatch.Metrology.Uncertainty;

/// <summary>Draws the inputs of a budget (JCGM 101:2008, 6.4): independent ones by their shape, correlated ones jointly normal.</summary>
internal sealed class InputSampler
{
    private readonly double[] _value;
    private readonly double[] _scale;
    private readonly double[] _degrees;
    private readonly DistributionShape[] _shape;

    /// <summary>Lower Cholesky factor of the correlations, row by row; null where nothing is correlated.</summary>
    private readonly double[][]? _factor;

    public InputSampler(IReadOnlyList<BudgetInput> inputs, IReadOnlyList<InputCorrelation> correlations, double[,] correlation)
    {
        _value = [.. inputs.Select(input => input.Quantity.Value)];
        _scale = [.. inputs.Select(input => input.Quantity.StandardUncertainty * HalfWidth(input.Shape))];
        _degrees = [.. inputs.Select(input => input.Quantity.DegreesOfFreedom)];
        _shape = [.. inputs.Select(input => input.Shape)];
        if (correlations.Count == 0)
        {
            return;
        }

        foreach (InputCorrelation pair in correlations)
        {
            if (_shape[pair.First] != DistributionShape.Normal || _shape[pair.Second] != DistributionShape.Normal)
            {
                throw new ArgumentException("Correlated inputs must be normal: the joint distribution is not known otherwise.", nameof(correlations));
            }

            _degrees[pair.First] = double.PositiveInfinity;
            _degrees[pair.Second] = double.PositiveInfinity;
        }

        _factor = Cholesky(correlation);
    }

    /// <summary>Draws one set of inputs.</summary>
    public void Draw(ref Xoshiro256 random, Span<double> inputs)
    {
        for (int i = 0; i < inputs.Length; i++)
        {
            inputs[i] = _shape[i] == DistributionShape.Normal ? Ziggurat.Next(ref random) : Shaped(_shape[i], ref random);
        }

        if (_factor is not null)
        {
            Correlate(inputs);
        }

        for (int i = 0; i < inputs.Length; i++)
        {
            double spread = double.IsPositiveInfinity(_degrees[i]) || _shape[i] != DistributionShape.Normal
                ? 1
                : Math.Sqrt(_degrees[i] / ChiSquared(_degrees[i], ref random));
            inputs[i] = _value[i] + (_scale[i] * spread * inputs[i]);
        }
    }

    private static double HalfWidth(DistributionShape shape) => shape switch
    {
        DistributionShape.Rectangular => Math.Sqrt(3),
        DistributionShape.Triangular => Math.Sqrt(6),
        DistributionShape.Arcsine => Math.Sqrt(2),
        _ => 1,
    };

    private static double Shaped(DistributionShape shape, ref Xoshiro256 random) => shape switch
    {
        DistributionShape.Rectangular => (2 * random.NextUniform()) - 1,
        DistributionShape.Triangular => random.NextUniform() + random.NextUniform() - 1,
        _ => Math.Sin(Math.PI * (random.NextUniform() - 0.5)),
    };

    /// <summary>Chi squared as twice a gamma number: G. Marsaglia and W. W. Tsang, ACM Trans. Math. Softw. 26 (2000) 363; below one degree boosted.</summary>
    private static double ChiSquared(double degrees, ref Xoshiro256 random)
    {
        double shape = 0.5 * degrees;
        double boost = shape >= 1 ? 1 : Math.Pow(random.NextUniform(), 1 / shape);
        double d = (shape >= 1 ? shape : shape + 1) - (1.0 / 3);
        double c = 1 / Math.Sqrt(9 * d);
        while (true)
        {
            double x = Ziggurat.Next(ref random);
            double v = 1 + (c * x);
            if (v > 0)
            {
                v = v * v * v;
                if (Math.Log(random.NextUniform()) < (0.5 * x * x) + d - (d * v) + (d * Math.Log(v)))
                {
                    return 2 * d * v * boost;
                }
            }
        }
    }

    private void Correlate(Span<double> inputs)
    {
        for (int i = inputs.Length - 1; i >= 0; i--)
        {
            double sum = 0;
            double[] row = _factor![i];
            for (int k = 0; k <= i; k++)
            {
                sum += row[k] * inputs[k];
            }

            inputs[i] = sum;
        }
    }

    private static double[][] Cholesky(double[,] matrix)
    {
        int n = matrix.GetLength(0);
        double[][] factor = [.. Enumerable.Range(0, n).Select(i => new double[i + 1])];
        for (int i = 0; i < n; i++)
        {
            for (int k = 0; k <= i; k++)
            {
                double sum = matrix[i, k];
                for (int j = 0; j < k; j++)
                {
                    sum -= factor[i][j] * factor[k][j];
                }

                if (i == k && sum < -1e-12)
                {
                    throw new ArgumentException("The correlations contradict each other: their matrix has a negative eigenvalue.", nameof(matrix));
                }

                factor[i][k] = i == k ? Math.Sqrt(Math.Max(0, sum)) : factor[k][k] > 1e-9 ? sum / factor[k][k] : 0;
            }
        }

        return factor;
    }
}
