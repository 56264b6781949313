using System.ComponentModel;

namespace LabWatch.Service.Api.Views;

/// <summary>A channel of a source as configured.</summary>
internal sealed record ChannelView(
    [property: Description("Id of the channel in its source.")] string Id,
    [property: Description("Name for people.")] string Name,
    [property: Description("What it measures, for example well-thermometer or outer-surface.")] string Quantity,
    [property: Description("Unit of the raw value, by its SenML name (RFC 8428, RFC 8798).")] string Unit,
    [property: Description("Time between readings that the device promises, seconds.")] double IntervalSeconds,
    [property: Description("Distance of the sensing element from the aperture plane, millimetres.")] double? AxialPositionMillimetre,
    [property: Description("Whether the source's temperature is taken from this channel.")] bool IsReference,
    [property: Description("Whether the channel is a surface that somebody can touch.")] bool IsTouchable,
    [property: Description("Whether silence of this channel is itself a hazard.")] bool IsHazardChannel,
    [property: Description("Working band of a comparator channel.")] string? Band,
    [property: Description("Temperature above which this surface raises an alert, degree Celsius; null where it is not watched for heat.")] double? HotLimitCelsius);
