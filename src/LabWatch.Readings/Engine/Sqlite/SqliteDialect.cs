using System.Data.Common;
using System.Globalization;
using Microsoft.Data.Sqlite;

namespace LabWatch.Readings.Engine.Sqlite;

/// <summary>The engine on a SQLite file: write-ahead log, every commit forced to the disk.</summary>
internal sealed class SqliteDialect(string path, Action<SqliteConnection>? onWriterOpened = null) : StoreDialect
{
    private const int Corrupt = 11;

    /// <summary>Free pages that stay for new rows (8 MiB): the journal of some hours comes and goes without the file growing and shrinking.</summary>
    private const int FreePagesKept = 4096;

    private const string ReleasePages = "PRAGMA incremental_vacuum(256)";
    private const int NotADatabase = 26;

    private const string VersionOne =
        """
        CREATE TABLE state(name TEXT PRIMARY KEY, value INTEGER NOT NULL) WITHOUT ROWID;
        INSERT INTO state(name, value) VALUES ('journal_floor', 0);
        CREATE TABLE source(id INTEGER PRIMARY KEY, site TEXT NOT NULL, source TEXT NOT NULL, UNIQUE(site, source));
        CREATE TABLE channel(source_id INTEGER NOT NULL, number INTEGER NOT NULL, channel TEXT NOT NULL,
          newest_time INTEGER, newest_bits INTEGER, newest_quality INTEGER,
          PRIMARY KEY(source_id, number), UNIQUE(source_id, channel)) WITHOUT ROWID;
        CREATE TABLE journal(seq INTEGER PRIMARY KEY, data BLOB NOT NULL);
        CREATE TABLE block(id INTEGER PRIMARY KEY, source_id INTEGER NOT NULL, hour INTEGER NOT NULL, part INTEGER NOT NULL,
          readings INTEGER NOT NULL, last_change INTEGER NOT NULL, sealed_at INTEGER NOT NULL, digest BLOB NOT NULL, data BLOB NOT NULL);
        CREATE UNIQUE INDEX block_hour ON block(source_id, hour, part, readings, last_change);
        CREATE INDEX block_change ON block(last_change, source_id, hour);
        CREATE TABLE summary(block_id INTEGER PRIMARY KEY, data BLOB NOT NULL);
        CREATE TABLE set_aside(id INTEGER PRIMARY KEY, kind TEXT NOT NULL, reference INTEGER NOT NULL, reason TEXT NOT NULL,
          found_at INTEGER NOT NULL, data BLOB);
        """;

    /// <summary>Rows of whole hours for charts of years, and what retention removed from sealed parts.</summary>
    private const string VersionTwo =
        """
        CREATE TABLE hourly(source_id INTEGER NOT NULL, channel INTEGER NOT NULL, day INTEGER NOT NULL, data BLOB NOT NULL,
          PRIMARY KEY(source_id, channel, day)) WITHOUT ROWID;
        CREATE TABLE thinned(block_id INTEGER PRIMARY KEY, removed_at INTEGER NOT NULL, digest BLOB NOT NULL);
        INSERT INTO state(name, value) VALUES ('hourly_through', 0);
        """;

    /// <summary>What leads from each version to the next; an older file is brought up in one transaction.</summary>
    private static readonly string[] Steps = [VersionOne, VersionTwo];

    public override string Location => path;

    public override DbConnection OpenWriter()
    {
        SqliteConnection connection = Open(SqliteOpenMode.ReadWriteCreate);
        try
        {
            // Measured: 4096 costs a quarter more on the small blocks of slow sources, 1024 and 8192 are larger for every source.
            Execute(connection, "PRAGMA page_size = 2048");
            Execute(connection, "PRAGMA auto_vacuum = INCREMENTAL");
            Execute(connection, "PRAGMA journal_mode = WAL");
            Execute(connection, "PRAGMA synchronous = FULL");
            Execute(connection, "PRAGMA wal_autocheckpoint = 2000");
            Execute(connection, "PRAGMA journal_size_limit = 67108864");
            Migrate(connection);
            onWriterOpened?.Invoke(connection);
            return connection;
        }
        catch
        {
            connection.Dispose();
            throw;
        }
    }

    public override DbConnection OpenReader() => Open(SqliteOpenMode.ReadOnly);

    public override bool SaysDamaged(DbException error) => error is SqliteException { SqliteErrorCode: Corrupt or NotADatabase };

    public override bool ReleaseSpace(StoreConnection connection)
    {
        if (connection.Number(null, "PRAGMA freelist_count") <= FreePagesKept)
        {
            return false;
        }

        connection.Execute(null, ReleasePages);
        return true;
    }

    public override string SetWholeAside(string stamp)
    {
        string target = $"{path}.set-aside-{stamp}";
        foreach (string suffix in (string[])["", "-wal", "-shm"])
        {
            if (File.Exists(path + suffix))
            {
                File.Move(path + suffix, target + suffix);
            }
        }

        return target;
    }

    private static void Migrate(SqliteConnection connection)
    {
        using SqliteCommand version = connection.CreateCommand();
        version.CommandText = "PRAGMA user_version";
        long found = (long)version.ExecuteScalar()!;
        if (found > SchemaVersion)
        {
            throw new StoreUnavailableException($"The readings are in version {found} of the format; this program knows {SchemaVersion}. Run the newer program.");
        }

        if (found < SchemaVersion)
        {
            using SqliteTransaction transaction = connection.BeginTransaction(deferred: false);
            foreach (string step in Steps.AsSpan((int)found))
            {
                Execute(connection, step);
            }

            Execute(connection, string.Create(CultureInfo.InvariantCulture, $"PRAGMA user_version = {SchemaVersion}"));
            transaction.Commit();
        }
    }

    private static void Execute(SqliteConnection connection, string sql)
    {
        using SqliteCommand command = connection.CreateCommand();
        command.CommandText = sql;
        command.ExecuteNonQuery();
    }

    private SqliteConnection Open(SqliteOpenMode mode)
    {
        SqliteConnection connection = new(new SqliteConnectionStringBuilder
        {
            DataSource = path,
            Mode = mode,
            Pooling = false,
            DefaultTimeout = 1,
        }.ToString());
        connection.Open();
        return connection;
    }
}
