using LabWatch.Lab.Assessments;
using LabWatch.Lab.Limits;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Assessments;

/// <summary>What a criterion found in one window, for one scope.</summary>
/// <param name="Scope">What else it is about; empty where nothing.</param>
/// <param name="Value">The value with its standard uncertainty, in <paramref name="Unit"/>.</param>
/// <param name="Unit">Unit of the value and of the limit.</param>
/// <param name="Limit">The limit in force; null where there is none.</param>
/// <param name="CoverageFactor">Coverage factor of the expanded uncertainty; NaN where there is no value.</param>
/// <param name="Decision">The outcome.</param>
/// <param name="ConformityProbability">Probability that the true value is inside the limit; null where not decided.</param>
/// <param name="Figures">Side results.</param>
/// <param name="Explanation">The outcome in plain words with numbers and units.</param>
public sealed record CriterionResult(
    string Scope,
    Estimate Value,
    string Unit,
    AcceptanceLimit? Limit,
    double CoverageFactor,
    Decision Decision,
    double? ConformityProbability,
    IReadOnlyList<AssessmentFigure> Figures,
    string Explanation)
{
    /// <summary>The value of a side result; NaN where there is none of that name.</summary>
    public static double Figure(IReadOnlyList<AssessmentFigure> figures, string name) =>
        figures.FirstOrDefault(figure => string.Equals(figure.Name, name, StringComparison.Ordinal))?.Value.Value ?? double.NaN;
}
