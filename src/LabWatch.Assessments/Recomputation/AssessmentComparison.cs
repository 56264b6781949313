using System.Globalization;
using LabWatch.Assessments.Evaluation;
using LabWatch.Lab.Assessments;

namespace LabWatch.Assessments.Recomputation;

/// <summary>Compares an assessment on record with the same one computed again.</summary>
internal static class AssessmentComparison
{
    /// <summary>
    /// Largest relative difference of two numbers that agree. Another processor or mathematical library may round the last digits of a
    /// logarithm or a sum otherwise; a change of method shows far above it.
    /// </summary>
    public const double RelativeTolerance = 1e-9;

    /// <summary>Differences that are named one by one.</summary>
    private const int MostNamed = 4;

    /// <summary>How the two compare, and what differs.</summary>
    public static (Agreement Agreement, string Difference) Of(Assessment standing, Assessment again)
    {
        if (Supersession.Reason(standing.Provenance, again.Provenance) is { } reason)
        {
            return (Agreement.InputsChanged, reason);
        }

        List<(string Name, double Standing, double Again)> numbers = [.. Pairs(standing, again)];
        string[] differing =
        [
            .. Word("decision", standing.Decision.ToString(), again.Decision.ToString()),
            .. Word("unit", standing.Unit, again.Unit),
            .. numbers.Where(pair => !IsClose(pair.Standing, pair.Again)).Select(pair => Words(pair.Name, Text(pair.Standing), Text(pair.Again))),
        ];
        return differing.Length > 0 ? (Agreement.Differs, Named(differing))
            : numbers.Any(pair => !SameBits(pair.Standing, pair.Again)) ? (Agreement.Agrees, "The last digits of some numbers")
            : !string.Equals(standing.Explanation, again.Explanation, StringComparison.Ordinal) ? (Agreement.Agrees, "The words of the explanation")
            : (Agreement.Identical, string.Empty);
    }

    private static string Named(string[] differing) =>
        string.Join("; ", differing.Take(MostNamed)) + (differing.Length > MostNamed ? FormattableString.Invariant($"; and {differing.Length - MostNamed} more numbers") : string.Empty);

    private static IEnumerable<(string Name, double Standing, double Again)> Pairs(Assessment standing, Assessment again)
    {
        yield return ("value", standing.Value.Value, again.Value.Value);
        yield return ("standard uncertainty", standing.Value.StandardUncertainty, again.Value.StandardUncertainty);
        yield return ("degrees of freedom", standing.Value.DegreesOfFreedom, again.Value.DegreesOfFreedom);
        yield return ("coverage factor", standing.CoverageFactor, again.CoverageFactor);
        yield return ("limit", standing.Limit ?? double.NaN, again.Limit ?? double.NaN);
        yield return ("probability of conformity", standing.ConformityProbability ?? double.NaN, again.ConformityProbability ?? double.NaN);
        foreach (string name in standing.Figures.Concat(again.Figures).Select(figure => figure.Name).Distinct(StringComparer.Ordinal))
        {
            AssessmentFigure? one = Figure(standing, name), other = Figure(again, name);
            yield return (name, one?.Value.Value ?? double.NaN, other?.Value.Value ?? double.NaN);
            yield return ($"uncertainty of {name}", one?.Value.StandardUncertainty ?? double.NaN, other?.Value.StandardUncertainty ?? double.NaN);
        }
    }

    private static AssessmentFigure? Figure(Assessment assessment, string name) =>
        assessment.Figures.FirstOrDefault(figure => string.Equals(figure.Name, name, StringComparison.Ordinal));

    private static bool IsClose(double standing, double again) =>
        SameBits(standing, again) || Math.Abs(standing - again) <= RelativeTolerance * Math.Max(Math.Abs(standing), Math.Abs(again));

    /// <summary>Whether two numbers are the same; one "not a number" is as good as another.</summary>
    private static bool SameBits(double standing, double again) =>
        (double.IsNaN(standing) && double.IsNaN(again)) || BitConverter.DoubleToInt64Bits(standing) == BitConverter.DoubleToInt64Bits(again);

    private static IEnumerable<string> Word(string name, string standing, string again) =>
        string.Equals(standing, again, StringComparison.Ordinal) ? [] : [Words(name, standing, again)];

    private static string Words(string name, string standing, string again) => $"{name} {again} instead of {standing}";

    private static string Text(double number) => double.IsNaN(number) ? "none" : number.ToString("R", CultureInfo.InvariantCulture);
}
