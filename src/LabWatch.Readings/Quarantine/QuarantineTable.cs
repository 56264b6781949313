using Microsoft.Data.Sqlite;

namespace LabWatch.Readings.Quarantine;

/// <summary>The table of refused messages in a SQLite file. Not thread-safe.</summary>
internal sealed class QuarantineTable(string path, int countLimit, long bytesLimit) : IQuarantineTable
{
    private const string Tables =
        """
        CREATE TABLE IF NOT EXISTS message(id INTEGER PRIMARY KEY AUTOINCREMENT, fingerprint BLOB NOT NULL UNIQUE, first_arrival INTEGER NOT NULL,
          arrival INTEGER NOT NULL, repeats INTEGER NOT NULL, topic TEXT NOT NULL, payload BLOB NOT NULL, findings TEXT NOT NULL, bytes INTEGER NOT NULL);
        CREATE INDEX IF NOT EXISTS message_arrival ON message(arrival, id);
        CREATE TABLE IF NOT EXISTS total(name TEXT PRIMARY KEY, value INTEGER NOT NULL) WITHOUT ROWID;
        INSERT OR IGNORE INTO total(name, value) VALUES ('refused', 0), ('dropped', 0), ('kept', 0), ('bytes', 0);
        """;

    private SqliteConnection? _connection;

    public void Add(IEnumerable<QuarantineRow> rows)
    {
        SqliteConnection connection = Connection();
        using SqliteTransaction transaction = connection.BeginTransaction(deferred: false);
        foreach (QuarantineRow row in rows)
        {
            Change("refused", 1);
            if (Execute("UPDATE message SET repeats = repeats + 1, arrival = max(arrival, $arrival) WHERE fingerprint = $print", ("$arrival", row.Arrival), ("$print", row.Fingerprint)) == 0)
            {
                Execute(
                    "INSERT INTO message(fingerprint, first_arrival, arrival, repeats, topic, payload, findings, bytes) " +
                    "VALUES ($print, $arrival, $arrival, 0, $topic, $payload, $findings, $bytes)",
                    ("$print", row.Fingerprint), ("$arrival", row.Arrival), ("$topic", row.Topic), ("$payload", row.Payload),
                    ("$findings", row.Findings), ("$bytes", row.Bytes));
                Change("kept", 1);
                Change("bytes", row.Bytes);
            }
        }

        DropOldest();
        transaction.Commit();
    }

    public List<QuarantineRow> Newest(int count)
    {
        List<QuarantineRow> rows = [];
        using SqliteCommand command = Command(
            "SELECT arrival, topic, payload, findings, fingerprint FROM message ORDER BY arrival DESC, id DESC LIMIT $count", ("$count", count));
        using SqliteDataReader reader = command.ExecuteReader();
        while (reader.Read())
        {
            rows.Add(new QuarantineRow(
                reader.GetInt64(0), reader.GetString(1), reader.GetFieldValue<byte[]>(2), reader.GetString(3), reader.GetFieldValue<byte[]>(4)));
        }

        return rows;
    }

    public long Refused() => Total("refused");

    public void Close()
    {
        _connection?.Dispose();
        _connection = null;
    }

    public void Dispose() => Close();

    private void DropOldest()
    {
        for (long kept = Total("kept"); kept > 0 && (kept > countLimit || Total("bytes") > bytesLimit); kept--)
        {
            const string Oldest = "(SELECT id FROM message ORDER BY arrival, id LIMIT 1)";
            Change("bytes", -Number($"SELECT bytes FROM message WHERE id = {Oldest}"));
            Change("dropped", 1);
            Change("kept", -1);
            Execute($"DELETE FROM message WHERE id = {Oldest}");
        }
    }

    private void Change(string name, long by) => Execute("UPDATE total SET value = value + $by WHERE name = $name", ("$by", by), ("$name", name));

    private long Total(string name) => Number("SELECT value FROM total WHERE name = $name", ("$name", name));

    private long Number(string sql, params ReadOnlySpan<(string Name, object Value)> values)
    {
        using SqliteCommand command = Command(sql, values);
        return command.ExecuteScalar() as long? ?? 0;
    }

    private int Execute(string sql, params ReadOnlySpan<(string Name, object Value)> values)
    {
        using SqliteCommand command = Command(sql, values);
        return command.ExecuteNonQuery();
    }

    private SqliteCommand Command(string sql, params ReadOnlySpan<(string Name, object Value)> values)
    {
        SqliteCommand command = Connection().CreateCommand();
#pragma warning disable CA2100 // Every statement is a constant of this class.
        command.CommandText = sql;
#pragma warning restore CA2100
        foreach ((string name, object value) in values)
        {
            command.Parameters.AddWithValue(name, value);
        }

        return command;
    }

    private SqliteConnection Connection()
    {
        if (_connection is not null)
        {
            return _connection;
        }

        Directory.CreateDirectory(Path.GetDirectoryName(path)!);
        SqliteConnection connection = new(new SqliteConnectionStringBuilder { DataSource = path, Pooling = false, DefaultTimeout = 1 }.ToString());
        connection.Open();
        _connection = connection;
        Execute("PRAGMA journal_mode = WAL");
        Execute("PRAGMA synchronous = FULL");
        Execute(Tables);
        return connection;
    }
}
