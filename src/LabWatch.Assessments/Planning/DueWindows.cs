using LabWatch.Lab.Assessments;
using LabWatch.Lab.Time;

namespace LabWatch.Assessments.Planning;

/// <summary>Windows of one criterion that have become due and have been judged, and are not recorded yet.</summary>
/// <param name="End">End of the latest.</param>
/// <param name="Made">What there is to record, in rising order of the windows.</param>
internal sealed record DueWindows(Instant End, IReadOnlyList<Assessment> Made);
