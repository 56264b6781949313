using System.ComponentModel;

namespace LabWatch.Service.Api.Views;

/// <summary>One part that the service depends on.</summary>
internal sealed record HealthPartView(
    [property: Description("Name of the part.")] string Name,
    [property: Description("Whether it answered as it should.")] bool IsReady,
    [property: Description("What was found, in words.")] string Detail,
    [property: Description("How long the answer took, milliseconds.")] double TookMilliseconds);
