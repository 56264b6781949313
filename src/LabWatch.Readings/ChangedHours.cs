using LabWatch.Lab.Identity;
using LabWatch.Lab.Time;

namespace LabWatch.Readings;

/// <summary>Hours that changed since a change number.</summary>
/// <param name="Change">The change number now: pass it to the next call.</param>
/// <param name="Hours">The hours, each once.</param>
public sealed record ChangedHours(long Change, IReadOnlyList<(SourceKey Source, Instant Hour)> Hours);
