using LabWatch.Assessments.Criteria.Verdicts;
using LabWatch.Assessments.Evaluation;
using LabWatch.Lab.Assessments;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Sources;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Assessments.Criteria.BalanceParts;

/// <summary>Judges one balance in one window; the same for heater power and thermometers.</summary>
/// <param name="criterion">Code of the criterion.</param>
/// <param name="subject">What departs, at the beginning of a sentence.</param>
/// <param name="unit">Unit of the balance (W or K) in sentences and figures.</param>
/// <param name="units">Units that a limit may have, by how many of each make one of the balance; the first is used where no limit names one.</param>
internal sealed class BalanceJudgement(string criterion, string subject, string unit, IReadOnlyList<(string Unit, double Factor)> units)
{
    private const int LeastBlocks = 2;

    /// <summary>The result of a scope.</summary>
    public CriterionResult Of(CriterionInput input, CriterionSchedule schedule, LearntBalance balance, string scope)
    {
        Channel channel = input.Source.FindChannel(balance.Channel)!;
        BalanceBlocks blocks = BalanceBlocks.Of(input.Snapshot, input.Source, channel, schedule.SpanOf(input.Window), input.Readings);
        BalanceResiduals residuals = BalanceResiduals.Of(balance, blocks, input.Window);
        BalanceChart chart = BalanceChart.Of(residuals);
        Channel? setPoint = StabilityCriterion.SetPointChannel(input.Source);
        double nominal = SetPointHistory.Of(setPoint is null ? null : input.Readings.Find(setPoint.Id)).Celsius;
        Estimate mean = residuals.Mean();
        LimitVerdict verdict = LimitVerdict.Of(
            input, criterion, null, nominal, mean.HasValue ? mean with { Value = Math.Abs(mean.Value) } : mean, units, Obstacles(input, balance, residuals));
        return new(
            scope, verdict.Value, verdict.Unit, verdict.Limit, verdict.Conformity.CoverageFactor, verdict.Decision, verdict.Probability,
            [.. Figures(nominal, residuals, chart, mean, verdict)], Text(input, balance, residuals, chart, mean, verdict));
    }

    private static IEnumerable<string> Obstacles(CriterionInput input, LearntBalance balance, BalanceResiduals residuals)
    {
        int usable = residuals.Within.Count, all = (int)(input.Window.Duration / BalanceBlocks.Length);
        if (usable < Math.Min(LeastBlocks, all))
        {
            yield return $"{Quantities.Count(usable)} of {Quantities.Count(all)} ten-minute means count: at one set point and shutter for half an hour, and between "
                + $"{VerdictText.Plain(balance.Range.Minimum)} and {VerdictText.Plain(balance.Range.Maximum)} degC, where the baseline was learnt";
        }

        string[] thermometers = [input.Source.ReferenceChannel!.Id, .. input.Source.FindChannel(balance.Channel)!.Quantity is ChannelQuantity.WellThermometer ? [balance.Channel] : Array.Empty<string>()];
        foreach (string id in thermometers)
        {
            ChannelKey key = new(input.Source.Key, id);
            string? then = input.Snapshot.CertificateInForce(key, balance.LearntUntil)?.Id, now = input.Snapshot.CertificateInForce(key, input.Window.Start)?.Id;
            if (!string.Equals(then, now, StringComparison.Ordinal))
            {
                yield return $"{id} has been calibrated or exchanged since the baseline was learnt, so that it has to be learnt anew";
            }
        }
    }

    private IEnumerable<AssessmentFigure> Figures(double nominal, BalanceResiduals residuals, BalanceChart chart, Estimate mean, LimitVerdict verdict)
    {
        if (double.IsFinite(nominal))
        {
            yield return new(FigureName.SetPoint, new(nominal, 0), "Cel");
        }

        yield return new("block-count", new(residuals.Values.Count, 0), "/");
        if (mean.HasValue)
        {
            double observed = residuals.Within.Average(value => value.Observed);
            yield return new("residual", mean, unit);
            yield return new("observed", new(observed, 0), unit);
            yield return new("predicted", new(observed - mean.Value, residuals.Balance.PredictionDeviation), unit);
        }

        if (residuals.Values.Count > 0)
        {
            yield return new("ewma", new(chart.Ewma, 0), "/");
            yield return new("cusum-up", new(chart.CusumUp, 0), "/");
            yield return new("cusum-down", new(chart.CusumDown, 0), "/");
        }

        if (chart.Change is { } change)
        {
            yield return new("changed-hours-ago", new((residuals.Window.End - change.Likeliest).TotalHours, 0), "h");
        }

        if (verdict.Obstacles.Count == 0)
        {
            yield return new(FigureName.GuardBand, new(verdict.Conformity.GuardBand, 0), verdict.Unit);
        }
    }

    private string Text(CriterionInput input, LearntBalance balance, BalanceResiduals residuals, BalanceChart chart, Estimate mean, LimitVerdict verdict)
    {
        string refusal = VerdictText.Refusal(verdict.Obstacles);
        string baseline = $"Baseline learnt from {Moments.Text(balance.LearntFrom)} to {Moments.Text(balance.LearntUntil)}, {Quantities.Count(balance.Blocks)} ten-minute means, "
            + $"residual standard deviation {Quantities.Significant(balance.ResidualDeviation)} {unit}.";
        if (!mean.HasValue)
        {
            return $"{refusal}{baseline}";
        }

        string sentence = VerdictText.Sentence(
            $"{subject} over {Quantities.Duration(input.Window.Duration)}", verdict.Value.Value, verdict.Unit, verdict.Limit, verdict.Conformity, verdict.Obstacles.Count == 0);
        double observed = residuals.Within.Average(value => value.Observed), expanded = 2 * mean.StandardUncertainty;
        return $"{refusal}{sentence} Measured {Quantities.Value(observed, expanded)} {unit}, expected {Quantities.Value(observed - mean.Value, expanded)} {unit}, from {Quantities.Count(residuals.Within.Count)} ten-minute means. "
            + $"{Charts(chart, residuals)} {baseline}";
    }

    private static string Charts(BalanceChart chart, BalanceResiduals residuals)
    {
        string values = $"EWMA {Quantities.Fixed(chart.Ewma, 2)} (limit {Quantities.Fixed(BalanceChart.EwmaLimit * Math.Sqrt(BalanceChart.Lambda / (2 - BalanceChart.Lambda)), 2)}), "
            + $"CUSUM up {Quantities.Fixed(chart.CusumUp, 1)} and down {Quantities.Fixed(chart.CusumDown, 1)} (limit {Quantities.Fixed(BalanceChart.Interval, 1)}), in standard deviations over {Quantities.Count(residuals.Values.Count)} values";
        return chart.Change is not { } change
            ? $"Control charts of the residuals show no change: {values}."
            : $"Control charts of the residuals show a change, likeliest at {Moments.Text(change.Likeliest)} "
                + $"({(change.NotBefore is { } from ? $"between {Moments.Text(from)} and {Moments.Text(change.NotAfter)}" : $"before {Moments.Text(change.NotAfter)}, maybe before what is looked at")}, 95 %): {values}.";
    }
}
