using System.ComponentModel;

namespace LabWatch.Service.Api.Views;

/// <summary>A deviation of radiance temperature as <c>labwatch calc attribution</c> takes it, and where it comes from.</summary>
internal sealed record DeviationView(
    [property: Description("Id of the source.")] string Source,
    [property: Description("Instrument that is the comparator; wells for the difference between the reference well and the others.")] string Comparator,
    [property: Description("The band by its edges; wells.")] string Band,
    [property: Description("Channel of the comparator; null for wells.")] string? Channel,
    [property: Description("Set point, degree Celsius.")] double? SetPointCelsius,
    [property: Description("Deviation, kelvin.")] double Kelvin,
    [property: Description("Standard uncertainty without what the candidates stand for, kelvin.")] double StandardUncertainty,
    [property: Description("Kelvin for a unit of wall emissivity.")] double KelvinPerEmissivity,
    [property: Description("Kelvin for a kelvin of the gradient.")] double KelvinPerGradient,
    [property: Description("Kelvin for a unit of relative signal.")] double KelvinPerSignal,
    [property: Description("Days in its mean.")] int RecentDays,
    [property: Description("Days that it is told from; 0 where it is told from the model.")] int ReferenceDays);
