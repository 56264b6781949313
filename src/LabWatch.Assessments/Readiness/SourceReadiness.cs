using LabWatch.Lab.Identity;

namespace LabWatch.Assessments.Readiness;

/// <summary>The readiness of a source with all its reasons.</summary>
/// <param name="Source">The source.</param>
/// <param name="State">The state.</param>
/// <param name="Reasons">What leads to it, the weightiest first; at least one.</param>
public sealed record SourceReadiness(SourceKey Source, ReadinessState State, IReadOnlyList<ReadinessReason> Reasons);
