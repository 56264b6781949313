using LabWatch.Lab.Identity;
using LabWatch.Lab.Time;

namespace LabWatch.Assessments.Recomputation;

/// <summary>Which assessments to compute again, and what to do with those that differ.</summary>
/// <param name="Window">Windows that end inside this span; null for all.</param>
/// <param name="Sources">Ids of sources; empty for all.</param>
/// <param name="Criteria">Codes of criteria; empty for all.</param>
/// <param name="Reason">Why what differs is recorded as a revision that supersedes; null to record nothing.</param>
public sealed record RecomputeRequest(TimeWindow? Window, IReadOnlyList<string> Sources, IReadOnlyList<string> Criteria, string? Reason)
{
    /// <summary>Whether a source is asked for.</summary>
    public bool Wants(SourceKey source) => Sources.Count == 0 || Sources.Contains(source.Source, StringComparer.Ordinal);

    /// <summary>Whether a criterion is asked for.</summary>
    public bool Wants(string criterion) => Criteria.Count == 0 || Criteria.Contains(criterion, StringComparer.Ordinal);
}
