using LabWatch.Lab.Findings;
using LabWatch.Simulator.Sources;

namespace LabWatch.Simulator.Faults;

/// <summary>Whether an order for a fault makes sense.</summary>
internal static class FaultChecks
{
    private static readonly TimeSpan Longest = TimeSpan.FromDays(366);

    /// <summary>All that is wrong with an order; empty where nothing is.</summary>
    public static IReadOnlyList<Finding> Check(FaultOrder order, IReadOnlyList<SourceDesign> designs)
    {
        List<Finding> findings = [];
        SourceDesign? design = designs.FirstOrDefault(candidate => string.Equals(candidate.Id, order.Source, StringComparison.Ordinal));
        FaultTraits? traits = FaultCatalogue.All.FirstOrDefault(candidate => candidate.Kind == order.Kind);
        if (design is null)
        {
            findings.Add(new Finding("unknown-source", "source", "The simulation has no such source.", Finding.Quote(order.Source), $"Use one of: {string.Join(", ", designs.Select(candidate => candidate.Id))}."));
        }

        if (traits is null)
        {
            findings.Add(new Finding("unknown-choice", "kind", "There is no such kind of fault.", FormattableString.Invariant($"{(int)order.Kind}"), $"Use one of: {string.Join(", ", FaultCatalogue.All.Select(candidate => candidate.Name))}."));
        }
        else
        {
            CheckSize(findings, order, traits);
            if (design is not null)
            {
                CheckChannel(findings, order, traits, design);
                CheckPlant(findings, order, design);
            }
        }

        CheckTime(findings, "onset", order.Onset, TimeSpan.Zero);
        CheckTime(findings, "duration", order.Duration ?? TimeSpan.FromSeconds(1), TimeSpan.FromSeconds(1));
        return findings;
    }

    private static void CheckSize(List<Finding> findings, FaultOrder order, FaultTraits traits)
    {
        double size = order.Size ?? traits.Default;
        if (!(size >= traits.Minimum && size <= traits.Maximum))
        {
            string range = FormattableString.Invariant($"{traits.Minimum} to {traits.Maximum} {traits.Unit}");
            findings.Add(new Finding("out-of-range", "size", "The size is outside what this fault can have.", FormattableString.Invariant($"{size}"), $"Give {range}."));
        }
    }

    private static void CheckChannel(List<Finding> findings, FaultOrder order, FaultTraits traits, SourceDesign design)
    {
        ChannelRole? wanted = order.Kind switch
        {
            FaultKind.ThermometerDrift or FaultKind.ThermometerStuck => ChannelRole.Well,
            FaultKind.ComparatorDrift => ChannelRole.Comparator,
            _ => null,
        };
        string cure = "Use one of: " + string.Join(", ", design.Channels.Where(channel => wanted is null || channel.Role == wanted).Select(channel => channel.Id)) + ".";
        ChannelDesign? channel = design.Find(order.Channel);
        if (!traits.NeedsChannel && order.Channel is not null)
        {
            findings.Add(new Finding("not-applicable", "channel", "This fault concerns the whole source.", Finding.Quote(order.Channel), "Leave the channel out."));
        }
        else if (traits.NeedsChannel && (channel is null || (wanted is not null && channel.Role != wanted)))
        {
            findings.Add(new Finding("unknown-channel", "channel", "The source has no such channel for this fault.", Finding.Quote(order.Channel), cure));
        }
    }

    private static void CheckPlant(List<Finding> findings, FaultOrder order, SourceDesign design)
    {
        bool missing = order.Kind switch
        {
            FaultKind.PurgeLoss => design.Heat.PurgeFlow <= 0,
            FaultKind.OpenShutter => !design.HasShutter,
            FaultKind.Frost => design.Heat.CoolantCelsius >= 0 || design.Heat.ChillerConductance <= 0,
            _ => false,
        };
        if (missing)
        {
            findings.Add(new Finding("not-applicable", "kind", "This source is not built so that it could have this fault.", FaultCatalogue.Of(order.Kind).Name, "Choose another source."));
        }
    }

    private static void CheckTime(List<Finding> findings, string where, TimeSpan value, TimeSpan least)
    {
        if (value < least || value > Longest)
        {
            findings.Add(new Finding("out-of-range", where, "The time is too short or too long.", value.ToString("c", System.Globalization.CultureInfo.InvariantCulture), "Give a time up to 366 days."));
        }
    }
}
