using System.Data.Common;
using LabWatch.Lab.Time;
using LabWatch.Readings.Blocks;
using LabWatch.Readings.Head;
using LabWatch.Readings.Summaries;

namespace LabWatch.Readings.Engine;

/// <summary>All that changes the database, on its one writing connection. Throws what the database throws. Not thread-safe.</summary>
internal sealed class StoreWriter(StoreDialect dialect, StoreConnection connection, StoreIncidents incidents) : IHourLoader, IDisposable
{
    public StoreConnection Connection => connection;

    /// <summary>Makes one commit durable.</summary>
    public void Append(long change, byte[] row, CommitStage stage)
    {
        if (stage.NewChannels.Count == 0 && stage.NewSources.Count == 0)
        {
            connection.Execute(null, StoreDialect.AppendJournal, change, row);
            return;
        }

        using DbTransaction transaction = connection.Begin();
        foreach (HeadSource source in stage.NewSources)
        {
            connection.Execute(transaction, StoreDialect.AddSource, source.Id, source.Key.Site, source.Key.Source);
        }

        foreach ((HeadSource source, HeadChannel channel) in stage.NewChannels)
        {
            connection.Execute(transaction, StoreDialect.AddChannel, source.Id, channel.Number, channel.Name);
        }

        connection.Execute(transaction, StoreDialect.AppendJournal, change, row);
        transaction.Commit();
    }

    /// <inheritdoc/>
    public void Load(HeadHour hour)
    {
        int parts = (int)HourState(hour.Source.Id, hour.Hour).Parts;
        List<(long Id, SealedBlock Block)> blocks = [];
        foreach (long id in parts == 0 ? [] : BlockIds(hour.Source.Id, hour.Hour))
        {
            if (!incidents.IsBlockSetAside(id) && OpenBlock(id) is { } block)
            {
                blocks.Add((id, block));
            }
        }

        hour.Load(parts, blocks.Count == 0 ? null : new SealedIdentity(blocks, incidents.ReportBlock));
    }

    /// <summary>The bytes that a query of one column gives; null where there is no row.</summary>
    public byte[]? Bytes(string sql, params ReadOnlySpan<object?> values)
    {
        using DbDataReader reader = connection.Query(sql, values);
        return reader.Read() ? reader.GetFieldValue<byte[]>(0) : null;
    }

    /// <summary>An hour as one row a channel, computed from the readings of all its parts; damaged ones are reported and passed over.</summary>
    public IReadOnlyList<ChannelSummary> FoldHour(int source, long hour)
    {
        SeriesBuilder builder = new(new TimeWindow(new Instant(hour), new Instant(hour + Instant.MicrosecondsPerHour)));
        foreach (long id in BlockIds(source, hour))
        {
            if (!incidents.IsBlockSetAside(id) && OpenBlock(id) is { } block)
            {
                AddAll(builder, id, block);
            }
        }

        return [.. builder.Build().Select(one => new ChannelSummary(one.Channel, SummaryFold.Fold(one.TimeMicroseconds.Span, one.Values.Span, Instant.MicrosecondsPerHour)))];
    }

    /// <summary>The last commit whose readings of an hour are sealed, and how many parts are.</summary>
    public (long Change, long Parts) HourState(int source, long hour)
    {
        using DbDataReader reader = connection.Query(StoreDialect.HourState, source, hour);
        return reader.Read() ? (reader.GetInt64(0), reader.GetInt64(1)) : (0, 0);
    }

    /// <summary>Digest of a sealed part; null where there is none.</summary>
    public byte[]? Digest(int source, long hour, int part)
    {
        using DbDataReader reader = connection.Query(StoreDialect.PartDigest, source, hour, part);
        return reader.Read() ? reader.GetFieldValue<byte[]>(0) : null;
    }

    /// <summary>Writes sealed parts, the newest reading of their channels, and the number below which the journal is no longer needed.</summary>
    public void Seal(IReadOnlyList<SealedPart> parts, long floor, long sealedAt)
    {
        using DbTransaction transaction = connection.Begin();
        long id = connection.Number(transaction, StoreDialect.LastSeal);
        foreach (SealedPart part in parts)
        {
            if (connection.Number(transaction, StoreDialect.HasPart, part.Hour.Source.Id, part.Hour.Hour, part.Part.Part) > 0)
            {
                // An earlier attempt became durable although its commit reported a failure.
                continue;
            }

            connection.Execute(
                transaction, StoreDialect.AddBlock, ++id, part.Hour.Source.Id, part.Hour.Hour, part.Part.Part, part.Part.Readings,
                part.Part.LastChange, sealedAt, part.Digest, part.Block);
            connection.Execute(transaction, StoreDialect.AddSummary, id, part.Summary);
            SetNewest(transaction, part.Hour.Source);
        }

        DropJournal(transaction, floor);
        transaction.Commit();
    }

    /// <summary>Drops journal rows that are no longer needed, a bounded number at a time; true while there are more.</summary>
    public bool DropJournal(long floor)
    {
        using DbTransaction transaction = connection.Begin();
        bool more = DropJournal(transaction, floor);
        transaction.Commit();
        return more;
    }

    /// <summary>Gives some of the space of dropped rows back to the disk; true while there is more.</summary>
    public bool ReleaseSpace() => dialect.ReleaseSpace(connection);

    public void Dispose() => connection.Dispose();

    private bool DropJournal(DbTransaction transaction, long floor)
    {
        const int RowsAtOnce = 2000;
        long from = connection.Number(transaction, StoreDialect.Floor);
        long to = Math.Min(floor, from + RowsAtOnce);
        if (to > from)
        {
            connection.Execute(transaction, StoreDialect.DropJournal, to);
            connection.Execute(transaction, StoreDialect.SetFloor, to);
        }

        return to < floor;
    }

    private void SetNewest(DbTransaction transaction, HeadSource source)
    {
        foreach (HeadChannel channel in source.Channels)
        {
            if (channel.Newest is { } newest)
            {
                connection.Execute(
                    transaction, StoreDialect.SetNewest, newest.Time.Microseconds, BitConverter.DoubleToInt64Bits(newest.Value),
                    (int)newest.Quality, source.Id, channel.Number);
            }
        }
    }

    private void AddAll(SeriesBuilder builder, long id, SealedBlock block)
    {
        try
        {
            for (int channel = 0; channel < block.Channels.Count; channel++)
            {
                builder.Add(block.Decode(channel));
            }
        }
        catch (DamagedDataException damage)
        {
            incidents.ReportBlock(id, damage);
        }
    }

    private List<long> BlockIds(int source, long hour)
    {
        List<long> ids = [];
        using DbDataReader reader = connection.Query(StoreDialect.HourBlocks, source, hour);
        while (reader.Read())
        {
            ids.Add(reader.GetInt64(0));
        }

        return ids;
    }

    private SealedBlock? OpenBlock(long id)
    {
        try
        {
            using DbDataReader reader = connection.Query(StoreDialect.Block, id);
            return reader.Read() && reader.GetFieldValue<byte[]>(0) is { Length: > 0 } data ? SealedBlock.Open(data) : null;
        }
        catch (DamagedDataException damage)
        {
            incidents.ReportBlock(id, damage);
        }
        catch (DbException error) when (dialect.SaysDamaged(error))
        {
            incidents.ReportBlock(id, error);
        }

        return null;
    }
}
