using System.ComponentModel;
using LabWatch.Lab.Time;

namespace LabWatch.Service.Api.Views;

/// <summary>The newest reading of a channel.</summary>
internal sealed record NewestReadingView(
    [property: Description("Id of the channel.")] string Channel,
    [property: Description("Device time.")] Instant Time,
    [property: Description("Value as the device sent it, in the channel's unit; null where the device said that there is none.")] double? Raw,
    [property: Description("t90, degree Celsius, for thermometers and temperature channels; null for the others.")] double? Celsius,
    [property: Description("What else is known about the reading, empty for nothing.")] IReadOnlyList<string> Quality,
    [property: Description("Whether the channel has been silent for longer than it may be.")] bool IsSilent);
