using System.ComponentModel;
using LabWatch.Lab.Time;

namespace LabWatch.Service.Api.Views;

/// <summary>An instrument's stay in a channel.</summary>
internal sealed record StayView(
    [property: Description("Key of the source, site.source.")] string Source,
    [property: Description("Id of the channel.")] string Channel,
    [property: Description("First instant.")] Instant From,
    [property: Description("First instant after it; null while it lasts.")] Instant? Until);
