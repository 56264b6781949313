using System.ComponentModel;

namespace LabWatch.Service.Api.Views;

/// <summary>A named side result of an assessment.</summary>
internal sealed record FigureView(
    [property: Description("Machine name, for example slope.")] string Name,
    [property: Description("The value, in unit; null where there is none.")] double? Value,
    [property: Description("Its standard uncertainty, in unit; null where unknown.")] double? StandardUncertainty,
    [property: Description("Unit.")] string Unit);
