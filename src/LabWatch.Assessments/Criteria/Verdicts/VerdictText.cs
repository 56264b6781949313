using LabWatch.Assessments.Evaluation;
using LabWatch.Lab.Limits;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Assessments.Criteria.Verdicts;

/// <summary>Decisions in plain words, the same for every criterion.</summary>
internal static class VerdictText
{
    /// <summary>"Not decided: ..." with a space at the end; empty where something is decided.</summary>
    public static string Refusal(IReadOnlyList<string> obstacles) =>
        obstacles.Count > 0 ? $"Not decided: {string.Join("; and ", obstacles)}. " : string.Empty;

    /// <summary>One or two sentences: the value with its expanded uncertainty, the limit, the outcome and the probability of conformity.</summary>
    /// <param name="subject">What the value is, up to "is".</param>
    /// <param name="value">The value.</param>
    /// <param name="unit">Its unit.</param>
    /// <param name="limit">The limit.</param>
    /// <param name="conformity">The comparison.</param>
    /// <param name="isDecided">Whether anything is decided.</param>
    public static string Sentence(string subject, double value, string unit, AcceptanceLimit? limit, in ConformityResult conformity, bool isDecided)
    {
        double expanded = conformity.ExpandedUncertainty;
        string text = $"{subject} is {Quantities.Value(value, expanded)}{Of(unit)}"
            + (expanded > 0 ? $" (U = {Quantities.Significant(expanded)}{Of(unit)}, k = {Quantities.Fixed(conformity.CoverageFactor, 2)})" : string.Empty);
        return limit is not null && isDecided
            ? $"{text}; the limit is {Plain(limit.Maximum)}{Of(limit.Unit)}; {Outcome(limit, unit, conformity)}. "
                + $"Probability of conformity {Quantities.Percent(conformity.Probability)}."
            : $"{text}, for information only.";
    }

    /// <summary>A unit behind a number; nothing for the pure number.</summary>
    public static string Of(string unit) => unit == "/" ? string.Empty : " " + unit;

    /// <summary>A stated number without superfluous zeros.</summary>
    public static string Plain(double value) => Math.Abs(value) is > 0 and < 0.01
        ? Quantities.Significant(value, 2).TrimEnd('0').TrimEnd('.')
        : Trim(Quantities.Fixed(value, 3));

    private static string Trim(string text) => text.TrimEnd('0').TrimEnd('.');

    private static string Outcome(AcceptanceLimit limit, string unit, in ConformityResult conformity)
    {
        double guardBand = conformity.GuardBand;
        string rule = limit.Rule is DecisionRule.GuardBand
            ? guardBand < limit.Maximum
                ? $"with the guard band of {Quantities.Significant(guardBand)}{Of(unit)} a value up to {Quantities.Value(limit.Maximum - guardBand, conformity.ExpandedUncertainty)}{Of(unit)} passes, so it "
                : $"the guard band of {Quantities.Significant(guardBand)}{Of(unit)} is wider than the limit, so nothing can pass in full and it "
            : "by simple acceptance it ";
        return rule + conformity.Decision switch
        {
            Decision.Pass => "passes",
            Decision.ConditionalPass => "passes conditionally: inside the limit, but within the guard band",
            Decision.ConditionalFail => "fails conditionally: outside the limit, but by less than the guard band",
            Decision.Fail => "fails",
            _ => "cannot be decided",
        };
    }
}
