using LabWatch.Lab.Identity;

namespace LabWatch.Readings.Head;

/// <summary>Takes what is in memory of a source, all at the same commit, without copying readings.</summary>
internal static class HeadCapture
{
    /// <param name="head">The head.</param>
    /// <param name="key">The source.</param>
    /// <param name="wanted">Channels; null for all; empty for none (counts only).</param>
    /// <param name="from">First hour.</param>
    /// <param name="to">First hour after.</param>
    /// <param name="source">The source in the head; null where it is not known.</param>
    public static List<HeadSlice> Take(HeadState head, SourceKey key, IReadOnlyCollection<string>? wanted, long from, long to, out HeadSource? source)
    {
        List<HeadSlice> slices = [];
        lock (head.Sync)
        {
            source = head.Find(key);
            if (source is null)
            {
                return slices;
            }

            foreach (HeadHour hour in source.Hours.Values)
            {
                if (hour.Hour >= from && hour.Hour < to)
                {
                    Take(source, hour, hour.Frozen, wanted, slices);
                    Take(source, hour, hour.Open, wanted, slices);
                }
            }
        }

        return slices;
    }

    private static void Take(HeadSource source, HeadHour hour, HeadPart? part, IReadOnlyCollection<string>? wanted, List<HeadSlice> slices)
    {
        if (part is not { Readings: > 0 })
        {
            return;
        }

        List<(string, ColumnSnapshot)> columns = [];
        for (int channel = 0; channel < part.Columns.Length; channel++)
        {
            if (part.Columns[channel] is { Published: > 0 } column && wanted?.Contains(source.Channels[channel].Name) != false)
            {
                columns.Add((source.Channels[channel].Name, column.Snapshot()));
            }
        }

        slices.Add(new HeadSlice(hour.Hour, part.Part, part.Readings, columns));
    }
}
