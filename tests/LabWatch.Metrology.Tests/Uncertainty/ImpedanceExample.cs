using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Metrology.Tests.Uncertainty;

/// <summary>
/// JCGM 100:2008, annex H.2: resistance R = V cos(phi)/I, reactance X = V sin(phi)/I and impedance Z = V/I from simultaneous observations of
/// voltage, current and phase, whose means are correlated.
/// </summary>
internal sealed class ImpedanceExample
{
    private readonly double _voltage;
    private readonly double _current;
    private readonly double _phase;

    public ImpedanceExample(double[] volt, double[] milliampere, double[] radian)
    {
        double[][] series = [volt, [.. milliampere.Select(value => value / 1000)], radian];
        double[] means = [.. series.Select(values => values.Average())];
        double[] deviations = [.. series.Select(values => Math.Sqrt(Covariance(values, values)))];
        (_voltage, _current, _phase) = (means[0], means[1], means[2]);
        Budget = new(
            [.. Enumerable.Range(0, 3).Select(i => new BudgetInput($"input {i}", new(means[i], deviations[i], volt.Length - 1), 1))],
            [
                new(0, 1, Covariance(series[0], series[1]) / (deviations[0] * deviations[1])),
                new(0, 2, Covariance(series[0], series[2]) / (deviations[0] * deviations[2])),
                new(1, 2, Covariance(series[1], series[2]) / (deviations[1] * deviations[2])),
            ]);
    }

    public UncertaintyBudget Budget { get; }

    public double Value(int result) => result switch
    {
        0 => _voltage / _current * Math.Cos(_phase),
        1 => _voltage / _current * Math.Sin(_phase),
        _ => _voltage / _current,
    };

    public double Uncertainty(int result) => Math.Sqrt(Budget.Covariance(Sensitivities(result), Sensitivities(result)));

    public double Correlation(int first, int second) =>
        Budget.Covariance(Sensitivities(first), Sensitivities(second)) / (Uncertainty(first) * Uncertainty(second));

    private double[] Sensitivities(int result) => result switch
    {
        0 => [Math.Cos(_phase) / _current, -Value(0) / _current, -Value(1)],
        1 => [Math.Sin(_phase) / _current, -Value(1) / _current, Value(0)],
        _ => [1 / _current, -Value(2) / _current, 0],
    };

    /// <summary>Covariance of the means of two series (JCGM 100:2008, equation 17).</summary>
    private static double Covariance(double[] first, double[] second)
    {
        double meanFirst = first.Average();
        double meanSecond = second.Average();
        return first.Zip(second).Sum(pair => (pair.First - meanFirst) * (pair.Second - meanSecond)) / (first.Length * (first.Length - 1.0));
    }
}
