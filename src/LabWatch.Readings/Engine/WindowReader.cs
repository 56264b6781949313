using System.Data.Common;
using LabWatch.Lab.Assessments;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Time;
using LabWatch.Readings.Blocks;
using LabWatch.Readings.Head;

namespace LabWatch.Readings.Engine;

/// <summary>
/// Reads raw windows. The head is captured first, then the database is asked: a part that was sealed in between appears in both and is
/// taken from the database, so nothing is missed and nothing doubled, and no lock spans the read.
/// </summary>
internal sealed class WindowReader(StoreDialect dialect, HeadState head, ReaderPool readers, StoreIncidents incidents)
{
    public ReadingWindow Read(SourceKey key, IReadOnlyCollection<string>? channels, TimeWindow window, CancellationToken cancellationToken)
    {
        if (window.End <= window.Start)
        {
            return new ReadingWindow(key, window, [], []);
        }

        HashSet<string>? wanted = channels?.ToHashSet(StringComparer.Ordinal);
        (long from, long to) = HoursOf(window);
        List<HeadSlice> slices = HeadCapture.Take(head, key, wanted, from, to, out HeadSource? source);
        SeriesBuilder builder = new(window);
        SortedDictionary<long, long> revisions = [];
        if (source is not null)
        {
            HashSet<(long, int)> found = readers.Use(connection =>
                ReadSealed(connection, source.Id, from, to, wanted, builder, revisions, cancellationToken));
            foreach (HeadSlice slice in slices.Where(slice => !found.Contains((slice.Hour, slice.Part))))
            {
                revisions[slice.Hour] = revisions.GetValueOrDefault(slice.Hour) + slice.Readings;
                foreach ((string channel, ColumnSnapshot column) in slice.Columns)
                {
                    builder.Add(column.ToSeries(channel));
                }
            }
        }

        return new ReadingWindow(key, window, builder.Build(), [.. revisions.Select(one => new SourceHourRead(new Instant(one.Key), one.Value))]);
    }

    /// <summary>The hours that a window touches, as starts: first, and first after.</summary>
    public static (long From, long To) HoursOf(TimeWindow window) =>
        (window.Start.StartOfHour().Microseconds, new Instant(window.End.Microseconds - 1).StartOfHour().Microseconds + Instant.MicrosecondsPerHour);

    private HashSet<(long, int)> ReadSealed(
        StoreConnection connection, int source, long from, long to, HashSet<string>? wanted, SeriesBuilder builder,
        SortedDictionary<long, long> revisions, CancellationToken cancellationToken)
    {
        HashSet<(long, int)> found = [];
        using DbDataReader reader = connection.Query(StoreDialect.BlocksInWindow, source, from, to);
        while (reader.Read())
        {
            cancellationToken.ThrowIfCancellationRequested();
            long id = reader.GetInt64(0);
            long hour = reader.GetInt64(1);
            found.Add((hour, reader.GetInt32(2)));
            if (!incidents.IsBlockSetAside(id) && TryUnfold(reader, id, wanted, builder))
            {
                revisions[hour] = revisions.GetValueOrDefault(hour) + reader.GetInt32(3);
            }
        }

        return found;
    }

    private bool TryUnfold(DbDataReader reader, long id, HashSet<string>? wanted, SeriesBuilder builder)
    {
        try
        {
            byte[] data = reader.GetFieldValue<byte[]>(4);
            if (data.Length == 0)
            {
                // Removed by retention: the hour keeps its revision, its readings are gone.
                return true;
            }

            SealedBlock block = SealedBlock.Open(data);
            List<ReadingSeries> pieces = [];
            for (int channel = 0; channel < block.Channels.Count; channel++)
            {
                if (wanted?.Contains(block.Channels[channel].Name) != false)
                {
                    pieces.Add(block.Decode(channel));
                }
            }

            pieces.ForEach(builder.Add);
            return true;
        }
        catch (DamagedDataException damage)
        {
            incidents.ReportBlock(id, damage);
        }
        catch (DbException error) when (dialect.SaysDamaged(error))
        {
            incidents.ReportBlock(id, error);
        }

        return false;
    }
}
