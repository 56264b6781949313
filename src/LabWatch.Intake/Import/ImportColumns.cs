using LabWatch.Lab;
using LabWatch.Lab.Findings;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Sources;

namespace LabWatch.Intake.Import;

/// <summary>Where the values of a row stand, found from its header.</summary>
internal sealed class ImportColumns
{
    private ImportColumns()
    {
    }

    public int Time { get; private init; }

    /// <summary>Wide form: column and what it leads to.</summary>
    public IReadOnlyList<(int Column, ImportTarget Target)> Wide { get; private init; } = [];

    /// <summary>Long form: the columns of channel, value, unit (-1 for none); null for the wide form.</summary>
    public (int Channel, int Value, int Unit)? Long { get; private init; }

    /// <summary>Number of columns of the header, which every row must have.</summary>
    public int Count { get; private init; }

    /// <summary>Finds the columns; findings where the header does not have what the order names.</summary>
    public static (ImportColumns? Columns, IReadOnlyList<Finding> Findings) Find(IReadOnlyList<string> header, ImportOrder order, LabSnapshot lab)
    {
        List<Finding> findings = [];
        int Column(string name, string option)
        {
            int at = IndexOf(header, name);
            if (at < 0)
            {
                findings.Add(new Finding("unknown-column", option, "The header has no such column, or two.", Finding.Quote(name), $"The columns are: {string.Join(", ", header.Take(50))}."));
            }

            return at;
        }

        int time = Column(order.TimeColumn, "--time-column");
        if (order.ChannelColumn is { } channel)
        {
            (int, int, int) columns = (Column(channel, "--channel-column"), Column(order.ValueColumn, "--value-column"), order.UnitColumn is { } unit ? Column(unit, "--unit-column") : -1);
            return (findings.Count > 0 ? null : new ImportColumns { Time = time, Long = columns, Count = header.Count }, findings);
        }

        List<(int, ImportTarget)> wide = [];
        foreach (string mapping in order.Columns)
        {
            int equals = mapping.LastIndexOf('=');
            if (equals < 1 || Resolve(mapping[(equals + 1)..], order.Source, lab) is not { } target)
            {
                findings.Add(new Finding("unknown-channel", "--column", "This is no COLUMN=CHANNEL or COLUMN=SOURCE/CHANNEL of the lab file.", Finding.Quote(mapping), "Write for example T1=fir/well-1:Cel, or T1=well-1 with --source."));
                continue;
            }

            wide.Add((Column(mapping[..equals], "--column"), target));
        }

        if (order.Columns.Count == 0)
        {
            wide.AddRange(header.Select((name, index) => (index, target: Resolve(name, order.Source, lab))).Where(found => found.index != time && found.target is not null).Select(found => (found.index, found.target!)));
            if (wide.Count == 0 && findings.Count == 0)
            {
                findings.Add(new Finding("no-columns", "--column", "No column of the header is the name of a channel.", null, "Say where the columns lead: --column T1=fir/well-1, once for each."));
            }
        }

        return (findings.Count > 0 ? null : new ImportColumns { Time = time, Wide = wide, Count = header.Count }, findings);
    }

    /// <summary>The channel of a text <c>[SOURCE/]CHANNEL[:UNIT]</c>; null where the lab file has none. A unit is one only after the last colon.</summary>
    public static ImportTarget? Resolve(string text, string? source, LabSnapshot lab)
    {
        int slash = text.IndexOf('/', StringComparison.Ordinal);
        int colon = text.IndexOf(':', Math.Max(slash, 0));
        string? unit = colon < 0 ? null : text[(colon + 1)..];
        string name = colon < 0 ? text : text[..colon];
        slash = name.IndexOf('/', StringComparison.Ordinal);
        string? owner = slash < 0 ? source : name[..slash];
        string channel = slash < 0 ? name : name[(slash + 1)..];
        if (owner is null || FindSource(owner, lab) is not { } found || found.Channels.All(candidate => candidate.Id != channel))
        {
            return null;
        }

        return new ImportTarget(found.Key, channel, unit is { Length: 0 } ? null : unit);
    }

    private static ReferenceSource? FindSource(string text, LabSnapshot lab) =>
        SourceKey.TryParse(text, out SourceKey key) ? lab.FindSource(key) : lab.FindSource(new SourceKey(lab.Site.Id, text));

    private static int IndexOf(IReadOnlyList<string> header, string name)
    {
        int[] places = [.. Enumerable.Range(0, header.Count).Where(index => string.Equals(header[index].Trim(), name, StringComparison.Ordinal))];
        return places.Length == 1 ? places[0] : -1;
    }
}
