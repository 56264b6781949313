using LabWatch.Lab.Sources;
using LabWatch.Metrology.Statistics;

namespace LabWatch.Assessments.Criteria.BalanceParts;

/// <summary>Learns a balance from the blocks of a span in which the source was in order.</summary>
internal static class BalanceLearner
{
    /// <summary>Blocks for each term.</summary>
    public const int LeastBlocksPerTerm = 10;

    /// <summary>Residuals beyond this many standard deviations are left out of the second fit: what follows a change of the room or of the shutter.</summary>
    private const double Outlier = 4;
    private const double LargestCorrelation = 0.99;

    private static readonly BalanceTermKind[] Candidates =
    [
        BalanceTermKind.Constant, BalanceTermKind.Rise, BalanceTermKind.Air, BalanceTermKind.RadiationOpen, BalanceTermKind.Radiation, BalanceTermKind.Rate, BalanceTermKind.ShortLag,
        BalanceTermKind.LongLag, BalanceTermKind.PurgeFlow,
    ];

    /// <summary>Learns; null where there are too few usable blocks.</summary>
    /// <param name="blocks">The blocks.</param>
    /// <param name="channel">Channel of the balance.</param>
    public static LearntBalance? Learn(BalanceBlocks blocks, string channel)
    {
        List<int> usable = [.. Enumerable.Range(0, blocks.Count).Where(blocks.IsUsable)];
        List<BalanceTermKind> terms = Terms(blocks, usable);
        if (terms.Count == 0 || Fit(blocks, usable, terms) is not { } first)
        {
            return null;
        }

        List<int> kept = [.. usable.Where(block => Math.Abs(Residual(blocks, block, terms, first)) <= Outlier * first.ResidualDeviation)];
        if (kept.Count < LeastBlocksPerTerm * terms.Count || Fit(blocks, kept, terms) is not { } fit || !(fit.ResidualDeviation > 0))
        {
            return null;
        }

        return new(
            channel, [.. terms.Select((kind, index) => new BalanceTerm(kind, fit.Coefficients[index].Value))], fit.ResidualDeviation, Correlation(blocks, kept, terms, fit), kept.Count,
            new(kept.Min(blocks.Celsius), kept.Max(blocks.Celsius)), blocks.Span.Start, blocks.Span.End);
    }

    /// <summary>The terms that the blocks can tell apart, in the order of what matters most.</summary>
    private static List<BalanceTermKind> Terms(BalanceBlocks blocks, List<int> usable)
    {
        List<BalanceTermKind> terms = [];
        foreach (BalanceTermKind kind in Candidates)
        {
            bool doubles = (kind is BalanceTermKind.RadiationOpen && !blocks.HasShutter) || (kind is BalanceTermKind.PurgeFlow && !blocks.HasFlow);
            if (!doubles && usable.Count >= LeastBlocksPerTerm * (terms.Count + 1) && Fit(blocks, usable, [.. terms, kind]) is { } fit && IsDetermined(fit))
            {
                terms.Add(kind);
            }
        }

        return terms;
    }

    /// <summary>Whether the newest coefficient means something: it is larger than its standard error, or the first of all.</summary>
    private static bool IsDetermined(LeastSquares fit) =>
        fit.Coefficients.Count == 1 || Math.Abs(fit.Coefficients[^1].Value) > 2 * fit.Coefficients[^1].StandardUncertainty;

    private static LeastSquares? Fit(BalanceBlocks blocks, List<int> usable, List<BalanceTermKind> terms) => LeastSquares.Fit(
        [.. usable.Select(block => terms.Select(kind => blocks.Term(kind, block)).ToArray())], [.. usable.Select(blocks.Observed)]);

    private static double Residual(BalanceBlocks blocks, int block, List<BalanceTermKind> terms, LeastSquares fit) =>
        blocks.Observed(block) - terms.Select((kind, index) => fit.Coefficients[index].Value * blocks.Term(kind, block)).Sum();

    private static double Correlation(BalanceBlocks blocks, List<int> kept, List<BalanceTermKind> terms, LeastSquares fit)
    {
        double products = 0, squares = 0;
        int pairs = 0;
        for (int i = 1; i < kept.Count; i++)
        {
            double residual = Residual(blocks, kept[i], terms, fit);
            squares += residual * residual;
            if (kept[i] == kept[i - 1] + 1)
            {
                products += residual * Residual(blocks, kept[i - 1], terms, fit);
                pairs++;
            }
        }

        double correlation = pairs > 0 && squares > 0 ? products / pairs / (squares / (kept.Count - 1)) : 0;
        return Math.Clamp(correlation, 0, LargestCorrelation);
    }
}
