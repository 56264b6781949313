namespace LabWatch.Metrology.Uncertainty;

/// <summary>
/// Law of propagation of uncertainty for a result that is linear in its inputs near their estimates: JCGM 100:2008, equations 13 and 16 with
/// correlations, effective degrees of freedom by equation G.2b, coverage factor by G.3.
/// </summary>
public sealed class UncertaintyBudget
{
    private readonly double[,] _correlation;

    /// <summary>Combines inputs.</summary>
    /// <param name="inputs">Lines of the budget.</param>
    /// <param name="correlations">Correlations; pairs that are not listed are uncorrelated.</param>
    /// <param name="value">Value of the result.</param>
    /// <exception cref="ArgumentException">A correlation names an input that is not there, an input with itself, or is outside -1 to 1.</exception>
    public UncertaintyBudget(IReadOnlyList<BudgetInput> inputs, IReadOnlyList<InputCorrelation>? correlations = null, double value = 0)
    {
        ArgumentNullException.ThrowIfNull(inputs);
        Inputs = inputs;
        Correlations = correlations ?? [];
        _correlation = MatrixOf(inputs.Count, Correlations);
        Combined = new(value, Math.Sqrt(Covariance(Sensitivities, Sensitivities)), EffectiveDegrees());
    }

    /// <summary>The lines.</summary>
    public IReadOnlyList<BudgetInput> Inputs { get; }

    /// <summary>The correlations.</summary>
    public IReadOnlyList<InputCorrelation> Correlations { get; }

    /// <summary>
    /// The result: combined standard uncertainty and effective degrees of freedom. NaN where the correlations contradict each other so that the
    /// variance is negative. With correlated inputs the degrees of freedom are an approximation (JCGM 100:2008, G.4.1, assumes independence).
    /// </summary>
    public Estimate Combined { get; }

    private double[] Sensitivities => [.. Inputs.Select(input => input.Sensitivity)];

    /// <summary>Share of a line in the sum of squared contributions, 0 to 1; 0 where all are zero.</summary>
    public double ShareOf(int index)
    {
        double sum = Inputs.Sum(input => input.Contribution * input.Contribution);
        return sum > 0 ? Inputs[index].Contribution * Inputs[index].Contribution / sum : 0;
    }

    /// <summary>Covariance of two results of the same inputs, given their sensitivities (JCGM 100:2008, H.2).</summary>
    public double Covariance(IReadOnlyList<double> firstSensitivities, IReadOnlyList<double> secondSensitivities)
    {
        ArgumentNullException.ThrowIfNull(firstSensitivities);
        ArgumentNullException.ThrowIfNull(secondSensitivities);
        double sum = 0;
        for (int i = 0; i < Inputs.Count; i++)
        {
            for (int k = 0; k < Inputs.Count; k++)
            {
                sum += firstSensitivities[i] * Inputs[i].Quantity.StandardUncertainty
                    * secondSensitivities[k] * Inputs[k].Quantity.StandardUncertainty * _correlation[i, k];
            }
        }

        return sum;
    }

    /// <summary>The correlation matrix as given.</summary>
    internal double[,] CorrelationMatrix() => (double[,])_correlation.Clone();

    private static double[,] MatrixOf(int count, IReadOnlyList<InputCorrelation> correlations)
    {
        double[,] matrix = new double[count, count];
        for (int i = 0; i < count; i++)
        {
            matrix[i, i] = 1;
        }

        foreach ((int first, int second, double coefficient) in correlations)
        {
            if (first == second || (uint)first >= (uint)count || (uint)second >= (uint)count || !(Math.Abs(coefficient) <= 1))
            {
                throw new ArgumentException("A correlation needs two different inputs of the budget and a coefficient from -1 to 1.", nameof(correlations));
            }

            matrix[first, second] = coefficient;
            matrix[second, first] = coefficient;
        }

        return matrix;
    }

    private double EffectiveDegrees()
    {
        double[] sensitivities = Sensitivities;
        double scale = Inputs.Count == 0 ? 0 : Inputs.Max(input => Math.Abs(input.Contribution));
        if (scale == 0)
        {
            return double.PositiveInfinity;
        }

        double variance = Covariance(sensitivities, sensitivities) / (scale * scale);
        double sum = Inputs.Sum(input => Math.Pow(input.Contribution / scale, 4) / input.Quantity.DegreesOfFreedom);
        return variance * variance / sum;
    }
}
