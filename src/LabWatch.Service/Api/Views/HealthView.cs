using System.ComponentModel;

namespace LabWatch.Service.Api.Views;

/// <summary>Whether the service can do its job now.</summary>
internal sealed record HealthView(
    [property: Description("ready, or not-ready where a part is not.")] string Status,
    [property: Description("Version of the program.")] string Version,
    [property: Description("The parts it depends on, each asked just now.")] IReadOnlyList<HealthPartView> Parts);
