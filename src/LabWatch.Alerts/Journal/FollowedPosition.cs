namespace LabWatch.Alerts.Journal;

/// <summary>How far the assessments were followed.</summary>
/// <param name="Sequence">Sequence number of the last assessment looked at.</param>
/// <param name="Changed">The newest decided windows that changed since the position before; all of them at the head of a rewritten journal.</param>
internal sealed record FollowedPosition(long Sequence, IReadOnlyList<DecidedWindow> Changed);
