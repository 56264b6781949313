using Microsoft.Data.Sqlite;
using Microsoft.EntityFrameworkCore;

namespace LabWatch.Records.Storage;

/// <summary>Makes contexts for the configured engine.</summary>
internal sealed class RecordsContexts
{
    private readonly Func<RecordsContext> _create;

    public RecordsContexts(RecordsOptions options)
    {
        Options = options;
        _create = options.Provider is RecordsProvider.PostgreSql ? PostgreSql(options) : Sqlite(options);
    }

    public RecordsOptions Options { get; }

    public bool IsSqlite => Options.Provider is RecordsProvider.Sqlite;

    /// <summary>A new context; the caller disposes of it.</summary>
    public RecordsContext Create() => _create();

    /// <summary>The connection string of the SQLite file.</summary>
    public static string SqliteConnection(RecordsOptions options) =>
        new SqliteConnectionStringBuilder
        {
            DataSource = options.FilePath,
            Mode = SqliteOpenMode.ReadWriteCreate,
            Cache = SqliteCacheMode.Private,
            DefaultTimeout = (int)options.BusyTimeout.TotalSeconds,
        }.ToString();

    private static Func<RecordsContext> Sqlite(RecordsOptions options)
    {
        DbContextOptions<SqliteRecordsContext> built = Common(new DbContextOptionsBuilder<SqliteRecordsContext>()
            .UseSqlite(SqliteConnection(options))).Options;
        return () => new SqliteRecordsContext(built);
    }

    private static Func<RecordsContext> PostgreSql(RecordsOptions options)
    {
        DbContextOptions<PostgreSqlRecordsContext> built = Common(new DbContextOptionsBuilder<PostgreSqlRecordsContext>()
            .UseNpgsql(options.ConnectionString, npgsql => npgsql.CommandTimeout((int)options.BusyTimeout.TotalSeconds))).Options;
        return () => new PostgreSqlRecordsContext(built);
    }

    private static DbContextOptionsBuilder<TContext> Common<TContext>(DbContextOptionsBuilder<TContext> builder)
        where TContext : DbContext =>
        builder.EnableThreadSafetyChecks(false);
}
