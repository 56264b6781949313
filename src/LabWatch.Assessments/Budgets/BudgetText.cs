using LabWatch.Assessments.Criteria.Verdicts;
using LabWatch.Assessments.Evaluation;

namespace LabWatch.Assessments.Budgets;

/// <summary>A live budget in plain words.</summary>
internal static class BudgetText
{
    /// <summary>From here on the coverage factor is that of the normal distribution to three digits, and the number itself says nothing.</summary>
    private const double ManyDegrees = 1000;

    public static string Of(string band, LiveBudget budget, LimitVerdict verdict, string wells)
    {
        string freedom = budget.Combined.DegreesOfFreedom < ManyDegrees ? $"{Quantities.Fixed(budget.Combined.DegreesOfFreedom, 0)} effective degrees of freedom" : "more than 1000 effective degrees of freedom";
        string value = VerdictText.Sentence(
            $"Live expanded uncertainty of the radiance temperature in the band {band} (k = {Quantities.Fixed(budget.CoverageFactor, 2)}, {freedom})",
            verdict.Value.Value, verdict.Unit, verdict.Limit, verdict.Conformity, verdict.Obstacles.Count == 0);
        return $"{VerdictText.Refusal(verdict.Obstacles)}{value} {Cmc(budget, verdict)}{Largest(budget)} {Exceeded(budget)}{Missing(budget)}{wells}";
    }

    private static string Cmc(LiveBudget budget, LimitVerdict verdict)
    {
        if (verdict.Limit is not { } limit)
        {
            return string.Empty;
        }

        double live = verdict.Value.Value;
        return live > limit.Maximum
            ? $"The CMC of {VerdictText.Plain(limit.Maximum)} {limit.Unit} does not hold: report at least {Quantities.Significant(live)} {verdict.Unit}. "
            : $"Report the CMC of {VerdictText.Plain(limit.Maximum)} {limit.Unit}, never the smaller live value (ILAC-P14:09/2020); {Quantities.Percent(1 - (live * live / (limit.Maximum * limit.Maximum)))} of its variance is left. ";
    }

    private static string Largest(LiveBudget budget) =>
        $"The largest contribution is {Words(budget.Largest.Name)} with u = {Millikelvin(budget.Largest.U)}, {Quantities.Percent(budget.ShareOf(budget.Largest))} of the variance.";

    private static string Exceeded(LiveBudget budget)
    {
        BudgetLine[] over = [.. budget.Lines.Where(line => line.IsMeasured && line.Claimed is { } claim && line.U > claim.StandardUncertaintyKelvin)];
        return over.Length == 0
            ? string.Empty
            : $"Above what is claimed: {string.Join(", ", over.Select(line => $"{Words(line.Name)} ({Millikelvin(line.U)} against {Millikelvin(line.Claimed!.StandardUncertaintyKelvin)})"))}. ";
    }

    private static string Missing(LiveBudget budget)
    {
        string[] claimed = [.. budget.Lines.Where(line => !line.IsMeasured).Select(line => $"{Words(line.Name)} {Millikelvin(line.U)}")];
        return claimed.Length == 0 ? "Nothing besides what is measured is claimed: drift of the reference, size-of-source effect and absorption are missing. " : $"Taken as claimed: {string.Join(", ", claimed)}. ";
    }

    private static string Words(string name) => name.Replace('-', ' ');

    private static string Millikelvin(double kelvin) => $"{Quantities.Significant(kelvin * 1000)} mK";
}
