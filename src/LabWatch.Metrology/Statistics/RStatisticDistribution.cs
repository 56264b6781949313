using System.Collections.Concurrent;

namespace LabWatch.Metrology.Statistics;

/// <summary>
/// How the R-statistic is distributed while independent normal readings are steady, from a seeded simulation of one long run: 20 million steps, standard error of a
/// quantile below 0.002 up to 0.99. Each set of factors is simulated once a process.
/// </summary>
public sealed class RStatisticDistribution
{
    private const int Kept = 1_000_000;
    private const int Apart = 20;
    private static readonly ConcurrentDictionary<(double, double, double), Lazy<RStatisticDistribution>> Known = new();
    private readonly float[] _sorted;

    private RStatisticDistribution(double lambda1, double lambda2, double lambda3)
    {
        var random = new Xoshiro256(0x5253_5441);
        var statistic = new RStatistic(lambda1, lambda2, lambda3);
        int settle = (int)Math.Ceiling(40 / Math.Min(lambda1, Math.Min(lambda2, lambda3)));
        for (int i = 0; i < settle; i++) statistic.Add(random.NextNormal());
        _sorted = new float[Kept];
        double sum = 0;
        for (int i = 0; i < Kept; i++)
        {
            for (int step = 0; step < Apart; step++) statistic.Add(random.NextNormal());
            sum += statistic.Ratio;
            _sorted[i] = (float)statistic.Ratio;
        }

        Mean = sum / Kept;
        Array.Sort(_sorted);
    }

    /// <summary>Mean of the ratio.</summary>
    public double Mean { get; }

    /// <summary>The distribution for three factors.</summary>
    public static RStatisticDistribution Of(double lambda1, double lambda2, double lambda3) =>
        Known.GetOrAdd((lambda1, lambda2, lambda3), key => new(() => new RStatisticDistribution(key.Item1, key.Item2, key.Item3))).Value;

    /// <summary>The ratio that a steady value stays below with a probability from 0 to 1.</summary>
    public double Quantile(double probability)
    {
        double position = Math.Clamp(probability, 0, 1) * (Kept - 1);
        int below = Math.Min((int)position, Kept - 2);
        return _sorted[below] + (position - below) * (_sorted[below + 1] - _sorted[below]);
    }
}
