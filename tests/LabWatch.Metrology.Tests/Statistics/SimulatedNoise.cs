namespace LabWatch.Metrology.Tests.Statistics;

/// <summary>Seeded noise for the tests, made by the Box-Muller method so that it shares nothing with the generators under test.</summary>
internal sealed class SimulatedNoise(int seed)
{
    private readonly Random _random = new(seed);

    public double Normal() => Math.Sqrt(-2 * Math.Log(1 - _random.NextDouble())) * Math.Cos(2 * Math.PI * _random.NextDouble());

    /// <summary>A stationary first-order autoregressive series of unit variance.</summary>
    public double[] Autoregressive(int count, double rho)
    {
        double[] series = new double[count];
        series[0] = Normal();
        for (int i = 1; i < count; i++) series[i] = rho * series[i - 1] + Math.Sqrt(1 - rho * rho) * Normal();
        return series;
    }
}
