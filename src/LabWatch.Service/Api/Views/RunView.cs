using System.ComponentModel;
using LabWatch.Lab.Time;

namespace LabWatch.Service.Api.Views;

/// <summary>A calibration run: which job used which source when.</summary>
internal sealed record RunView(
    [property: Description("Id (UUID).")] Guid Id,
    [property: Description("Key of the source, site.source.")] string Source,
    [property: Description("Number of the job.")] string JobNumber,
    [property: Description("What is calibrated.")] string Item,
    [property: Description("Set point used, degree Celsius.")] double SetPointCelsius,
    [property: Description("Id of the working band; null where none was stated.")] string? Band,
    [property: Description("What the technician noted; null where nothing.")] string? Note,
    [property: Description("When it began.")] Instant StartedAt,
    [property: Description("Account of who started it.")] string StartedBy,
    [property: Description("When it ended; null while it lasts.")] Instant? EndedAt,
    [property: Description("Account of who ended it; null while it lasts.")] string? EndedBy,
    [property: Description("Why the source was used although it was not ready; null where no reason was given.")] string? OverrideReason,
    [property: Description("State of the source at the start: off, heating, cooling, settling, ready, not-fit or unknown.")] string ReadinessAtStart,
    [property: Description("Whether it was called off: it counts as never having used the source.")] bool Cancelled,
    [property: Description("Everything that was recorded of it, in order.")] IReadOnlyList<RunStepView> Steps);
