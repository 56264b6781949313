using System.Data.Common;
using Npgsql;

namespace LabWatch.Readings.Engine.PostgreSql;

/// <summary>
/// The engine in a schema of a PostgreSQL database. The connection that writes holds an advisory lock, so it is the only writer as long
/// as it lives; when it is lost, so is the lock, and the server ends its transaction before anybody else gets it.
/// </summary>
internal sealed class PostgreSqlDialect : StoreDialect
{
    private const string DataCorrupted = "XX001";
    private const string IndexCorrupted = "XX002";

    private readonly PostgreSqlTarget _target;
    private readonly string _name = "labwatch-readings-" + Guid.NewGuid().ToString("N");
    private readonly Lazy<NpgsqlDataSource> _source;

    public PostgreSqlDialect(PostgreSqlTarget target)
    {
        _target = target;
        _source = new Lazy<NpgsqlDataSource>(() => NpgsqlDataSource.Create(target.Builder(_name)), LazyThreadSafetyMode.PublicationOnly);
    }

    public override string Location => _target.Location;

    public override DbConnection OpenWriter()
    {
        EndFormerWriter();
        NpgsqlConnection connection = Open();
        try
        {
            Lock(connection);
            RequireDurableCommits(connection);
            PostgreSqlSchema.Migrate(connection, _target.Schema);
            return connection;
        }
        catch
        {
            connection.Dispose();
            throw;
        }
    }

    public override DbConnection OpenReader() => Open();

    public override bool Answers(StoreConnection connection)
    {
        try
        {
            return connection.Number(null, "SELECT 1") == 1;
        }
        catch (Exception error) when (error is DbException or InvalidOperationException or IOException or TimeoutException)
        {
            return false;
        }
    }

    public override bool SaysDamaged(DbException error) => error is PostgresException { SqlState: DataCorrupted or IndexCorrupted };

    /// <summary>The server's own vacuum makes the space of dropped rows usable again.</summary>
    public override bool ReleaseSpace(StoreConnection connection) => false;

    public override string SetWholeAside(string stamp)
    {
        string target = $"{_target.Schema}_set_aside_{stamp.ToLowerInvariant()}";
        using NpgsqlConnection connection = Open();
        Lock(connection);
        PostgreSqlSchema.Execute(connection, $"ALTER SCHEMA {_target.Schema} RENAME TO {target}");
        return $"{Location}, schema {target}";
    }

    public override void Close()
    {
        if (_source.IsValueCreated)
        {
            _source.Value.Dispose();
        }
    }

    /// <summary>
    /// After a loss of the link the server may still run the last commit of the former connection. It is ended, so that what it did is
    /// settled before the lock is free.
    /// </summary>
    private void EndFormerWriter()
    {
        using NpgsqlConnection connection = Open();
        using NpgsqlCommand end = new(
            "SELECT pg_terminate_backend(l.pid) FROM pg_locks l JOIN pg_stat_activity a ON a.pid = l.pid " +
            "WHERE l.locktype = 'advisory' AND a.application_name = @name AND a.pid <> pg_backend_pid()",
            connection);
        end.Parameters.AddWithValue("name", _name);
        end.ExecuteNonQuery();
    }

    private NpgsqlConnection Open() => _source.Value.OpenConnection();

    private void Lock(NpgsqlConnection connection)
    {
        using NpgsqlCommand command = new("SELECT pg_try_advisory_lock(@key)", connection);
        command.Parameters.AddWithValue("key", _target.LockKey);
        if (command.ExecuteScalar() is not true)
        {
            throw new StoreUnavailableException(
                $"The readings in {Location} are in use by another process. Stop it, or choose another schema (Readings:PostgreSql:Schema).");
        }
    }

    private static void RequireDurableCommits(NpgsqlConnection connection)
    {
        using NpgsqlCommand command = new("SELECT current_setting('synchronous_commit')", connection);
        if ((string)command.ExecuteScalar()! is "off" or "local")
        {
            PostgreSqlSchema.Execute(connection, "SET synchronous_commit = on");
        }

        // A link that is dead without a word is noticed by the server within half a minute, which frees the lock.
        PostgreSqlSchema.Execute(connection, "SET tcp_keepalives_idle = 10; SET tcp_keepalives_interval = 5; SET tcp_keepalives_count = 3");
    }
}
