using LabWatch.Readings.Engine.PostgreSql;
using Npgsql;

namespace LabWatch.Readings.Quarantine;

/// <summary>
/// The table of refused messages in PostgreSQL, in the schema of the readings. Several services may write it: a transaction locks the
/// totals first, so they take turns. Not thread-safe.
/// </summary>
internal sealed class PostgreSqlQuarantineTable(PostgreSqlTarget target, int countLimit, long bytesLimit) : IQuarantineTable
{
    private const string Tables =
        """
        CREATE TABLE IF NOT EXISTS message(id bigint GENERATED ALWAYS AS IDENTITY PRIMARY KEY, fingerprint bytea NOT NULL UNIQUE,
          first_arrival bigint NOT NULL, arrival bigint NOT NULL, repeats bigint NOT NULL, topic text NOT NULL, payload bytea NOT NULL,
          findings text NOT NULL, bytes bigint NOT NULL);
        CREATE INDEX IF NOT EXISTS message_arrival ON message(arrival, id);
        CREATE TABLE IF NOT EXISTS total(name text PRIMARY KEY, value bigint NOT NULL);
        INSERT INTO total(name, value) VALUES ('refused', 0), ('dropped', 0), ('kept', 0), ('bytes', 0) ON CONFLICT DO NOTHING;
        """;

    private const string Keep =
        """
        WITH kept AS (
          INSERT INTO message(fingerprint, first_arrival, arrival, repeats, topic, payload, findings, bytes)
          VALUES (@print, @arrival, @arrival, 0, @topic, @payload, @findings, @bytes)
          ON CONFLICT (fingerprint) DO UPDATE SET repeats = message.repeats + 1, arrival = greatest(message.arrival, excluded.arrival)
          RETURNING repeats, bytes)
        UPDATE total SET value = value + CASE name
          WHEN 'refused' THEN 1
          WHEN 'kept' THEN (SELECT count(*) FROM kept WHERE repeats = 0)
          WHEN 'bytes' THEN (SELECT coalesce(sum(bytes), 0) FROM kept WHERE repeats = 0) ELSE 0 END
        """;

    private const string DropOldest =
        """
        WITH ranked AS (
          SELECT id, bytes, count(*) OVER newest AS place, sum(bytes) OVER newest AS size FROM message
          WINDOW newest AS (ORDER BY arrival DESC, id DESC)),
        gone AS (DELETE FROM message WHERE id IN (SELECT id FROM ranked WHERE place > @count OR size > @bytes) RETURNING bytes)
        UPDATE total SET value = value + CASE name
          WHEN 'dropped' THEN (SELECT count(*) FROM gone)
          WHEN 'kept' THEN -(SELECT count(*) FROM gone)
          WHEN 'bytes' THEN -(SELECT coalesce(sum(bytes), 0) FROM gone) ELSE 0 END
        """;

    private NpgsqlConnection? _connection;

    public void Add(IEnumerable<QuarantineRow> rows)
    {
        NpgsqlConnection connection = Connection();
        using NpgsqlTransaction transaction = connection.BeginTransaction();
        Number("SELECT value FROM total WHERE name = 'refused' FOR UPDATE");
        foreach (QuarantineRow row in rows)
        {
            using NpgsqlCommand keep = new(Keep, connection);
            keep.Parameters.AddWithValue("print", row.Fingerprint);
            keep.Parameters.AddWithValue("arrival", row.Arrival);
            keep.Parameters.AddWithValue("topic", Storable(row.Topic));
            keep.Parameters.AddWithValue("payload", row.Payload);
            keep.Parameters.AddWithValue("findings", Storable(row.Findings));
            keep.Parameters.AddWithValue("bytes", row.Bytes);
            keep.ExecuteNonQuery();
        }

        if (Number("SELECT value FROM total WHERE name = 'kept'") > countLimit || Number("SELECT value FROM total WHERE name = 'bytes'") > bytesLimit)
        {
            using NpgsqlCommand drop = new(DropOldest, connection);
            drop.Parameters.AddWithValue("count", (long)countLimit);
            drop.Parameters.AddWithValue("bytes", (decimal)bytesLimit);
            drop.ExecuteNonQuery();
        }

        transaction.Commit();
    }

    public List<QuarantineRow> Newest(int count)
    {
        List<QuarantineRow> rows = [];
        using NpgsqlCommand command = new(
            "SELECT arrival, topic, payload, findings, fingerprint FROM message ORDER BY arrival DESC, id DESC LIMIT @count", Connection());
        command.Parameters.AddWithValue("count", count);
        using NpgsqlDataReader reader = command.ExecuteReader();
        while (reader.Read())
        {
            rows.Add(new QuarantineRow(
                reader.GetInt64(0), reader.GetString(1), reader.GetFieldValue<byte[]>(2), reader.GetString(3), reader.GetFieldValue<byte[]>(4)));
        }

        return rows;
    }

    public long Refused() => Number("SELECT value FROM total WHERE name = 'refused'");

    public void Close()
    {
        _connection?.Dispose();
        _connection = null;
    }

    public void Dispose() => Close();

    /// <summary>Text as the server takes it: no zero characters, no halves of surrogate pairs.</summary>
    private static string Storable(string text) =>
        new System.Text.StringBuilder(text.Length).AppendJoin(string.Empty, text.EnumerateRunes().Select(rune => rune.Value == 0 ? "\uFFFD" : rune.ToString())).ToString();

    private long Number(string sql)
    {
#pragma warning disable CA2100 // Every statement is a constant of this class.
        using NpgsqlCommand command = new(sql, Connection());
#pragma warning restore CA2100
        return command.ExecuteScalar() as long? ?? 0;
    }

    private NpgsqlConnection Connection()
    {
        if (_connection is not null)
        {
            return _connection;
        }

        NpgsqlConnection connection = new(target.Builder("labwatch-quarantine"));
        try
        {
            connection.Open();
            PostgreSqlSchema.Execute(connection, $"SELECT pg_advisory_lock({target.QuarantineLockKey})");
            PostgreSqlSchema.Execute(connection, $"CREATE SCHEMA IF NOT EXISTS {target.Schema}");
            PostgreSqlSchema.Execute(connection, Tables);
            PostgreSqlSchema.Execute(connection, $"SELECT pg_advisory_unlock({target.QuarantineLockKey})");
        }
        catch
        {
            connection.Dispose();
            throw;
        }

        return _connection = connection;
    }
}
