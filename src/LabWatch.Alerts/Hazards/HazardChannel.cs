using LabWatch.Lab.Identity;
using LabWatch.Lab.Sources;

namespace LabWatch.Alerts.Hazards;

/// <summary>One channel that hazards are judged by, with what it is judged by at present and what is remembered of it.</summary>
internal sealed class HazardChannel(
    ReferenceSource source, Channel channel, SurfaceLimit? limit, long silence, HazardChannelState state, bool isSilenceWatched = true, HazardJunction? junction = null)
{
    public ReferenceSource Source { get; } = source;

    public Channel Channel { get; } = channel;

    public ChannelKey Key => Channel.Key;

    /// <summary>The limit of a touchable surface; null where the channel is no surface.</summary>
    public SurfaceLimit? Limit { get; } = limit;

    /// <summary>Length of a silence that is called one, monotonic ticks.</summary>
    public long Silence { get; } = silence;

    /// <summary>Whether silence of the channel is a hazard.</summary>
    public bool IsSilenceWatched { get; } = isSilenceWatched;

    public HazardChannelState State { get; } = state;

    /// <summary>Its reference junctions, where it is a thermocouple whose description says where their temperature comes from; else null.</summary>
    public HazardJunction? Junction { get; } = junction;

    /// <summary>The checks that judge this channel alone.</summary>
    public HazardCheck[] OwnChecks { get; set; } = [];

    /// <summary>The checks that judge it together with others.</summary>
    public HazardCheck[] JointChecks { get; set; } = [];

    /// <summary>How raw becomes temperature now; replaced when another certificate comes into force.</summary>
    public SurfaceThermometer Thermometer { get; set; }

    /// <summary>Whether it measures a temperature that a certificate can apply to.</summary>
    public bool IsThermometer => Channel.Quantity is
        ChannelQuantity.WellThermometer or ChannelQuantity.OuterSurface or ChannelQuantity.ApertureLip or ChannelQuantity.AmbientTemperature;

    /// <summary>The unit of <see cref="ToNatural"/>.</summary>
    public string NaturalUnit => IsThermometer
        ? "Cel"
        : Channel.Quantity switch
        {
            ChannelQuantity.PurgeFlow or ChannelQuantity.CoolingFlow => "l/min",
            ChannelQuantity.RoomOxygen or ChannelQuantity.BathLevel => "%",
            ChannelQuantity.HeaterPower => "W",
            _ => Channel.Unit,
        };

    /// <summary>Whether silence of a channel is a hazard: as the lab file says, and always for surfaces, cut-outs and the room's oxygen.</summary>
    public static bool IsWatched(Channel channel) =>
        channel.IsHazardChannel || channel.IsTouchable || channel.Quantity is ChannelQuantity.OverTemperatureCutout or ChannelQuantity.RoomOxygen;

    /// <summary>Whether hazards are judged by a channel.</summary>
    public static bool IsJudged(Channel channel) => IsWatched(channel) || channel.Quantity is
        ChannelQuantity.WellThermometer or ChannelQuantity.SetPoint or ChannelQuantity.HeaterPower or ChannelQuantity.PurgeFlow or ChannelQuantity.ApertureLip
        or ChannelQuantity.AmbientTemperature or ChannelQuantity.RelativeHumidity or ChannelQuantity.DewPoint or ChannelQuantity.CoolingFlow
        or ChannelQuantity.BathLevel or ChannelQuantity.StirrerSpeed;

    /// <summary>Whether a raw value is one that the sensor can give.</summary>
    public bool IsPossible(double raw) =>
        double.IsFinite(raw) && !(raw < Channel.SensorMinimum) && !(raw > Channel.SensorMaximum);

    /// <summary>Whether the channel was heard of late.</summary>
    public bool IsHeardBy(long now) => now - State.LastValid < Silence;

    /// <summary>A raw value in the unit that the checks use: degree Celsius by the certificate in force, litre per minute, percent, watt.</summary>
    public double ToNatural(double raw) => IsThermometer
        ? Thermometer.Celsius(raw)
        : Channel.Unit switch
        {
            "l/s" => raw * 60,
            "kW" => raw * 1000,
            "/" when Channel.Quantity is ChannelQuantity.RoomOxygen or ChannelQuantity.BathLevel => raw * 100,
            _ => raw,
        };
}
