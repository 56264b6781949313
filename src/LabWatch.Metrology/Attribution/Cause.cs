namespace LabWatch.Metrology.Attribution;

/// <summary>One candidate: a kind and what it concerns.</summary>
/// <param name="Kind">Kind.</param>
/// <param name="Subject">The source, or the comparator for its drift.</param>
/// <param name="Band">The band, where the kind has one; else null.</param>
public sealed record Cause(CauseKind Kind, string Subject, string? Band);
