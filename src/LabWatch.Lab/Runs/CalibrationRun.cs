using LabWatch.Lab.Identity;
using LabWatch.Lab.Time;

namespace LabWatch.Lab.Runs;

/// <summary>
/// One use of a source for a calibration, as it stands after all its recorded steps (started, ended, corrected, cancelled). The steps are
/// what is on the record; this is derived from them.
/// </summary>
/// <param name="Id">Id (UUID).</param>
/// <param name="Source">The source used.</param>
/// <param name="JobNumber">Number of the job that the calibration belongs to.</param>
/// <param name="Item">What is calibrated: kind and serial number, as the laboratory writes it.</param>
/// <param name="SetPointCelsius">Set point used, degree Celsius.</param>
/// <param name="StartedAt">When the run began.</param>
/// <param name="StartedBy">Account name of who started it.</param>
/// <param name="ReadinessAtStart">State of the source when the run began, as the API writes it, for example <c>ready</c>; <c>unknown</c> where nothing was known.</param>
public sealed record CalibrationRun(
    Guid Id,
    SourceKey Source,
    string JobNumber,
    string Item,
    double SetPointCelsius,
    Instant StartedAt,
    string StartedBy,
    string ReadinessAtStart)
{
    /// <summary>Id of the working band used; null where none was stated.</summary>
    public string? Band { get; init; }

    /// <summary>What the technician noted; null where nothing.</summary>
    public string? Note { get; init; }

    /// <summary>When the run ended; null while it lasts.</summary>
    public Instant? EndedAt { get; init; }

    /// <summary>Account name of who ended it; null while it lasts.</summary>
    public string? EndedBy { get; init; }

    /// <summary>Why the source was used although it was not ready; null where it was.</summary>
    public string? OverrideReason { get; init; }

    /// <summary>Whether the run was called off: it counts as never having used the source.</summary>
    public bool Cancelled { get; init; }

    /// <summary>Whether the source is in use by this run now.</summary>
    public bool IsOpen => EndedAt is null && !Cancelled;
}
