using System.ComponentModel;
using LabWatch.Lab.Time;

namespace LabWatch.Service.Api.Views;

/// <summary>The forecasts of a source, the soonest crossing first.</summary>
internal sealed record ForecastListView(
    [property: Description("The source as site.source.")] string Source,
    [property: Description("The instant that they are given for: windows that end later do not count.")] Instant At,
    [property: Description("The forecasts.")] IReadOnlyList<ForecastView> Items);
