using System.Collections.Frozen;
using LabWatch.Alerts.LifeCycle;
using LabWatch.Lab;
using LabWatch.Lab.Findings;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Instruments;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;

namespace LabWatch.Alerts.Hazards;

/// <summary>What is watched under one snapshot of the site. Never changes in place, except for the certificates in force.</summary>
internal sealed class HazardMap
{
    private HazardMap(LabSnapshot snapshot, FrozenDictionary<SourceKey, HazardSource> sources)
    {
        Snapshot = snapshot;
        Sources = sources;
    }

    /// <summary>Nothing watched: before the first snapshot.</summary>
    public static HazardMap Empty { get; } =
        new(new LabSnapshot(new LabSite("none", "none", "UTC"), [], [], [], [], [], []), FrozenDictionary<SourceKey, HazardSource>.Empty);

    public LabSnapshot Snapshot { get; }

    public FrozenDictionary<SourceKey, HazardSource> Sources { get; }

    /// <summary>Builds the map of a snapshot; state of channels and gates of sources are taken over from the map before.</summary>
    /// <param name="snapshot">The snapshot.</param>
    /// <param name="before">The map before.</param>
    /// <param name="silence">Length of a channel's silence in monotonic ticks.</param>
    /// <param name="newState">Makes the state of a channel that was not watched before.</param>
    /// <param name="clock">The clock of all delays.</param>
    /// <param name="offDelay">How long the absence of a condition must be seen before it returns.</param>
    public static HazardMap Build(
        LabSnapshot snapshot, HazardMap before, Func<Channel, long> silence, Func<Channel, HazardChannelState> newState, TimeProvider clock, TimeSpan offDelay) => new(
        snapshot, snapshot.Sources.ToFrozenDictionary(source => source.Key, source => Build(source, before, silence, newState, clock, offDelay)));

    private static HazardSource Build(
        ReferenceSource source, HazardMap map, Func<Channel, long> silence, Func<Channel, HazardChannelState> newState, TimeProvider clock, TimeSpan offDelay)
    {
        HazardSource? before = map.Sources.GetValueOrDefault(source.Key);
        HazardSource built = new(
            before?.Gate ?? new Lock(),
            [
                .. source.Channels.Where(HazardChannel.IsJudged).Select(channel => new HazardChannel(
                    source,
                    channel,
                    channel.IsTouchable ? SurfaceLimit.For(channel.Contact) : null,
                    silence(channel),
                    map.Find(channel.Key)?.State ?? newState(channel),
                    HazardChannel.IsWatched(channel),
                    channel.ReferenceJunction is { } junction
                        ? new HazardJunction(junction, junction.Channel is { } id ? source.FindChannel(id) : null, clock)
                        : null)),
            ],
            before?.Attention ?? new HazardAttention());
        HazardChecks.Put(source, built, before, clock, offDelay);
        return built;
    }

    /// <summary>The watched channel of a key; null where it is not watched.</summary>
    public HazardChannel? Find(ChannelKey key) => Sources.GetValueOrDefault(key.Source)?.ById.GetValueOrDefault(key.Channel);

    /// <summary>The check of a key; null where there is none.</summary>
    public HazardCheck? Find(AlertKey key) => Sources.GetValueOrDefault(key.Source)?.Checks.FirstOrDefault(check => check.Key == key);

    /// <summary>Looks up the certificates in force at an instant.</summary>
    public void RefreshThermometers(Instant at)
    {
        foreach (HazardSource source in Sources.Values)
        {
            foreach (HazardChannel channel in source.Channels)
            {
                SurfaceThermometer thermometer = SurfaceThermometer.For(channel.Channel, Snapshot.CertificateInForce(channel.Key, at), channel.Junction);
                Certificate? ofJunction = channel.Junction?.Measured is { } measured ? Snapshot.CertificateInForce(measured.Key, at) : null;
                lock (source.Gate)
                {
                    channel.Thermometer = thermometer;
                    if (channel.Junction is { } junction)
                    {
                        junction.Certificate = ofJunction;
                    }
                }
            }
        }
    }

    /// <summary>What cannot be watched as somebody may expect.</summary>
    public IReadOnlyList<Finding> Findings() =>
    [
        .. Sources.Values.SelectMany(source => source.Channels)
            .Where(channel => channel.Limit is not null && !channel.Thermometer.Usable)
            .Select(channel => new Finding(
                "surface-not-evaluable", channel.Key.ToString(),
                "A raw reading in this unit means no temperature without a certificate in force, so this surface is watched for silence only.",
                channel.Channel.Unit, "Install an instrument with a certificate for this unit, or read the channel in Cel.")),
        .. Snapshot.Sources.Where(source => !source.Channels.Any(channel => channel.IsTouchable)).Select(source => new Finding(
            "no-surface-channel", source.Key.ToString(), "No touchable surface of this source has a sensor, so a hot surface of it cannot be noticed.",
            null, "Add a channel for the outer surface, or a contact to the one of the aperture lip.")),
    ];
}
