using System.ComponentModel;

namespace LabWatch.Service.Api.Views;

/// <summary>Whether a source may be calibrated with.</summary>
internal sealed record ReadinessView(
    [property: Description("off, heating, cooling, settling, ready, not-fit or unknown.")] string State,
    [property: Description("What leads to it, the weightiest first.")] IReadOnlyList<ReadinessReasonView> Reasons,
    [property: Description("When it is expected to be ready, while it is on its way; null otherwise or where nothing can be told.")] ReadyForecastView? Expected);
