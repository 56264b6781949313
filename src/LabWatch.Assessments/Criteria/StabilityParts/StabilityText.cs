using LabWatch.Assessments.Criteria.Verdicts;
using LabWatch.Assessments.Evaluation;
using LabWatch.Metrology.Statistics;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Assessments.Criteria.StabilityParts;

/// <summary>A stability assessment in plain words.</summary>
internal static class StabilityText
{
    public static string Of(StabilityEvidence evidence, StabilityValue value, StabilityVerdict verdict)
    {
        string outcome = value.Statistics.HalfRange.HasValue
            ? $"{HalfRange(evidence, value, verdict)} {Basis(evidence, value)}"
            : $"There is no temperature of {evidence.Reference.Id} in the window.";
        return VerdictText.Refusal(verdict.Obstacles) + outcome;
    }

    private static string HalfRange(StabilityEvidence evidence, StabilityValue value, StabilityVerdict verdict) => VerdictText.Sentence(
        $"Half-range over {Quantities.Duration(evidence.Schedule.Window)}", value.In(verdict.Unit).Value, verdict.Unit, verdict.Limit, verdict.Conformity, verdict.Obstacles.Count == 0);

    private static string Basis(StabilityEvidence evidence, StabilityValue value)
    {
        StabilityResult statistics = value.Statistics;
        Estimate slope = statistics.SlopePerHour;
        double slopeExpanded = CoverageFactor.For(slope.DegreesOfFreedom) * slope.StandardUncertainty * 1000;
        string setPoint = double.IsFinite(evidence.SetPoint.Celsius) ? $" at set point {VerdictText.Plain(evidence.SetPoint.Celsius)} degC" : string.Empty;
        string trend = slope.HasValue
            ? $", standard deviation {Quantities.Significant(statistics.StandardDeviation * 1000)} mK, slope {Quantities.Value(slope.Value * 1000, slopeExpanded)} mK/h (U = {Quantities.Significant(slopeExpanded)} mK/h)"
            : string.Empty;
        string certificates = evidence.Certificates.References.Count > 0 ? $" through certificate {string.Join(", ", evidence.Certificates.References)}" : string.Empty;
        string leftOut = evidence.Within.LeftOut > 0 ? $"; {Quantities.Count(evidence.Within.LeftOut)} readings without a usable value were left out" : string.Empty;
        return $"Mean {Quantities.Fixed(evidence.Within.MeanCelsius, 3)} degC{setPoint}{trend}, "
            + $"from {Quantities.Count(statistics.MeanCount)} ten-second means of {Quantities.Count(statistics.ReadingCount)} readings of {evidence.Reference.Id}{certificates}{leftOut}.";
    }
}
