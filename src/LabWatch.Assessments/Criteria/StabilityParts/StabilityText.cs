using LabWatch.Assessments.Evaluation;
using LabWatch.Metrology.Statistics;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Assessments.Criteria.StabilityParts;

/// <summary>A stability assessment in plain words.</summary>
internal static class StabilityText
{
    public static string Of(StabilityEvidence evidence, StabilityValue value, StabilityVerdict verdict)
    {
        string notDecided = verdict.Obstacles.Count > 0 ? $"Not decided: {string.Join("; and ", verdict.Obstacles)}. " : string.Empty;
        string outcome = value.Statistics.HalfRange.HasValue
            ? $"{HalfRange(evidence, value, verdict)} {Basis(evidence, value)}"
            : $"There is no temperature of {evidence.Reference.Id} in the window.";
        return notDecided + outcome;
    }

    private static string HalfRange(StabilityEvidence evidence, StabilityValue value, StabilityVerdict verdict)
    {
        Estimate halfRange = value.In(verdict.Unit);
        double expanded = verdict.Conformity.ExpandedUncertainty;
        string text = $"Half-range over {Quantities.Duration(evidence.Schedule.Window)} is {Quantities.Value(halfRange.Value, expanded)} {verdict.Unit}"
            + (expanded >= 0
                ? $" (U = {Quantities.Significant(expanded)} {verdict.Unit}, k = {Quantities.Fixed(verdict.Conformity.CoverageFactor, 2)})"
                : string.Empty);
        return verdict.Limit is { } limit && verdict.Obstacles.Count == 0
            ? $"{text}; the limit is {Plain(limit.Maximum)} {limit.Unit}; {Outcome(verdict, limit.Maximum, expanded)}. "
                + $"Probability of conformity {Quantities.Percent(verdict.Conformity.Probability)}."
            : $"{text}, for information only.";
    }

    private static string Outcome(StabilityVerdict verdict, double limit, double expanded)
    {
        double guardBand = verdict.Conformity.GuardBand;
        string rule = verdict.Limit!.Rule is DecisionRule.GuardBand
            ? guardBand < limit
                ? $"with the guard band of {Quantities.Significant(guardBand)} {verdict.Unit} a value up to {Quantities.Value(limit - guardBand, expanded)} {verdict.Unit} passes, so it "
                : $"the guard band of {Quantities.Significant(guardBand)} {verdict.Unit} is wider than the limit, so nothing can pass in full and it "
            : "by simple acceptance it ";
        return rule + verdict.Decision switch
        {
            Decision.Pass => "passes",
            Decision.ConditionalPass => "passes conditionally: inside the limit, but within the guard band",
            Decision.ConditionalFail => "fails conditionally: outside the limit, but by less than the guard band",
            Decision.Fail => "fails",
            _ => "cannot be decided",
        };
    }

    private static string Basis(StabilityEvidence evidence, StabilityValue value)
    {
        StabilityResult statistics = value.Statistics;
        Estimate slope = statistics.SlopePerHour;
        double slopeExpanded = CoverageFactor.For(slope.DegreesOfFreedom) * slope.StandardUncertainty * 1000;
        string setPoint = double.IsFinite(evidence.SetPoint.Celsius) ? $" at set point {Plain(evidence.SetPoint.Celsius)} degC" : string.Empty;
        string trend = slope.HasValue
            ? $", standard deviation {Quantities.Significant(statistics.StandardDeviation * 1000)} mK, slope {Quantities.Value(slope.Value * 1000, slopeExpanded)} mK/h (U = {Quantities.Significant(slopeExpanded)} mK/h)"
            : string.Empty;
        string certificates = evidence.Certificates.References.Count > 0 ? $" through certificate {string.Join(", ", evidence.Certificates.References)}" : string.Empty;
        string leftOut = evidence.Within.LeftOut > 0 ? $"; {Quantities.Count(evidence.Within.LeftOut)} readings without a usable value were left out" : string.Empty;
        return $"Mean {Quantities.Fixed(evidence.Within.MeanCelsius, 3)} degC{setPoint}{trend}, "
            + $"from {Quantities.Count(statistics.MeanCount)} ten-second means of {Quantities.Count(statistics.ReadingCount)} readings of {evidence.Reference.Id}{certificates}{leftOut}.";
    }

    private static string Plain(double value) => Quantities.Fixed(value, 3).TrimEnd('0').TrimEnd('.');
}
