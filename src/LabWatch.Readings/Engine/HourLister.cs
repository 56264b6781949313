using System.Data.Common;
using LabWatch.Lab.Assessments;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Time;
using LabWatch.Readings.Head;

namespace LabWatch.Readings.Engine;

/// <summary>Lists hours with their revisions, what changed since a commit, and what was sealed since a seal.</summary>
internal sealed class HourLister(HeadState head, ReaderPool readers, StoreIncidents incidents)
{
    public IReadOnlyList<SourceHourRead> Hours(SourceKey key, TimeWindow window)
    {
        if (window.End <= window.Start)
        {
            return [];
        }

        (long from, long to) = WindowReader.HoursOf(window);
        List<HeadSlice> slices = HeadCapture.Take(head, key, [], from, to, out HeadSource? source);
        if (source is null)
        {
            return [];
        }

        SortedDictionary<long, long> revisions = [];
        HashSet<(long, int)> found = [];
        readers.Use(connection =>
        {
            using DbDataReader reader = connection.Query(StoreDialect.HoursInWindow, source.Id, from, to);
            while (reader.Read())
            {
                long hour = reader.GetInt64(1);
                found.Add((hour, reader.GetInt32(2)));
                int readings = incidents.IsBlockSetAside(reader.GetInt64(0)) ? 0 : reader.GetInt32(3);
                revisions[hour] = revisions.GetValueOrDefault(hour) + readings;
            }

            return 0;
        });
        foreach (HeadSlice slice in slices.Where(slice => !found.Contains((slice.Hour, slice.Part))))
        {
            revisions[slice.Hour] = revisions.GetValueOrDefault(slice.Hour) + slice.Readings;
        }

        return [.. revisions.Where(one => one.Value > 0).Select(one => new SourceHourRead(new Instant(one.Key), one.Value))];
    }

    public ChangedHours Changes(long after)
    {
        HashSet<(SourceKey, Instant)> hours = [];
        long change;
        lock (head.Sync)
        {
            change = head.Change;
            foreach (HeadSource source in head.Sources)
            {
                foreach (HeadHour hour in source.Hours.Values)
                {
                    if (Math.Max(LastChange(hour.Open), LastChange(hour.Frozen)) > after)
                    {
                        hours.Add((source.Key, new Instant(hour.Hour)));
                    }
                }
            }
        }

        readers.Use(connection =>
        {
            using DbDataReader reader = connection.Query(StoreDialect.ChangedHours, after);
            while (reader.Read())
            {
                hours.Add((KeyOf(reader.GetInt64(0)), new Instant(reader.GetInt64(1))));
            }

            return 0;
        });
        return new ChangedHours(change, [.. hours.OrderBy(one => one.Item2)]);
    }

    public IReadOnlyList<SealedHour> Sealed(long after, int count)
    {
        ArgumentOutOfRangeException.ThrowIfNegativeOrZero(count);
        return readers.Use(connection =>
        {
            List<SealedHour> hours = [];
            using DbDataReader reader = connection.Query(StoreDialect.SealsAfter, after, count);
            while (reader.Read())
            {
                hours.Add(new SealedHour(
                    reader.GetInt64(0), KeyOf(reader.GetInt64(1)), new Instant(reader.GetInt64(2)), reader.GetInt32(3), reader.GetInt32(4),
                    reader.GetFieldValue<byte[]>(5), new Instant(reader.GetInt64(6)), reader.GetInt64(7)));
            }

            return hours;
        });
    }

    private static long LastChange(HeadPart? part) => part is { Readings: > 0 } ? part.LastChange : 0;

    private SourceKey KeyOf(long source)
    {
        lock (head.Sync)
        {
            return head.Find(source)?.Key ?? throw new Blocks.DamagedDataException("A block belongs to no source.");
        }
    }
}
