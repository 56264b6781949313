using LabWatch.Lab.Identity;
using LabWatch.Lab.Sources;

namespace LabWatch.Alerts.Hazards;

/// <summary>One hazard channel with what it is judged by at present and what is remembered of it.</summary>
internal sealed class HazardChannel(
    ReferenceSource source, Channel channel, SurfaceLimit? limit, long silence, HazardChannelState state, HazardJunction? junction = null)
{
    public ReferenceSource Source { get; } = source;

    public Channel Channel { get; } = channel;

    public ChannelKey Key => Channel.Key;

    /// <summary>The limit of a touchable surface; null where the channel is no surface and only its silence is watched.</summary>
    public SurfaceLimit? Limit { get; } = limit;

    /// <summary>Length of a silence that is called one, monotonic ticks.</summary>
    public long Silence { get; } = silence;

    public HazardChannelState State { get; } = state;

    /// <summary>Its reference junctions, where it is a thermocouple whose description says where their temperature comes from; else null.</summary>
    public HazardJunction? Junction { get; } = junction;

    /// <summary>How raw becomes temperature now; replaced when another certificate comes into force.</summary>
    public SurfaceThermometer Thermometer { get; set; }

    /// <summary>Whether silence of a channel is a hazard.</summary>
    public static bool IsWatched(Channel channel) => channel.IsHazardChannel || channel.IsTouchable;

    /// <summary>Whether a raw value is one that the sensor can give.</summary>
    public bool IsPossible(double raw) =>
        double.IsFinite(raw) && !(raw < Channel.SensorMinimum) && !(raw > Channel.SensorMaximum);
}
