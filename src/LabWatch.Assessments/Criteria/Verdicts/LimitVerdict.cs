using LabWatch.Assessments.Evaluation;
using LabWatch.Lab.Limits;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Assessments.Criteria.Verdicts;

/// <summary>The decision on a value.</summary>
/// <param name="Value">The value, in <paramref name="Unit"/>.</param>
/// <param name="Unit">Unit of value and limit.</param>
/// <param name="Limit">The limit in force; null where there is none.</param>
/// <param name="Conformity">What the comparison with the limit gives; without a limit only coverage factor and expanded uncertainty mean something.</param>
/// <param name="Obstacles">Why nothing is decided, each as a clause; empty where something is.</param>
internal sealed record LimitVerdict(Estimate Value, string Unit, AcceptanceLimit? Limit, ConformityResult Conformity, IReadOnlyList<string> Obstacles)
{
    public Decision Decision => Obstacles.Count > 0 ? Decision.NotDecided : Conformity.Decision;

    public double? Probability => Obstacles.Count > 0 || double.IsNaN(Conformity.Probability) ? null : Conformity.Probability;

    /// <summary>Compares a value with the limit in force.</summary>
    /// <param name="input">The input of the criterion.</param>
    /// <param name="criterion">Code of the criterion.</param>
    /// <param name="band">Band of the scope; null where it is about none.</param>
    /// <param name="nominalCelsius">Set point, or mean, that picks the limit; NaN where unknown.</param>
    /// <param name="value">The value.</param>
    /// <param name="units">The units in which a limit may be given, by how many of each make one unit of the value; the first is used where no limit names one.</param>
    /// <param name="obstacles">Why nothing can be decided, apart from the limit.</param>
    public static LimitVerdict Of(
        CriterionInput input,
        string criterion,
        string? band,
        double nominalCelsius,
        Estimate value,
        IReadOnlyList<(string Unit, double Factor)> units,
        IEnumerable<string> obstacles)
    {
        AcceptanceLimit? limit = LimitLookup.InForce(input.Snapshot, input.Source.Key, criterion, nominalCelsius, band, input.Window.End);
        int named = limit is null ? -1 : units.Select(unit => unit.Unit).ToList().IndexOf(limit.Unit);
        (string unit, double factor) = units[Math.Max(0, named)];
        Estimate scaled = value.HasValue ? new(value.Value * factor, value.StandardUncertainty * factor, value.DegreesOfFreedom) : Estimate.None;
        AcceptanceLimit? comparable = named < 0 ? null : limit;
        ConformityResult conformity = Metrology.Uncertainty.Conformity.Decide(
            scaled, ToleranceInterval.AtMost(comparable?.Maximum ?? double.PositiveInfinity), comparable?.Rule ?? DecisionRule.SimpleAcceptance);
        return new(scaled, unit, limit, conformity, [.. obstacles, .. AboutLimit(criterion, band, nominalCelsius, limit, named >= 0)]);
    }

    private static IEnumerable<string> AboutLimit(string criterion, string? band, double nominalCelsius, AcceptanceLimit? limit, bool comparable)
    {
        if (limit is null)
        {
            yield return $"no acceptance limit for {criterion}{(band is null ? string.Empty : " in the band " + band)} is in force"
                + (double.IsFinite(nominalCelsius) ? $" at {VerdictText.Plain(nominalCelsius)} degC" : string.Empty);
        }
        else if (limit is not null && !comparable)
        {
            yield return $"the acceptance limit {limit.Id} is given in {limit.Unit}, which is no unit of this value";
        }
    }
}
