using LabWatch.Metrology.Statistics;

namespace LabWatch.Metrology.Uncertainty;

/// <summary>
/// Propagation of distributions by Monte Carlo, JCGM 101:2008: clause 7 for the results, 7.9 for the adaptive procedure. Blocks of 10 000 trials
/// have their own stream of random numbers and run in parallel; the result depends on the seed alone. A model value that is not finite counts
/// as such: the result is NaN then.
/// </summary>
public static class MonteCarloPropagation
{
    private const int FirstBlocks = 4;

    /// <summary>Propagates a budget as the linear model that it is: value + sum of sensitivity times deviation.</summary>
    public static MonteCarloResult Run(UncertaintyBudget budget, MonteCarloOptions options)
    {
        ArgumentNullException.ThrowIfNull(budget);
        double[] sensitivities = [.. budget.Inputs.Select(input => input.Sensitivity)];
        double offset = budget.Combined.Value - budget.Inputs.Sum(input => input.Sensitivity * input.Quantity.Value);
        return Run(budget, Linear, options);

        double Linear(ReadOnlySpan<double> inputs)
        {
            double sum = offset;
            for (int i = 0; i < inputs.Length; i++)
            {
                sum += sensitivities[i] * inputs[i];
            }

            return sum;
        }
    }

    /// <summary>Propagates the inputs and correlations of a budget through any model.</summary>
    /// <exception cref="ArgumentException">Correlated inputs are not normal, or the correlations contradict each other.</exception>
    public static MonteCarloResult Run(UncertaintyBudget budget, MeasurementModel model, MonteCarloOptions options)
    {
        ArgumentNullException.ThrowIfNull(budget);
        ArgumentNullException.ThrowIfNull(model);
        ArgumentNullException.ThrowIfNull(options);
        InputSampler sampler = new(budget.Inputs, budget.Correlations, budget.CorrelationMatrix());
        long wanted = options.Trials ?? options.MaximumTrials;
        int maximum = (int)Math.Max(2, (wanted + MonteCarloOptions.BlockSize - 1) / MonteCarloOptions.BlockSize);
        int blocks = options.Trials is null ? Math.Min(FirstBlocks, maximum) : maximum;
        double[] values = [];
        List<MonteCarloBlock> done = [];
        while (true)
        {
            values = Extend(values, blocks);
            done.AddRange(RunBlocks(sampler, model, budget.Inputs.Count, values, done.Count, blocks, options));
            double u = MonteCarloBlock.StandardUncertaintyOf(done);
            double tolerance = Tolerance(u, options.SignificantDigits);
            bool isStable = options.Trials is not null || MonteCarloBlock.AreStable(done, tolerance);
            if (isStable || blocks == maximum)
            {
                return Summarise(values, done, u, tolerance, isStable, options);
            }

            blocks = Math.Min(maximum, blocks + Math.Max(1, blocks / 2));
        }
    }

    private static double[] Extend(double[] values, int blocks)
    {
        double[] longer = GC.AllocateUninitializedArray<double>(blocks * MonteCarloOptions.BlockSize);
        values.CopyTo(longer, 0);
        return longer;
    }

    private static MonteCarloBlock[] RunBlocks(
        InputSampler sampler, MeasurementModel model, int inputCount, double[] values, int from, int to, MonteCarloOptions options)
    {
        MonteCarloBlock[] blocks = new MonteCarloBlock[to - from];
        Parallel.For(from, to, block =>
        {
            Span<double> results = values.AsSpan(block * MonteCarloOptions.BlockSize, MonteCarloOptions.BlockSize);
            Span<double> inputs = inputCount <= 64 ? stackalloc double[inputCount] : new double[inputCount];
            Xoshiro256 random = new(unchecked(options.Seed + (0x9E3779B97F4A7C15UL * (ulong)(block + 1))));
            for (int i = 0; i < results.Length; i++)
            {
                sampler.Draw(ref random, inputs);
                results[i] = model(inputs);
            }

            blocks[block - from] = MonteCarloBlock.Of(results, options.Trials is null ? options.CoverageProbability : null);
        });
        return blocks;
    }

    private static MonteCarloResult Summarise(
        double[] values, List<MonteCarloBlock> blocks, double u, double tolerance, bool isStable, MonteCarloOptions options)
    {
        double mean = MonteCarloBlock.MeanOf(blocks);
        if (!double.IsFinite(u))
        {
            return new(double.NaN, double.NaN, double.NaN, double.NaN, values.Length, false, double.NaN);
        }

        (double low, double high) = options.ShortestInterval
            ? CoverageInterval.Shortest(values, options.CoverageProbability)
            : CoverageInterval.Symmetric(values, options.CoverageProbability);
        return new(mean, u, low, high, values.Length, isStable, tolerance);
    }

    /// <summary>u = c 10^l with c of the digits asked for: delta = 10^l / 2.</summary>
    private static double Tolerance(double u, int digits) => u > 0 ? 0.5 * Math.Pow(10, Math.Floor(Math.Log10(u)) - digits + 1) : 0;
}
