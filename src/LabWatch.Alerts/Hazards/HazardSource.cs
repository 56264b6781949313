using System.Collections.Frozen;

namespace LabWatch.Alerts.Hazards;

/// <summary>The hazard channels of one source. The gate outlives a change of the lab file.</summary>
internal sealed class HazardSource(Lock gate, IReadOnlyList<HazardChannel> channels)
{
    public Lock Gate { get; } = gate;

    public IReadOnlyList<HazardChannel> Channels { get; } = channels;

    public FrozenDictionary<string, HazardChannel> ById { get; } = channels.ToFrozenDictionary(channel => channel.Channel.Id, StringComparer.Ordinal);

    /// <summary>Reference junctions that a channel measures, by the id of that channel; empty for a source without such thermocouples on its surfaces.</summary>
    public FrozenDictionary<string, HazardJunction[]> Junctions { get; } = channels
        .Select(channel => channel.Junction)
        .OfType<HazardJunction>()
        .Where(junction => junction.Measured is not null)
        .GroupBy(junction => junction.Measured!.Id, StringComparer.Ordinal)
        .ToFrozenDictionary(group => group.Key, group => group.ToArray(), StringComparer.Ordinal);
}
