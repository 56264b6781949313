using System.Data.Common;
using LabWatch.Lab.Time;
using LabWatch.Readings.Head;
using LabWatch.Readings.Summaries;

namespace LabWatch.Readings.Engine;

/// <summary>Reads the rows of whole hours, and says which hours of a stretch they do not tell of.</summary>
internal sealed class HourlyReader(ReaderPool readers)
{
    /// <summary>
    /// The rows from one hour to another, and the hours that must be read in another way: those with readings in memory, and those with
    /// parts that were sealed since the rows were made. The number up to which they were made is read first, so that what comes in between
    /// is in both at most.
    /// </summary>
    /// <returns>Rows by start; null where the rows of a day are damaged.</returns>
    public SortedDictionary<long, ReadingSummary>? Read(HeadSource source, string channel, long from, long to, HashSet<long> open)
    {
        if (source.Find(channel) is not { } known)
        {
            return [];
        }

        SortedDictionary<long, ReadingSummary> rows = [];
        return readers.Use(connection =>
        {
            long through = connection.Number(null, StoreDialect.State, StoreDialect.HourlyThrough);
            bool isWhole = true;
            using (DbDataReader reader = connection.Query(StoreDialect.HourlyInWindow, source.Id, known.Number, new Instant(from).Floor(HourlyCodec.Day).Microseconds, to))
            {
                while (reader.Read())
                {
                    isWhole &= TryTake(reader.GetFieldValue<byte[]>(1), reader.GetInt64(0), from, to, rows);
                }
            }

            using DbDataReader newer = connection.Query(StoreDialect.BlocksAfter, through, long.MaxValue);
            while (newer.Read())
            {
                if (newer.GetInt32(1) == source.Id)
                {
                    open.Add(newer.GetInt64(2));
                }
            }

            return isWhole ? rows : null;
        });
    }

    private static bool TryTake(byte[] bytes, long day, long from, long to, SortedDictionary<long, ReadingSummary> rows)
    {
        try
        {
            foreach (ReadingSummary row in HourlyCodec.Decode(bytes, day))
            {
                if (row.Start.Microseconds >= from && row.Start.Microseconds < to)
                {
                    rows[row.Start.Microseconds] = row;
                }
            }

            return true;
        }
        catch (Blocks.DamagedDataException)
        {
            return false;
        }
    }
}
