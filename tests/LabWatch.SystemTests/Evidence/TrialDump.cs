using Microsoft.Data.Sqlite;

namespace LabWatch.SystemTests.Evidence;

/// <summary>The logical content of the tables that are vouched for, by row number, read without indexes.</summary>
internal sealed class TrialDump
{
    private readonly Dictionary<(string Table, long Row, int Time), Dictionary<string, object>> _rows = [];

    /// <summary>Why the content could not be read; null where it could.</summary>
    public string? Unreadable { get; private set; }

    public static TrialDump Of(string directory)
    {
        TrialDump dump = new();
        foreach (TrialTable table in TrialTable.All)
        {
            try
            {
                dump.Read(directory, table);
            }
            catch (Exception exception) when (exception is SqliteException or InvalidCastException or ArgumentException)
            {
                dump.Unreadable = $"{table.Name}: {exception.Message}";
            }
        }

        return dump;
    }

    /// <summary>
    /// Rows that differ, are gone or are new in a later dump: table and names of the row before and after. Under which number the engine keeps
    /// a row is no content.
    /// </summary>
    public IReadOnlyList<(TrialTable Table, string? Before, string? After)> Differences(TrialDump later)
    {
        List<((string Table, long Row, int Time) Key, Dictionary<string, object>? Before, Dictionary<string, object>? After)> found = [];
        foreach ((string Table, long Row, int Time) key in _rows.Keys.Union(later._rows.Keys))
        {
            Dictionary<string, object>? before = _rows.GetValueOrDefault(key);
            Dictionary<string, object>? after = later._rows.GetValueOrDefault(key);
            if (before is null || after is null || !Same(before, after))
            {
                found.Add((key, before, after));
            }
        }

        found.RemoveAll(one => one is { Before: { } gone, After: null } && found.Exists(other => other.Key.Table == one.Key.Table && other.After is { } moved && Same(gone, moved)));
        found.RemoveAll(one => one is { Before: null, After: { } came } && _rows.Any(other => other.Key.Table == one.Key.Table && Same(other.Value, came) && !later._rows.ContainsKey(other.Key)));
        return
        [
            .. found.Select(one =>
            {
                TrialTable table = TrialTable.All.Single(candidate => candidate.Name == one.Key.Table);
                return (table, one.Before is { } before ? table.IdOf(before) : null, one.After is { } after ? table.IdOf(after) : null);
            }),
        ];
    }

    private static bool Same(Dictionary<string, object> before, Dictionary<string, object> after) => before.All(column => (column.Value, after[column.Key]) switch
    {
        (byte[] left, byte[] right) => left.AsSpan().SequenceEqual(right),
        (double left, double right) => left == right,
        (object left, object right) => left.Equals(right),
    });

    private void Read(string directory, TrialTable table)
    {
        using SqliteConnection connection = new($"Data Source={Path.Combine(directory, table.File)};Mode=ReadOnly;Pooling=False");
        connection.Open();
        using SqliteCommand command = connection.CreateCommand();
        command.CommandText = $"SELECT rowid, {string.Join(", ", table.Columns.Select(column => $"\"{column}\""))} FROM \"{table.Name}\" NOT INDEXED";
        using SqliteDataReader reader = command.ExecuteReader();
        while (reader.Read())
        {
            // A damaged file can give two rows the same number.
            int time = 0;
            while (_rows.ContainsKey((table.Name, reader.GetInt64(0), time)))
            {
                time++;
            }

            _rows[(table.Name, reader.GetInt64(0), time)] = table.Columns.Select((column, place) => (column, Value: reader.GetValue(place + 1))).ToDictionary(cell => cell.column, cell => cell.Value);
        }
    }
}
