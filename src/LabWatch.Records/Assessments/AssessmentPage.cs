using LabWatch.Lab.Assessments;

namespace LabWatch.Records.Assessments;

/// <summary>One page of assessments.</summary>
/// <param name="Items">The assessments.</param>
/// <param name="Next">Cursor of the next page; null on the last.</param>
public sealed record AssessmentPage(IReadOnlyList<Assessment> Items, string? Next);
