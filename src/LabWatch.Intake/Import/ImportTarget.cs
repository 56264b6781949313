using LabWatch.Lab.Identity;

namespace LabWatch.Intake.Import;

/// <summary>The channel that a value is for.</summary>
/// <param name="Source">Its source.</param>
/// <param name="Channel">Its id.</param>
/// <param name="Unit">Unit of the value; null for the channel's.</param>
internal sealed record ImportTarget(SourceKey Source, string Channel, string? Unit);
