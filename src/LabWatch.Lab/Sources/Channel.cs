using LabWatch.Lab.Identity;

namespace LabWatch.Lab.Sources;

/// <summary>One stream of readings of a source.</summary>
/// <param name="Key">What names the channel.</param>
/// <param name="Name">Name for people.</param>
/// <param name="Quantity">What it measures.</param>
/// <param name="Unit">Unit of the raw value, by its SenML name (RFC 8428 section 12.1 and RFC 8798), for example Ohm, mV, Cel, W, l/min, %RH, /.</param>
/// <param name="Interval">Time between readings that the device promises; silence is judged by it.</param>
public sealed record Channel(ChannelKey Key, string Name, ChannelQuantity Quantity, string Unit, TimeSpan Interval)
{
    /// <summary>Id of the channel in its source.</summary>
    public string Id => Key.Channel;

    /// <summary>Distance of the sensing element from the aperture plane, millimetres; null where it has no place on the axis.</summary>
    public double? AxialPositionMillimetre { get; init; }

    /// <summary>Lowest raw value that the sensor can give, in <see cref="Unit"/>; null where not stated.</summary>
    public double? SensorMinimum { get; init; }

    /// <summary>Highest raw value that the sensor can give, in <see cref="Unit"/>; null where not stated.</summary>
    public double? SensorMaximum { get; init; }

    /// <summary>Working band of a comparator channel; null for the others.</summary>
    public string? Band { get; init; }

    /// <summary>Where the reference junctions of a thermocouple read in millivolt have their temperature from; null to take the certificate's word.</summary>
    public ReferenceJunction? ReferenceJunction { get; init; }

    /// <summary>How a touchable surface can hurt; null where the channel is no touchable surface.</summary>
    public SurfaceContact? Contact { get; init; }

    /// <summary>
    /// Whether the channel is a surface that somebody can touch: every outer surface, and an aperture lip where a <see cref="Contact"/> is
    /// stated (a lip is hot in use and commonly out of reach behind the aperture plate).
    /// </summary>
    public bool IsTouchable => Contact is not null || Quantity == ChannelQuantity.OuterSurface;

    /// <summary>Whether silence of this channel is itself a hazard. True for every channel with a <see cref="Contact"/>.</summary>
    public bool IsHazardChannel { get; init; }

    /// <summary>Whether this well thermometer is the one that the source's temperature is taken from.</summary>
    public bool IsReference { get; init; }
}
