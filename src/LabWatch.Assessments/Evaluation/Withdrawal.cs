using LabWatch.Lab.Assessments;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Assessments.Evaluation;

/// <summary>
/// What becomes of an assessment about something that the source, as it is described by now for that window, does not have: a revision
/// without value and decision supersedes it, so that nobody goes by the former one.
/// </summary>
internal static class Withdrawal
{
    /// <summary>Whether an assessment is one. Every other one has side results.</summary>
    public static bool Is(Assessment assessment) =>
        assessment.Decision is Decision.NotDecided && !assessment.Value.HasValue && assessment.Figures.Count == 0;

    /// <summary>The revision that supersedes one about a scope that is not there.</summary>
    public static Assessment Of(Assessment former, ReferenceSource described, Provenance provenance, Instant now) => former with
    {
        Revision = former.Revision + 1,
        Value = Estimate.None,
        Limit = null,
        CoverageFactor = double.NaN,
        Decision = Decision.NotDecided,
        ConformityProbability = null,
        Figures = [],
        Explanation = $"Not decided: {described.Reference}, the description that holds for this window, has "
            + (former.Scope.Length == 0 ? "nothing that this criterion judges." : $"no {former.Scope} that this criterion judges."),
        Provenance = provenance,
        ComputedAt = now,
        SupersedeReason = Supersession.Reason(former.Provenance, provenance) ?? $"Nothing is judged here by {described.Reference}.",
    };
}
