using System.Globalization;
using System.Text;
using LabWatch.Records.Audit;
using Microsoft.Data.Sqlite;

namespace LabWatch.SystemTests.Evidence;

/// <summary>Changes that somebody with the file and a database tool can make, with the guards of the file taken away first.</summary>
internal sealed class TrialChanges(Random random)
{
    /// <summary>Makes one change; tells what it was.</summary>
    public string Make(string directory)
    {
        TrialTable table = TrialTable.All[random.Next(TrialTable.All.Count)];
        using SqliteConnection connection = new($"Data Source={Path.Combine(directory, table.File)};Pooling=False");
        connection.Open();
        Unguard(connection);
        int kind = random.Next(table.Name == "audit_entries" ? 8 : 6);
        string what = kind switch
        {
            0 or 1 or 2 => Update(connection, table),
            3 => Delete(connection, table),
            4 => Swap(connection, table),
            5 => Insert(connection, table),
            6 => Forge(connection, relink: random.Next(2) == 0),
            _ => Cut(connection),
        };
        Execute(connection, "PRAGMA wal_checkpoint(TRUNCATE)");
        Execute(connection, "PRAGMA journal_mode = DELETE");
        return $"{table.Name}: {what}";
    }

    private static void Unguard(SqliteConnection connection)
    {
        List<string> triggers = [];
        using (SqliteCommand list = connection.CreateCommand())
        {
            list.CommandText = "SELECT name FROM sqlite_schema WHERE type = 'trigger'";
            using SqliteDataReader reader = list.ExecuteReader();
            while (reader.Read())
            {
                triggers.Add(reader.GetString(0));
            }
        }

        triggers.ForEach(trigger => Execute(connection, $"DROP TRIGGER \"{trigger}\""));
    }

    private string Update(SqliteConnection connection, TrialTable table)
    {
        string column = table.Columns[random.Next(table.Columns.Length)];
        long row = Row(connection, table);
        object before = Value(connection, $"SELECT \"{column}\" FROM \"{table.Name}\" WHERE rowid = {row}");
        using SqliteCommand update = connection.CreateCommand();
        update.CommandText = $"UPDATE OR IGNORE \"{table.Name}\" SET \"{column}\" = $value WHERE rowid = {row}";
        update.Parameters.AddWithValue("$value", Other(before));
        try
        {
            update.ExecuteNonQuery();
        }
        catch (SqliteException)
        {
            // A constraint of the table stands against it; the trial takes the change as not made.
        }

        return $"{column} of row {row} updated";
    }

    private object Other(object before)
    {
        switch (before)
        {
            case long number:
                return random.Next(2) == 0 ? number + 1 : number - (1L << random.Next(20));
            case double number:
                return random.Next(2) == 0 ? Math.BitIncrement(number) : number * 1.01;
            case string { Length: > 0 } text:
                char[] letters = text.ToCharArray();
                int place = random.Next(letters.Length);
                letters[place] = letters[place] == 'a' ? 'e' : letters[place] is >= '0' and <= '8' ? (char)(letters[place] + 1) : 'a';
                return new string(letters);
            case byte[] { Length: > 0 } bytes:
                byte[] changed = [.. bytes];
                changed[random.Next(changed.Length)] ^= (byte)(1 << random.Next(8));
                return changed;
            default:
                return random.Next(2) == 0 ? 7L : "added";
        }
    }

    private string Delete(SqliteConnection connection, TrialTable table)
    {
        long row = Row(connection, table);
        Execute(connection, $"DELETE FROM \"{table.Name}\" WHERE rowid = {row}");
        return $"row {row} deleted";
    }

    private string Swap(SqliteConnection connection, TrialTable table)
    {
        string column = table.Columns[random.Next(table.Columns.Length)];
        (long first, long second) = (Row(connection, table), Row(connection, table));
        object left = Value(connection, $"SELECT \"{column}\" FROM \"{table.Name}\" WHERE rowid = {first}");
        object right = Value(connection, $"SELECT \"{column}\" FROM \"{table.Name}\" WHERE rowid = {second}");
        foreach ((long row, object value) in ((long, object)[])[(first, right), (second, left)])
        {
            using SqliteCommand update = connection.CreateCommand();
            update.CommandText = $"UPDATE OR IGNORE \"{table.Name}\" SET \"{column}\" = $value WHERE rowid = {row}";
            update.Parameters.AddWithValue("$value", value);
            update.ExecuteNonQuery();
        }

        return $"{column} of rows {first} and {second} swapped";
    }

