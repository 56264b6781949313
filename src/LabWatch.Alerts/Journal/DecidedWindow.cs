using LabWatch.Lab.Assessments;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Time;

namespace LabWatch.Alerts.Journal;

/// <summary>The newest window of a source, criterion and scope that a decision was taken on.</summary>
/// <param name="Source">The source.</param>
/// <param name="Criterion">Code of the criterion.</param>
/// <param name="Scope">Scope of the assessment.</param>
/// <param name="Window">The window.</param>
/// <param name="Revision">Revision of its assessment.</param>
internal sealed record DecidedWindow(SourceKey Source, string Criterion, string Scope, TimeWindow Window, int Revision)
{
    /// <summary>The window of an assessment.</summary>
    public static DecidedWindow Of(Assessment assessment) =>
        new(assessment.Source, assessment.Criterion, assessment.Scope, assessment.Window, assessment.Revision);

    /// <summary>Whether this one supersedes another of the same source, criterion and scope.</summary>
    public bool Supersedes(DecidedWindow? other) =>
        other is null || Window.End > other.Window.End || (Window == other.Window && Revision > other.Revision);
}
