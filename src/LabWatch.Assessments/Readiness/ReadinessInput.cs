using LabWatch.Lab;
using LabWatch.Lab.Alerts;
using LabWatch.Lab.Assessments;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;

namespace LabWatch.Assessments.Readiness;

/// <summary>All that readiness is judged by.</summary>
/// <param name="Snapshot">What is configured about the site, with the certificates and their due dates.</param>
/// <param name="Source">The source, out of the snapshot.</param>
/// <param name="Newest">The newest reading of each of its channels.</param>
/// <param name="Assessments">Latest assessments; those of other sources are passed over.</param>
/// <param name="OpenAlerts">Alerts that are not normal; those of other sources are passed over.</param>
/// <param name="Now">The present instant.</param>
public sealed record ReadinessInput(
    LabSnapshot Snapshot,
    ReferenceSource Source,
    IReadOnlyList<Reading> Newest,
    IReadOnlyList<Assessment> Assessments,
    IReadOnlyList<Alert> OpenAlerts,
    Instant Now);
