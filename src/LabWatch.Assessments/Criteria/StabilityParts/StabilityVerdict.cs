using LabWatch.Assessments.Evaluation;
using LabWatch.Lab.Limits;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Assessments.Criteria.StabilityParts;

/// <summary>The decision on a half-range.</summary>
/// <param name="Unit">Unit of the value and the limit.</param>
/// <param name="Limit">The limit in force; null where there is none.</param>
/// <param name="Conformity">What the comparison with the limit gives; without a limit only coverage factor and expanded uncertainty mean something.</param>
/// <param name="Obstacles">Why nothing is decided; empty where something is.</param>
internal sealed record StabilityVerdict(string Unit, AcceptanceLimit? Limit, ConformityResult Conformity, IReadOnlyList<string> Obstacles)
{
    public Decision Decision => Obstacles.Count > 0 ? Decision.NotDecided : Conformity.Decision;

    public double? Probability => Obstacles.Count > 0 || double.IsNaN(Conformity.Probability) ? null : Conformity.Probability;

    public static StabilityVerdict Of(StabilityEvidence evidence, StabilityValue value)
    {
        AcceptanceLimit? limit = LimitLookup.InForce(
            evidence.Input.Snapshot, evidence.Input.Source.Key, CriterionCode.Stability, evidence.NominalCelsius, band: null, evidence.Window.End);
        bool comparable = limit is not null && double.IsFinite(StabilityUnit.PerKelvin(limit.Unit));
        string unit = comparable ? limit!.Unit : StabilityUnit.Millikelvin;
        ConformityResult conformity = Compare(value.In(unit), comparable ? limit : null);
        return new(unit, limit, conformity, [.. StabilityObstacles.Of(evidence, value, limit, comparable)]);
    }

    private static ConformityResult Compare(Estimate value, AcceptanceLimit? limit) =>
        Metrology.Uncertainty.Conformity.Decide(
            value,
            ToleranceInterval.AtMost(limit?.Maximum ?? double.PositiveInfinity),
            limit?.Rule ?? DecisionRule.SimpleAcceptance);
}
