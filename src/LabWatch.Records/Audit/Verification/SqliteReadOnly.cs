using Microsoft.Data.Sqlite;

namespace LabWatch.Records.Audit.Verification;

/// <summary>Opens an SQLite file that may be in use, may be damaged and may lie where nothing can be written.</summary>
internal static class SqliteReadOnly
{
    private static readonly string[] Statements =
        ["PRAGMA trusted_schema = OFF", "PRAGMA cell_size_check = ON", "PRAGMA mmap_size = 0", "BEGIN", "SELECT COUNT(*) FROM sqlite_schema"];

    /// <summary>Opens the file for reading, in one transaction. Throws <see cref="UnreadableException"/> where that cannot be done.</summary>
    /// <param name="path">The file.</param>
    /// <param name="inUse">Whether a process is known to use the file although it may have no write-ahead log at this moment.</param>
    public static SqliteConnection Open(string path, bool inUse)
    {
        if (!File.Exists(path))
        {
            throw new UnreadableException("The file is not there.");
        }

        // Without a write-ahead log nobody uses the file and it is complete by itself: it is read without leaving anything beside it, from
        // a medium that cannot be written, too. With one the log belongs to it.
        string reason = string.Empty;
        SqliteConnection? connection;
        bool isOpen = !inUse && IsAtRest(path) && TryOpen($"file:{Uri.EscapeDataString(path).Replace("%2F", "/", StringComparison.Ordinal)}?immutable=1", out connection, out reason)
            || TryOpen(path, out connection, out reason);
        return isOpen ? connection! : throw new UnreadableException(reason);
    }

    /// <summary>Whether the file has no write-ahead log, so that no process uses it.</summary>
    public static bool IsAtRest(string path) => !File.Exists(path + "-wal");

    /// <summary>What changes when a process writes the file: whether it is at rest, its length, when it was last written.</summary>
    public static (bool IsAtRest, long Length, long Written) StateOf(string path)
    {
        FileInfo file = new(path);
        return (IsAtRest(path), file.Exists ? file.Length : 0, file.Exists ? file.LastWriteTimeUtc.Ticks : 0);
    }

    private static bool TryOpen(string source, out SqliteConnection? connection, out string reason)
    {
        connection = new SqliteConnection(new SqliteConnectionStringBuilder { DataSource = source, Mode = SqliteOpenMode.ReadOnly, Pooling = false, DefaultTimeout = 10 }.ToString());
        try
        {
            connection.Open();
            // One after the other: a batch ends at its first result, and the transaction is what makes all tables of one moment.
            foreach (string statement in Statements)
            {
                using SqliteCommand command = connection.CreateCommand();
                command.CommandText = statement;
                command.ExecuteScalar();
            }

            reason = string.Empty;
            return true;
        }
        catch (SqliteException exception)
        {
            connection.Dispose();
            connection = null;
            reason = exception.Message;
            return false;
        }
    }
}
