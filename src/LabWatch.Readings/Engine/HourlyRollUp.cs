using System.Data.Common;
using LabWatch.Lab.Time;
using LabWatch.Readings.Blocks;
using LabWatch.Readings.Head;
using LabWatch.Readings.Summaries;

namespace LabWatch.Readings.Engine;

/// <summary>
/// Keeps the rows of whole hours, one database row a channel and day, in step with what is sealed. They are derived: built from the
/// summaries, behind the sealing, a bounded number at a time, so a store of an earlier version is brought up to date while it works.
/// </summary>
internal sealed class HourlyRollUp(StoreWriter writer, HeadState head, StoreIncidents incidents)
{
    private const int BlocksAtOnce = 64;

    private readonly Dictionary<(int Source, int Channel, long Day), SortedDictionary<long, ReadingSummary>> _days = [];

    /// <summary>Takes the next blocks in; true while there may be more.</summary>
    public bool Run()
    {
        List<(long Id, int Source, long Hour, int Part)> blocks = Next();
        if (blocks.Count == 0)
        {
            return false;
        }

        foreach ((long id, int source, long hour, int part) in blocks)
        {
            TakeHour(id, head.Find(source) ?? throw new DamagedDataException("A block belongs to no source."), hour, part);
        }

        using DbTransaction transaction = writer.Connection.Begin();
        foreach (((int source, int channel, long day), SortedDictionary<long, ReadingSummary> rows) in _days)
        {
            writer.Connection.Execute(transaction, StoreDialect.SetHourly, source, channel, day, HourlyCodec.Encode([.. rows.Values], day));
        }

        writer.Connection.Execute(transaction, StoreDialect.SetState, blocks[^1].Id, StoreDialect.HourlyThrough);
        transaction.Commit();
        return blocks.Count == BlocksAtOnce;
    }

    private List<(long Id, int Source, long Hour, int Part)> Next()
    {
        List<(long, int, long, int)> blocks = [];
        long through = writer.Connection.Number(null, StoreDialect.State, StoreDialect.HourlyThrough);
        using DbDataReader reader = writer.Connection.Query(StoreDialect.BlocksAfter, through, BlocksAtOnce);
        while (reader.Read())
        {
            blocks.Add((reader.GetInt64(0), reader.GetInt32(1), reader.GetInt64(2), reader.GetInt32(3)));
        }

        return blocks;
    }

    private void TakeHour(long id, HeadSource source, long hour, int part)
    {
        if (part > 0 && writer.Connection.Number(null, StoreDialect.ThinnedOfHour, source.Id, hour) > 0)
        {
            // Readings of this hour were removed: the row from the time when they were there is the better one.
            return;
        }

        foreach (ChannelSummary channel in (part == 0 ? OfSummary(id, hour) : null) ?? writer.FoldHour(source.Id, hour))
        {
            if (channel.Rows.Count > 0 && source.Find(channel.Channel) is { } known)
            {
                long day = new Instant(hour).Floor(HourlyCodec.Day).Microseconds;
                Day(source.Id, known.Number, day)[hour] = channel.Rows[0];
            }
        }
    }

    private List<ChannelSummary>? OfSummary(long id, long hour)
    {
        try
        {
            return writer.Bytes(StoreDialect.Summary, id) is { } bytes
                ? [.. SummaryCodec.Decode(bytes, hour).Channels.Select(one => one with { Rows = SummaryFold.Coarsen(one.Rows, Instant.MicrosecondsPerHour) })]
                : null;
        }
        catch (DamagedDataException damage)
        {
            incidents.Report(StoreIncidents.SummaryKind, id, damage.Message);
            return null;
        }
    }

    private SortedDictionary<long, ReadingSummary> Day(int source, int channel, long day)
    {
        if (!_days.TryGetValue((source, channel, day), out SortedDictionary<long, ReadingSummary>? rows))
        {
            _days.Add((source, channel, day), rows = []);
            foreach (ReadingSummary row in Known(source, channel, day))
            {
                rows[row.Start.Microseconds] = row;
            }
        }

        return rows;
    }

    private ReadingSummary[] Known(int source, int channel, long day)
    {
        try
        {
            return writer.Bytes(StoreDialect.Hourly, source, channel, day) is { } bytes ? HourlyCodec.Decode(bytes, day) : [];
        }
        catch (DamagedDataException)
        {
            // Derived rows: what is taken in now is right again, the other hours of the day are rebuilt by the integrity check.
            return [];
        }
    }
}
