using LabWatch.Assessments.Evaluation;
using LabWatch.Lab.Limits;
using LabWatch.Lab.Sources;

namespace LabWatch.Assessments.Readiness;

/// <summary>Pieces of sentences.</summary>
internal static class Wording
{
    /// <summary>A number with up to two decimals, or more digits where it is small.</summary>
    public static string Plain(double value) =>
        Math.Abs(value) is > 0 and < 0.1 ? Quantities.Significant(value) : Quantities.Fixed(value, 2).TrimEnd('0').TrimEnd('.');

    /// <summary>A criterion and its scope as part of a sentence, for example "effective emissivity (8 to 14 um)".</summary>
    public static string Subject(string criterion, ReferenceSource source, string scope) =>
        scope.Length == 0 ? CriterionCode.NameOf(criterion) : $"{CriterionCode.NameOf(criterion)} ({source.NameOfScope(scope)})";

    /// <summary>The first sentence of an explanation.</summary>
    public static string FirstSentence(string text)
    {
        int end = text.IndexOf(". ", StringComparison.Ordinal);
        return end < 0 ? text : text[..(end + 1)];
    }
}
