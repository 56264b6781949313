using System.Data.Common;
using LabWatch.Readings.Engine;

namespace LabWatch.Readings.Transfer;

/// <summary>
/// Copies the rows of one database of sealed source-hours to another as they are, so that sealed bytes, their digests and their numbers
/// stay those that the trail tells of. Only into a target that is empty or has a beginning of the same rows: then it goes on there.
/// </summary>
internal sealed class BlockCopy(StoreDialect from, StoreDialect to)
{
    private const int BlocksAtOnce = 50;

    private const string Blocks =
        "SELECT b.id, b.source_id, b.hour, b.part, b.readings, b.last_change, b.sealed_at, b.digest, b.data, s.data " +
        "FROM block b LEFT JOIN summary s ON s.block_id = b.id WHERE b.id > @id ORDER BY b.id LIMIT @count";

    private const string DigestOf = "SELECT digest FROM block WHERE id = @id";
    private const string CountBlocks = "SELECT COUNT(*) FROM block WHERE id > @id";
    private const string LastInJournal = "SELECT COALESCE(MAX(seq), 0) FROM journal";
    private const string CopiedThrough = "SELECT value FROM state WHERE name = 'copied_through'";
    private const string SetCopiedThrough = "INSERT INTO state(name, value) VALUES ('copied_through', @value) ON CONFLICT(name) DO UPDATE SET value = excluded.value";

    /// <summary>The other tables: how they are read, emptied and written.</summary>
    private static readonly (string Read, string Empty, string Write)[] Small =
    [
        ("SELECT id, site, source FROM source ORDER BY id", "DELETE FROM source", StoreDialect.AddSource),
        ("SELECT source_id, number, channel, newest_time, newest_bits, newest_quality FROM channel ORDER BY source_id, number", "DELETE FROM channel",
            "INSERT INTO channel(source_id, number, channel, newest_time, newest_bits, newest_quality) VALUES (@source, @number, @channel, @time, @bits, @quality)"),
        ("SELECT seq, data FROM journal ORDER BY seq", "DELETE FROM journal", StoreDialect.AppendJournal),
        ("SELECT id, kind, reference, reason, found_at, data FROM set_aside ORDER BY id", "DELETE FROM set_aside", StoreDialect.SetAside),
        ("SELECT source_id, channel, day, data FROM hourly ORDER BY source_id, channel, day", "DELETE FROM hourly",
            "INSERT INTO hourly(source_id, channel, day, data) VALUES (@source, @channel, @day, @data)"),
        ("SELECT block_id, removed_at, digest FROM thinned ORDER BY block_id", "DELETE FROM thinned",
            "INSERT INTO thinned(block_id, removed_at, digest) VALUES (@id, @at, @digest)"),
        ("SELECT value, name FROM state WHERE name IN ('journal_floor', 'hourly_through')", "UPDATE state SET value = 0 WHERE name = 'hourly_through'", StoreDialect.SetState),
    ];

    /// <summary>Copies; gives how many sealed parts, or null where the target has rows of its own. Both sides must have no other user.</summary>
    public long? Run(Action<long, long>? progress, CancellationToken cancellationToken)
    {
        using StoreConnection source = new(from.OpenWriter());
        using StoreConnection target = new(to.OpenWriter());
        long last = target.Number(null, StoreDialect.LastSeal);
        if (!IsBeginning(source, target, last))
        {
            return null;
        }

        target.Execute(null, SetCopiedThrough, LastChange(source));
        long all = source.Number(null, CountBlocks, last), copied = 0;
        for (int taken = -1; taken != 0; copied += taken)
        {
            cancellationToken.ThrowIfCancellationRequested();
            taken = CopyBlocks(source, target, ref last);
            progress?.Invoke(copied + taken, all);
        }

        CopySmall(source, target);
        return copied;
    }

    /// <summary>Whether the target holds nothing, or what was copied from here earlier and nothing of its own since.</summary>
    private static bool IsBeginning(StoreConnection source, StoreConnection target, long last) =>
        LastChange(target) <= target.Number(null, CopiedThrough)
        && (last == 0 || (Bytes(source, DigestOf, last) is { } digest && digest.AsSpan().SequenceEqual(Bytes(target, DigestOf, last))));

    /// <summary>Number of the last commit.</summary>
    private static long LastChange(StoreConnection connection) => Math.Max(
        connection.Number(null, StoreDialect.Floor), Math.Max(connection.Number(null, StoreDialect.LastSealedChange), connection.Number(null, LastInJournal)));

    private static byte[]? Bytes(StoreConnection connection, string sql, long key)
    {
        using DbDataReader reader = connection.Query(sql, key);
        return reader.Read() ? reader.GetFieldValue<byte[]>(0) : null;
    }

    private static int CopyBlocks(StoreConnection source, StoreConnection target, ref long last)
    {
        int copied = 0;
        using DbDataReader reader = source.Query(Blocks, last, BlocksAtOnce);
        using DbTransaction transaction = target.Begin();
        while (reader.Read())
        {
            object?[] row = Row(reader);
            target.Execute(transaction, StoreDialect.AddBlock, row.AsSpan(0, 9));
            if (row[9] is { } summary)
            {
                target.Execute(transaction, StoreDialect.AddSummary, row[0], summary);
            }

            last = reader.GetInt64(0);
            copied++;
        }

        transaction.Commit();
        return copied;
    }

    private static void CopySmall(StoreConnection source, StoreConnection target)
    {
        using DbTransaction transaction = target.Begin();
        foreach ((string read, string empty, string write) in Small)
        {
            target.Execute(transaction, empty);
            using DbDataReader reader = source.Query(read);
            while (reader.Read())
            {
                target.Execute(transaction, write, Row(reader));
            }
        }

        transaction.Commit();
    }

    private static object?[] Row(DbDataReader reader)
    {
        object?[] row = new object?[reader.FieldCount];
        for (int i = 0; i < row.Length; i++)
        {
            row[i] = reader.IsDBNull(i) ? null : reader.GetValue(i);
        }

        return row;
    }
}
