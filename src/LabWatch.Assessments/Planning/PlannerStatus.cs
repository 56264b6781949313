using LabWatch.Lab.Time;

namespace LabWatch.Assessments.Planning;

/// <summary>What the planner is at.</summary>
/// <param name="WindowsDue">Windows that are due and not yet assessed, at the start of the last run.</param>
/// <param name="HoursWaiting">Hours with new readings that wait to be quiet or to be looked at; at least one a source while readings come in.</param>
/// <param name="Recorded">Assessments recorded since the service started, revisions included.</param>
/// <param name="LastRun">When the last run began; null before the first.</param>
/// <param name="LastSuccess">When the last run without an error ended; null before the first.</param>
/// <param name="LastError">What the last run failed with, in words; null where it did not fail.</param>
public sealed record PlannerStatus(int WindowsDue, int HoursWaiting, long Recorded, Instant? LastRun, Instant? LastSuccess, string? LastError)
{
    /// <summary>Before the first run.</summary>
    public static PlannerStatus None { get; } = new(0, 0, 0, null, null, null);
}
