using System.ComponentModel;

namespace LabWatch.Service.Api.Views;

/// <summary>A member that a correction changed.</summary>
internal sealed record RunChangeView(
    [property: Description("Name of the member, for example setPointCelsius.")] string Member,
    [property: Description("What it was; null where nothing.")] string? From,
    [property: Description("What it is since; null where nothing.")] string? To);
