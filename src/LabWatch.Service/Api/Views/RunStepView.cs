using System.ComponentModel;
using LabWatch.Lab.Time;

namespace LabWatch.Service.Api.Views;

/// <summary>One step in the life of a calibration run.</summary>
internal sealed record RunStepView(
    [property: Description("1 for the start, one more for each later step.")] int Number,
    [property: Description("When.")] Instant At,
    [property: Description("Account of who did it.")] string By,
    [property: Description("started, ended, corrected or cancelled.")] string What,
    [property: Description("Why; null where none is asked for.")] string? Reason,
    [property: Description("What a correction changed; empty for other steps.")] IReadOnlyList<RunChangeView> Changes);
