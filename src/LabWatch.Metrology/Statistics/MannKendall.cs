using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Metrology.Statistics;

/// <summary>
/// The Mann-Kendall test for a trend (H. B. Mann, Econometrica 13 (1945) 245-259; M. G. Kendall, Rank Correlation Methods, 1975), with corrections for ties and
/// continuity (R. O. Gilbert, Statistical Methods for Environmental Pollution Monitoring, 1987, chapter 16). The values must be independent.
/// </summary>
/// <param name="S">Number of pairs that rise less the number that fall.</param>
/// <param name="Variance">Variance of S without a trend.</param>
/// <param name="Z">S in standard deviations with continuity correction; 0 without scatter.</param>
/// <param name="Probability">Two-sided probability of so large a Z without a trend.</param>
public readonly record struct MannKendall(int S, double Variance, double Z, double Probability)
{
    /// <summary>Tests values in the order of time.</summary>
    public static MannKendall Of(ReadOnlySpan<double> values)
    {
        int s = 0, n = values.Length;
        for (int i = 0; i < n; i++)
        {
            for (int j = i + 1; j < n; j++) s += Math.Sign(values[j] - values[i]);
        }

        double variance = Term(n) - Ties(values);
        double z = variance > 0 ? (s - Math.Sign(s)) / Math.Sqrt(variance) : 0;
        return new MannKendall(s, variance, z, 2 * NormalDistribution.UpperTail(Math.Abs(z)));
    }

    /// <summary>Exact probability of S at or above a value for n values without ties and without trend, by the number of inversions of permutations (Kendall 1975).</summary>
    /// <param name="n">Number of values, 2 to 40.</param>
    /// <param name="s">The value.</param>
    public static double UpperProbability(int n, int s)
    {
        if (n is < 2 or > 40) throw new ArgumentOutOfRangeException(nameof(n), "Two to forty values.");
        int most = n * (n - 1) / 2;
        double[] ways = [1];
        for (int k = 2; k <= n; k++)
        {
            double[] next = new double[ways.Length + k - 1];
            for (int i = 0; i < next.Length; i++)
            {
                for (int j = Math.Max(0, i - ways.Length + 1); j < Math.Min(k, i + 1); j++) next[i] += ways[i - j] / k;
            }

            ways = next;
        }

        // S = most - 2 inversions.
        double sum = 0;
        for (int inversions = 0; inversions <= most && most - 2 * inversions >= s; inversions++) sum += ways[inversions];
        return sum;
    }

    private static double Term(double n) => n * (n - 1) * (2 * n + 5) / 18;

    private static double Ties(ReadOnlySpan<double> values)
    {
        double[] sorted = values.ToArray();
        Array.Sort(sorted);
        double sum = 0;
        for (int i = 0, j; i < sorted.Length; i = j)
        {
            for (j = i + 1; j < sorted.Length && sorted[j] == sorted[i]; j++)
            {
            }

            sum += Term(j - i);
        }

        return sum;
    }
}
