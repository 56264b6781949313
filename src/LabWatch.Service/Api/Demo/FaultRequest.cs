using System.ComponentModel;

namespace LabWatch.Service.Api.Demo;

/// <summary>A fault to inject.</summary>
internal sealed record FaultRequest(
    [property: Description("Code of the kind.")] string? Kind,
    [property: Description("Key of the source, site.source.")] string? Source,
    [property: Description("Id of the channel; required where the kind needs one.")] string? Channel,
    [property: Description("Size, in the unit of the kind; the kind's own where missing.")] double? Size,
    [property: Description("Time over which it grows to its size, seconds of the laboratory's clock; at once where missing.")] double? OnsetSeconds,
    [property: Description("Time until it is repaired, seconds of the laboratory's clock; until cleared where missing.")] double? DurationSeconds);
