using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Assessments.Criteria.BalanceParts;

/// <summary>How far a source departed from a balance, block by block.</summary>
/// <param name="Balance">The balance.</param>
/// <param name="Values">Residuals of the usable blocks, rising in time: index of the block, its middle, observed minus predicted (W or K), and observed.</param>
/// <param name="Window">The window that is judged.</param>
internal sealed record BalanceResiduals(LearntBalance Balance, IReadOnlyList<(int Block, Instant At, double Value, double Observed)> Values, TimeWindow Window)
{
    /// <summary>Run-in that the smoothed terms need: three of the longest time constants.</summary>
    public static readonly TimeSpan RunIn = TimeSpan.FromHours(6);

    private const double RangeMarginKelvin = 2;

    /// <summary>Residuals of the window.</summary>
    public IReadOnlyList<(int Block, Instant At, double Value, double Observed)> Within => [.. Values.Where(value => Window.Contains(value.At))];

    public static BalanceResiduals Of(LearntBalance balance, BalanceBlocks blocks, TimeWindow window)
    {
        List<(int, Instant, double, double)> values = [];
        int from = (int)(RunIn / BalanceBlocks.Length);
        for (int i = from; i < blocks.Count; i++)
        {
            double celsius = blocks.Celsius(i);
            if (blocks.IsUsable(i) && celsius >= balance.Range.Minimum - RangeMarginKelvin && celsius <= balance.Range.Maximum + RangeMarginKelvin)
            {
                double predicted = 0;
                foreach (BalanceTerm term in balance.Terms)
                {
                    predicted += term.Coefficient * blocks.Term(term.Kind, i);
                }

                values.Add((i, blocks.At(i), blocks.Observed(i) - predicted, blocks.Observed(i)));
            }
        }

        return new(balance, values, window);
    }

    /// <summary>Mean residual of the window with its standard uncertainty: scatter of the blocks with their correlation, and the prediction. None where no block is usable.</summary>
    public Estimate Mean()
    {
        IReadOnlyList<(int Block, Instant At, double Value, double Observed)> within = Within;
        if (within.Count == 0)
        {
            return Estimate.None;
        }

        double r = Balance.Correlation;
        double scatter = Balance.ResidualDeviation * Math.Sqrt(Math.Min(1, (1 + r) / (1 - r) / within.Count));
        return new(within.Average(value => value.Value), double.Hypot(scatter, Balance.PredictionDeviation), Math.Max(1, Balance.Blocks - Balance.Terms.Count));
    }

    /// <summary>Standardised residuals made independent: what the one before does not foretell, over what it leaves (ISO 7870-9).</summary>
    public IEnumerable<(Instant At, double Value)> Independent()
    {
        double s = Balance.ResidualDeviation, r = Balance.Correlation, left = Math.Sqrt(1 - (r * r));
        for (int i = 0; i < Values.Count; i++)
        {
            bool follows = i > 0 && Values[i].Block == Values[i - 1].Block + 1;
            yield return (Values[i].At, follows ? (Values[i].Value - (r * Values[i - 1].Value)) / (s * left) : Values[i].Value / s);
        }
    }
}
