using LabWatch.Assessments.Criteria.Verdicts;
using LabWatch.Assessments.Evaluation;

namespace LabWatch.Assessments.Criteria.TraceabilityParts;

/// <summary>An assessment of traceability in plain words.</summary>
internal static class TraceText
{
    public static string Of(TraceChain chain, TraceLink? worst, LimitVerdict verdict, bool fails)
    {
        string broken = chain.Broken.Count == 0 ? string.Empty : (fails ? "Fails: " : "Broken: ") + string.Join("; and ", chain.Broken) + ". ";
        string refusal = fails ? string.Empty : VerdictText.Refusal(verdict.Obstacles);
        string age = worst is null ? string.Empty : VerdictText.Sentence(
            $"The oldest link ({worst.Name}) has used part of its interval, which", verdict.Value.Value, verdict.Unit, verdict.Limit, verdict.Conformity, verdict.Obstacles.Count == 0 && !fails)
            + $" It {(worst.DaysLeft < 0 ? "has been due for" : "is due in")} {Quantities.Fixed(Math.Abs(worst.DaysLeft ?? 0), 0)} days. ";
        string[] unset = [.. chain.Links.Where(link => link.Rests && double.IsNaN(link.UsedPercent)).Select(link => link.Name)];
        string without = unset.Length == 0 ? string.Empty : $"No interval is set for {string.Join(", ", unset)}. ";
        string links = chain.Links.Count == 0 ? "There is no link." : $"Links: {string.Join(", ", chain.Links.Select(link => $"{link.Name} ({link.Reference}{(link.Rests ? string.Empty : ", checks only")})"))}.";
        return $"{refusal}{broken}{age}{without}{links}";
    }
}