    private string Insert(SqliteConnection connection, TrialTable table)
    {
        long row = Row(connection, table);
        string[] all = Columns(connection, table.Name);
        string key = table.Name switch
        {
            "assessments" => "id",
            "alerts" => "id",
            "audit_entries" => "sequence",
            "block" => "part",
            "summary" => "block_id",
            _ => table.Columns.First(column => table.Subject.EndsWith("{" + column + "}", StringComparison.Ordinal)),
        };
        string Copied(string column) => column == key ? Fresh(table.Name, key)
            : table.Name == "block" && column == "id" ? "(SELECT MIN(id) FROM block) - 1"
            : (table.Name, column) is ("assessments", "sequence") or ("alerts", "number") or ("revisions", "sequence") or ("assessments", "revision") ? $"\"{column}\" + 1000"
            : $"\"{column}\"";
        Execute(connection, $"INSERT OR IGNORE INTO \"{table.Name}\" ({string.Join(", ", all.Select(column => $"\"{column}\""))}) SELECT {string.Join(", ", all.Select(Copied))} FROM \"{table.Name}\" WHERE rowid = {row}");
        return $"copy of row {row} inserted";
    }

    private string Fresh(string table, string key) => (table, key) switch
    {
        ("assessments", _) => $"'{Convert.ToHexStringLower(Bytes(16))}'",
        ("alerts", _) => $"'{Guid.CreateVersion7().ToString("D").ToUpperInvariant()}'",
        ("assessment_heads", _) => "'other'",
        _ => $"\"{key}\" + 100",
    };

    private byte[] Bytes(int count)
    {
        byte[] bytes = new byte[count];
        random.NextBytes(bytes);
        return bytes;
    }

    /// <summary>An entry is changed and gets a right digest, as somebody who knows the rule can make it; with all that follow, or alone.</summary>
    private string Forge(SqliteConnection connection, bool relink)
    {
        long last = (long)Value(connection, "SELECT MAX(sequence) FROM audit_entries");
        long target = random.NextInt64(1, last + 1);
        Execute(connection, $"UPDATE audit_entries SET actor = 'nobody' WHERE sequence = {target}");
        byte[]? previous = null;
        for (long sequence = target; sequence <= (relink ? last : target); sequence++)
        {
            previous = Redigest(connection, sequence, previous);
        }

        return relink ? $"entry {target} changed, all later ones chained anew" : $"entry {target} changed and given its digest";
    }

    private static byte[] Redigest(SqliteConnection connection, long sequence, byte[]? previous)
    {
        using SqliteCommand read = connection.CreateCommand();
        read.CommandText = $"SELECT site, at, actor, action, subject, content, record_digest, previous FROM audit_entries WHERE sequence = {sequence}";
        byte[] digest;
        using (SqliteDataReader row = read.ExecuteReader())
        {
            row.Read();
            previous ??= row.GetFieldValue<byte[]>(7);
            System.Buffers.ArrayBufferWriter<byte> canonical = new();
            new CanonicalEntry
            {
                Site = Encoding.UTF8.GetBytes(row.GetString(0)),
                Sequence = sequence,
                At = row.GetInt64(1),
                Actor = Encoding.UTF8.GetBytes(row.GetString(2)),
                Action = Encoding.UTF8.GetBytes(row.GetString(3)),
                Subject = Encoding.UTF8.GetBytes(row.GetString(4)),
                Content = Encoding.UTF8.GetBytes(row.GetString(5)),
                RecordDigest = row.IsDBNull(6) ? [] : row.GetFieldValue<byte[]>(6),
                Previous = previous,
            }.Write(canonical);
            digest = System.Security.Cryptography.SHA256.HashData(canonical.WrittenSpan);
        }

        using SqliteCommand write = connection.CreateCommand();
        write.CommandText = $"UPDATE audit_entries SET previous = $previous, digest = $digest WHERE sequence = {sequence}";
        write.Parameters.AddWithValue("$previous", previous);
        write.Parameters.AddWithValue("$digest", digest);
        write.ExecuteNonQuery();
        return digest;
    }

    private string Cut(SqliteConnection connection)
    {
        int count = random.Next(1, 6);
        Execute(connection, $"DELETE FROM audit_entries WHERE sequence > (SELECT MAX(sequence) FROM audit_entries) - {count}");
        return $"last {count} entries deleted";
    }

    private long Row(SqliteConnection connection, TrialTable table)
    {
        long count = (long)Value(connection, $"SELECT COUNT(*) FROM \"{table.Name}\"");
        return count == 0 ? 0 : (long)Value(connection, $"SELECT rowid FROM \"{table.Name}\" ORDER BY rowid LIMIT 1 OFFSET {random.NextInt64(count).ToString(CultureInfo.InvariantCulture)}");
    }

    private static string[] Columns(SqliteConnection connection, string table)
    {
        using SqliteCommand command = connection.CreateCommand();
        command.CommandText = $"SELECT name FROM pragma_table_info('{table}')";
        using SqliteDataReader reader = command.ExecuteReader();
        List<string> columns = [];
        while (reader.Read())
        {
            columns.Add(reader.GetString(0));
        }

        return [.. columns];
    }

    private static object Value(SqliteConnection connection, string sql)
    {
        using SqliteCommand command = connection.CreateCommand();
        command.CommandText = sql;
        return command.ExecuteScalar() ?? DBNull.Value;
    }

    private static void Execute(SqliteConnection connection, string sql)
    {
        using SqliteCommand command = connection.CreateCommand();
        command.CommandText = sql;
        command.ExecuteNonQuery();
    }
}
