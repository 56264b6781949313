using System.Runtime.InteropServices;

namespace LabWatch.Metrology.Uncertainty;

/// <summary>Statistics of one block of trials.</summary>
/// <param name="Mean">Mean of the block.</param>
/// <param name="SumOfSquares">Sum of squared deviations from the block's mean.</param>
/// <param name="Low">Lower end of the block's coverage interval; NaN where not needed.</param>
/// <param name="High">Upper end of it.</param>
internal readonly record struct MonteCarloBlock(double Mean, double SumOfSquares, double Low, double High)
{
    private double StandardUncertainty => Math.Sqrt(SumOfSquares / (MonteCarloOptions.BlockSize - 1));

    /// <summary>Summarises a block; its interval is found on a copy.</summary>
    public static MonteCarloBlock Of(ReadOnlySpan<double> values, double? coverageProbability)
    {
        double sum = 0;
        foreach (double value in values)
        {
            sum += value;
        }

        double mean = sum / values.Length;
        double squares = 0;
        foreach (double value in values)
        {
            squares += (value - mean) * (value - mean);
        }

        if (coverageProbability is not { } probability || !double.IsFinite(squares))
        {
            return new(mean, squares, double.NaN, double.NaN);
        }

        (double low, double high) = CoverageInterval.Symmetric(values.ToArray(), probability);
        return new(mean, squares, low, high);
    }

    /// <summary>Mean over all blocks.</summary>
    public static double MeanOf(List<MonteCarloBlock> blocks)
    {
        double sum = 0;
        foreach (MonteCarloBlock block in blocks)
        {
            sum += block.Mean;
        }

        return sum / blocks.Count;
    }

    /// <summary>Standard deviation over all trials.</summary>
    public static double StandardUncertaintyOf(List<MonteCarloBlock> blocks)
    {
        double mean = MeanOf(blocks);
        double squares = 0;
        foreach (MonteCarloBlock block in blocks)
        {
            squares += block.SumOfSquares + (MonteCarloOptions.BlockSize * (block.Mean - mean) * (block.Mean - mean));
        }

        return Math.Sqrt(squares / (((long)blocks.Count * MonteCarloOptions.BlockSize) - 1));
    }

    /// <summary>
    /// Whether twice the standard deviations of the averages over the blocks of mean, standard uncertainty and both ends are all below the
    /// tolerance (JCGM 101:2008, 7.9.4, steps f to i).
    /// </summary>
    public static bool AreStable(List<MonteCarloBlock> blocks, double tolerance)
    {
        ReadOnlySpan<MonteCarloBlock> all = CollectionsMarshal.AsSpan(blocks);
        return IsStable(all, tolerance, block => block.Mean)
            && IsStable(all, tolerance, block => block.StandardUncertainty)
            && IsStable(all, tolerance, block => block.Low)
            && IsStable(all, tolerance, block => block.High);
    }

    private static bool IsStable(ReadOnlySpan<MonteCarloBlock> blocks, double tolerance, Func<MonteCarloBlock, double> figure)
    {
        double mean = 0;
        foreach (MonteCarloBlock block in blocks)
        {
            mean += figure(block) / blocks.Length;
        }

        double squares = 0;
        foreach (MonteCarloBlock block in blocks)
        {
            squares += (figure(block) - mean) * (figure(block) - mean);
        }

        return 2 * Math.Sqrt(squares / ((double)blocks.Length * (blocks.Length - 1))) <= tolerance;
    }
}
