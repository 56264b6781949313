using LabWatch.Assessments.Criteria;
using LabWatch.Lab;
using LabWatch.Lab.Alerts;
using LabWatch.Lab.Assessments;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Runs;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;
using LabWatch.Readings;

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
    Instant Now)
{
    /// <summary>The criteria that are judged, each on its own schedule, by which an assessment is old or not.</summary>
    public IReadOnlyList<ICriterion> Criteria { get; init; } = [new StabilityCriterion(StabilityCriterion.DefaultSchedule)];

    /// <summary>The calibration run that the source is in use by; null where it is in none.</summary>
    public CalibrationRun? OpenRun { get; init; }

    /// <summary>
    /// Readings of the reference channel and of the set point over the last hour or so, by which it is told when the source will be at its set
    /// point; null where they are not at hand, and then nothing is told.
    /// </summary>
    public ReadingWindow? Recent { get; init; }
}
