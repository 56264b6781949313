using System.Data.Common;
using LabWatch.Lab.Identity;
using LabWatch.Records.Audit.Verification;

namespace LabWatch.Evidence.Verification;

/// <summary>The readings in a PostgreSQL schema, read as the bytes that lie in it. Takes no lock: the service may run.</summary>
internal sealed class SealedSchema(DbConnection connection) : ISealedParts
{
    /// <inheritdoc/>
    public Dictionary<long, SourceKey> Sources(out string? damage)
    {
        Dictionary<long, SourceKey> sources = [];
        damage = Walk("SELECT id, site, source FROM source", row => sources[row.GetInt64(0)] = new SourceKey(row.GetString(1), row.GetString(2)));
        return sources;
    }

    /// <inheritdoc/>
    public List<StoredPart> Parts(out string? damage, out List<long> odd)
    {
        List<StoredPart> parts = [];
        damage = Walk(
            "SELECT id, source_id, hour, part, readings, last_change, sealed_at, digest FROM block ORDER BY id",
            row => parts.Add(new StoredPart(
                row.GetInt64(0), row.GetInt64(1), row.GetInt64(2), row.GetInt32(3), row.GetInt32(4), row.GetInt64(5), row.GetInt64(6), row.GetFieldValue<byte[]>(7))));

        // The columns have types, so no row can hold a value of another kind.
        odd = [];
        return parts;
    }

    /// <inheritdoc/>
    public HashSet<long> Summaries(out string? damage)
    {
        HashSet<long> summaries = [];
        damage = Walk("SELECT block_id FROM summary", row => summaries.Add(row.GetInt64(0)));
        return summaries;
    }

    /// <inheritdoc/>
    public byte[]? Data(string table, string key, long id)
    {
        byte[]? data = null;
        string? damage = Walk(FormattableString.Invariant($"SELECT data FROM {table} WHERE {key} = {id}"), row => data = row.GetFieldValue<byte[]>(0));
        return damage is null ? data : throw new UnreadableException(damage);
    }

    /// <inheritdoc/>
    public void Dispose() => connection.Dispose();

    private string? Walk(string sql, Action<DbDataReader> take)
    {
        try
        {
            using DbCommand command = connection.CreateCommand();
#pragma warning disable CA2100 // Constants, with names of tables that this assembly gives and whole numbers.
            command.CommandText = sql;
#pragma warning restore CA2100
            using DbDataReader reader = command.ExecuteReader();
            while (reader.Read())
            {
                take(reader);
            }

            return null;
        }
        catch (DbException exception)
        {
            return exception.Message;
        }
    }
}
