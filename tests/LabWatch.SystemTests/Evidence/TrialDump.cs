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
    /// Rows that a later dump has lost, and rows that it has got, by content: under which number the engine keeps a row, and whether a damaged
    /// file shows it twice, is no content.
    /// </summary>
    public IReadOnlyList<(TrialTable Table, string? Lost, string? Got)> Differences(TrialDump later)
    {
        List<(TrialTable, string?, string?)> differences = [];
        foreach (TrialTable table in TrialTable.All)
        {
            Dictionary<string, Dictionary<string, object>> before = Contents(table);
            Dictionary<string, Dictionary<string, object>> after = later.Contents(table);
            differences.AddRange(before.Where(row => !after.ContainsKey(row.Key)).Select(row => (table, (string?)table.IdOf(row.Value), (string?)null)));
            differences.AddRange(after.Where(row => !before.ContainsKey(row.Key)).Select(row => (table, (string?)null, (string?)table.IdOf(row.Value))));
        }

        return differences;
    }

    private Dictionary<string, Dictionary<string, object>> Contents(TrialTable table)
    {
        Dictionary<string, Dictionary<string, object>> contents = new(StringComparer.Ordinal);
        foreach (((string name, _, _), Dictionary<string, object> row) in _rows)
        {
            if (name == table.Name)
            {
                contents[string.Join('\u001f', row.Select(cell => Text(cell.Value)))] = row;
            }
        }

        return contents;
    }

    private static string Text(object value) => value switch
    {
        byte[] bytes => "b" + Convert.ToHexString(bytes),
        double number => FormattableString.Invariant($"d{number + 0.0:R}"),
        long number => FormattableString.Invariant($"i{number}"),
        string text => "t" + text,
        _ => "n",
    };

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
