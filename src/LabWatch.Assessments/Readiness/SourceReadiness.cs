using LabWatch.Lab.Identity;

namespace LabWatch.Assessments.Readiness;

/// <summary>The readiness of a source with all its reasons.</summary>
/// <param name="Source">The source.</param>
/// <param name="State">The state.</param>
/// <param name="Reasons">What leads to it, the weightiest first; at least one.</param>
public sealed record SourceReadiness(SourceKey Source, ReadinessState State, IReadOnlyList<ReadinessReason> Reasons)
{
    /// <summary>When it is expected to be ready, while it is on its way; null otherwise.</summary>
    public ReadyForecast? Forecast { get; init; }
}
