using System.Globalization;
using LabWatch.Readings.Retention;

namespace LabWatch.Service.Commands;

/// <summary>What a run of retention found, by source, month and channels, for people.</summary>
internal sealed class RetentionList
{
    private readonly SortedDictionary<(string Source, string Month, string Channels), (long Parts, long Readings)> _rows = [];

    /// <summary>Adds one part.</summary>
    public void Add(RemovablePart part)
    {
        (string, string, string) key = (part.Source.ToString(), part.Hour.ToString()[..7], string.Join(' ', part.Channels));
        (long parts, long readings) = _rows.GetValueOrDefault(key);
        _rows[key] = (parts + 1, readings + part.Readings);
    }

    /// <summary>Writes the list.</summary>
    public void Write(TextWriter output, bool isApplied)
    {
        foreach (((string source, string month, string channels), (long parts, long readings)) in _rows)
        {
            output.WriteLine(string.Create(CultureInfo.InvariantCulture, $"{source}  {month}  {parts,5} hours  {readings,12:N0} readings  {channels}"));
        }

        long all = _rows.Values.Sum(row => row.Readings);
        output.WriteLine(_rows.Count == 0 ? "No raw readings are older than they must be kept."
            : isApplied ? string.Create(CultureInfo.InvariantCulture, $"Removed {all:N0} raw readings. Summaries by minute and hour stay; the trail has the digests of what was removed.")
            : string.Create(CultureInfo.InvariantCulture, $"{all:N0} raw readings are older than they must be kept. Nothing was changed; --apply removes them, after a backup."));
    }
}
