using System.Collections.Frozen;

namespace LabWatch.Alerts.Hazards;

/// <summary>The hazard channels of one source. The gate outlives a change of the lab file.</summary>
internal sealed class HazardSource(Lock gate, IReadOnlyList<HazardChannel> channels)
{
    public Lock Gate { get; } = gate;

    public IReadOnlyList<HazardChannel> Channels { get; } = channels;

    public FrozenDictionary<string, HazardChannel> ById { get; } = channels.ToFrozenDictionary(channel => channel.Channel.Id, StringComparer.Ordinal);
}
