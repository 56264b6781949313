using System.ComponentModel;

namespace LabWatch.Service.Api.Views;

/// <summary>A candidate.</summary>
internal sealed record CauseView(
    [property: Description("thermometer-error, coating-emissivity, gradient, comparator-drift or one-band-absorption.")] string Kind,
    [property: Description("The source, or the comparator for its drift.")] string Subject,
    [property: Description("The band; null where the kind has none.")] string? Band,
    [property: Description("The same in words.")] string Text,
    [property: Description("Probability to be at work, alone or with another.")] double Probability);
