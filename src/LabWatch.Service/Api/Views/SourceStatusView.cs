using System.ComponentModel;
using LabWatch.Lab.Time;

namespace LabWatch.Service.Api.Views;

/// <summary>What is known about a source now.</summary>
internal sealed record SourceStatusView(
    [property: Description("Key of the source, site.source.")] string Id,
    [property: Description("Whether it may be calibrated with, and why.")] ReadinessView Readiness,
    [property: Description("Temperature of the reference thermometer; null without a reading.")] TemperatureView? Temperature,
    [property: Description("Set point of the controller, degree Celsius; null where not reported.")] double? SetPointCelsius,
    [property: Description("Device time of the newest reading of any channel; null before the first.")] Instant? NewestReadingAt,
    [property: Description("Whether the source as a whole has gone silent: no reading within three promised intervals, at least 10 s.")] bool IsSilent,
    [property: Description("The newest reading of each channel.")] IReadOnlyList<NewestReadingView> Newest,
    [property: Description("Alerts of this source that are not over, hazards first.")] IReadOnlyList<AlertView> OpenAlerts,
    [property: Description("The calibration run that uses it now; null where none does.")] RunView? Run);
