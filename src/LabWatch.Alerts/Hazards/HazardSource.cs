using System.Collections.Frozen;

namespace LabWatch.Alerts.Hazards;

/// <summary>The hazard channels of one source. The gate outlives a change of the lab file.</summary>
internal sealed class HazardSource(Lock gate, IReadOnlyList<HazardChannel> channels, HazardAttention attention)
{
    public Lock Gate { get; } = gate;

    public IReadOnlyList<HazardChannel> Channels { get; } = channels;

    /// <summary>When somebody last looked after the source.</summary>
    public HazardAttention Attention { get; } = attention;

    /// <summary>Everything that is judged besides surfaces and silence.</summary>
    public HazardCheck[] Checks { get; set; } = [];

    /// <summary>Of those, the ones judged when time passes, too.</summary>
    public HazardCheck[] TickChecks { get; set; } = [];

    public FrozenDictionary<string, HazardChannel> ById { get; } = channels.ToFrozenDictionary(channel => channel.Channel.Id, StringComparer.Ordinal);

    /// <summary>Reference junctions that a channel measures, by the id of that channel; empty for a source without such thermocouples on its surfaces.</summary>
    public FrozenDictionary<string, HazardJunction[]> Junctions { get; } = channels
        .Select(channel => channel.Junction)
        .OfType<HazardJunction>()
        .Where(junction => junction.Measured is not null)
        .GroupBy(junction => junction.Measured!.Id, StringComparer.Ordinal)
        .ToFrozenDictionary(group => group.Key, group => group.ToArray(), StringComparer.Ordinal);
}
