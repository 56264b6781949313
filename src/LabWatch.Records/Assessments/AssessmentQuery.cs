using LabWatch.Lab.Identity;
using LabWatch.Lab.Time;

namespace LabWatch.Records.Assessments;

/// <summary>Which assessments to list.</summary>
/// <param name="Source">Only this source; null for all.</param>
/// <param name="Criterion">Only this criterion; null for all.</param>
/// <param name="Window">Only windows that end inside this span; null for all.</param>
/// <param name="After">Cursor from the page before; null for the first page.</param>
/// <param name="Count">Rows on the page, 1 to 2000.</param>
public sealed record AssessmentQuery(SourceKey? Source, string? Criterion, TimeWindow? Window, string? After, int Count);
