using System.ComponentModel;

namespace LabWatch.Service.Api.Views;

/// <summary>Whether a source may be calibrated with.</summary>
internal sealed record ReadinessView(
    [property: Description("off, heating, cooling, settling, ready, not-fit or unknown.")] string State,
    [property: Description("What leads to it, the weightiest first.")] IReadOnlyList<ReadinessReasonView> Reasons);
