namespace LabWatch.Metrology.Statistics;

/// <summary>Exponentially weighted moving average of standardised residuals with asymptotic limits (ISO 7870-6; Lucas and Saccucci 1990).</summary>
/// <param name="lambda">Weight of the newest value, above 0, at most 1.</param>
/// <param name="limit">Limits in standard deviations of the average, positive.</param>
public sealed class EwmaChart(double lambda, double limit)
{
    /// <summary>The average, in standard deviations of a value.</summary>
    public double Average { get; private set; }

    /// <summary>Distance of the limits from zero, in standard deviations of a value.</summary>
    public double Limit { get; } = limit * Math.Sqrt(lambda / (2 - lambda));

    /// <summary>Whether the average lies outside of the limits.</summary>
    public bool Signals => Math.Abs(Average) > Limit;

    /// <summary>Takes the next independent standardised residual; NaN changes nothing.</summary>
    public void Add(double residual)
    {
        if (double.IsFinite(residual)) Average = lambda * residual + (1 - lambda) * Average;
    }
}
