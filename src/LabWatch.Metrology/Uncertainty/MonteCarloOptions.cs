namespace LabWatch.Metrology.Uncertainty;

/// <summary>How to propagate distributions by Monte Carlo.</summary>
public sealed record MonteCarloOptions
{
    /// <summary>Trials in one block: JCGM 101:2008, 7.9.4 b, for coverage up to 99 %.</summary>
    public const int BlockSize = 10_000;

    /// <summary>Number of trials, rounded up to whole blocks; null for the adaptive procedure of 7.9, which ends when the results are stable.</summary>
    public long? Trials { get; init; }

    /// <summary>Most trials of the adaptive procedure.</summary>
    public long MaximumTrials { get; init; } = 10_000_000;

    /// <summary>Significant digits of the standard uncertainty that the adaptive procedure makes stable, 1 to 3.</summary>
    public int SignificantDigits { get; init; } = 2;

    /// <summary>Coverage probability of the interval.</summary>
    public double CoverageProbability { get; init; } = CoverageFactor.DefaultProbability;

    /// <summary>Whether the shortest interval is asked for instead of the probabilistically symmetric one.</summary>
    public bool ShortestInterval { get; init; }

    /// <summary>Seed: the same seed gives the same result, whatever the number of threads.</summary>
    public ulong Seed { get; init; } = 1;
}
