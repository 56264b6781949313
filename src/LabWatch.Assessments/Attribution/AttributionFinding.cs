using LabWatch.Lab.Identity;
using LabWatch.Metrology.Attribution;

namespace LabWatch.Assessments.Attribution;

/// <summary>What may lie behind the deviations of one source, or of the sources that share a comparator.</summary>
/// <param name="Basis">What the deviations are told from: <c>change</c> (the same comparator on the reference days) or <c>model</c> (the model of the cavity).</param>
/// <param name="Sources">The sources.</param>
/// <param name="Observations">The deviations.</param>
/// <param name="Result">The attribution; null where there are too few deviations.</param>
/// <param name="Explanation">The outcome in plain words.</param>
/// <param name="WouldSeparate">What would separate the suspects, as sentences; empty where nothing needs to be separated.</param>
public sealed record AttributionFinding(
    string Basis,
    IReadOnlyList<SourceKey> Sources,
    IReadOnlyList<Observation> Observations,
    AttributionResult? Result,
    string Explanation,
    IReadOnlyList<string> WouldSeparate);
