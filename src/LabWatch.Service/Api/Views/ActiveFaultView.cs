using System.ComponentModel;
using LabWatch.Lab.Time;

namespace LabWatch.Service.Api.Views;

/// <summary>A fault of the demo that works now or is still to come.</summary>
internal sealed record ActiveFaultView(
    [property: Description("Id of the fault; delete it to repair it.")] string Id,
    [property: Description("Code of the kind.")] string Kind,
    [property: Description("Key of the source.")] string Source,
    [property: Description("Id of the channel; null where the kind takes none.")] string? Channel,
    [property: Description("Size, in the unit of the kind; null for the kind's own.")] double? Size,
    [property: Description("Since when.")] Instant Since,
    [property: Description("When it is repaired by itself; null where it stays.")] Instant? Until,
    [property: Description("Whether the demo made it by itself; such a fault ends by itself and cannot be cleared.")] bool IsScheduled);
