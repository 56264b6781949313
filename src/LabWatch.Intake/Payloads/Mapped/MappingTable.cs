using LabWatch.Intake.Options;
using LabWatch.Intake.Units;
using LabWatch.Lab;
using LabWatch.Lab.Findings;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Sources;

namespace LabWatch.Intake.Payloads.Mapped;

/// <summary>All mappings; of several that fit a topic the first counts.</summary>
internal sealed class MappingTable(IReadOnlyList<MappingOptions> options)
{
    private readonly PayloadMapping[] _mappings = [.. options.Select(mapping => new PayloadMapping(mapping))];

    /// <summary>What to subscribe to.</summary>
    public IReadOnlyList<string> Filters => [.. _mappings.Select(mapping => mapping.Pattern.Filter).Distinct(StringComparer.Ordinal)];

    /// <summary>The mapping of a topic and the source that it leads to; null where none fits.</summary>
    public (PayloadMapping Mapping, SourceKey Source)? Find(string topic, string site)
    {
        foreach (PayloadMapping mapping in _mappings)
        {
            if (mapping.Pattern.Matches(topic, out string? id))
            {
                return (mapping, id is not null ? new SourceKey(site, id) : SourceKey.TryParse(mapping.Options.Source, out SourceKey key) ? key : default);
            }
        }

        return null;
    }

    /// <summary>What does not fit the lab file: sources and channels that it does not have, units that cannot become the channel's.</summary>
    public static IEnumerable<Finding> Check(IReadOnlyList<MappingOptions> options, LabSnapshot lab)
    {
        for (int i = 0; i < options.Count; i++)
        {
            string where = FormattableString.Invariant($"Intake:Mappings:{i}");
            if (!SourceKey.TryParse(options[i].Source, out SourceKey key))
            {
                continue;
            }

            if (lab.FindSource(key) is not { } source)
            {
                yield return new Finding(IntakeCode.UnknownSource, where + ":Source", "The lab file has no source of this name.", Finding.Quote(options[i].Source), "Mend the mapping or add the source to the lab file.");
                continue;
            }

            foreach (Finding finding in options[i].Values.SelectMany((value, index) => Check(value, source, FormattableString.Invariant($"{where}:Values:{index}"))))
            {
                yield return finding;
            }
        }
    }

    private static IEnumerable<Finding> Check(MappedValueOptions value, ReferenceSource source, string where)
    {
        Channel? channel = source.Channels.FirstOrDefault(candidate => candidate.Id == value.Channel);
        if (channel is null)
        {
            yield return new Finding(IntakeCode.UnknownChannel, where + ":Channel", "The source has no channel of this name.", Finding.Quote(value.Channel), "Mend the mapping or add the channel to the lab file.");
        }
        else if (value.Unit is { } unit && unit != channel.Unit && UnitTable.Find(unit, channel.Unit) is null)
        {
            yield return new Finding(IntakeCode.UnitMismatch, where + ":Unit", $"The channel {channel.Id} is in {channel.Unit}, which this unit cannot become.", Finding.Quote(unit), "Mend the unit here or in the lab file.");
        }
    }
}
