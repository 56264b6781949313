using LabWatch.Lab.Time;

namespace LabWatch.Assessments.Clock;

/// <summary>A step of the wall clock: somebody set it, a time server corrected it, or the machine slept.</summary>
/// <param name="NoticedAt">When it was noticed, by the clock after the step.</param>
/// <param name="Step">By how much the clock stepped; positive forward.</param>
/// <param name="Within">Length of the stretch before <paramref name="NoticedAt"/> in which it happened.</param>
public sealed record ClockStep(Instant NoticedAt, TimeSpan Step, TimeSpan Within);
