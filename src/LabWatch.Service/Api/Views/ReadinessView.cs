using System.ComponentModel;
using LabWatch.Lab.Time;

namespace LabWatch.Service.Api.Views;

/// <summary>Whether a source may be calibrated with.</summary>
internal sealed record ReadinessView(
    [property: Description("off, heating, cooling, settling, ready, not-fit or unknown.")] string State,
    [property: Description("Every reason that keeps it from being ready, or that was judged.")] IReadOnlyList<ReadinessReasonView> Reasons,
    [property: Description("When it is expected to be ready; null where nobody can say.")] Instant? ReadyAt);
