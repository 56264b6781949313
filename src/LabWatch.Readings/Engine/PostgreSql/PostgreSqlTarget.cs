using System.Buffers.Binary;
using System.Security.Cryptography;
using System.Text;
using Npgsql;

namespace LabWatch.Readings.Engine.PostgreSql;

/// <summary>Which schema of which database, and how it is reached.</summary>
internal sealed class PostgreSqlTarget
{
    private readonly string _connectionString;
    private readonly Func<string?> _readPassword;

    /// <summary>Takes over the options; the password is read when it is needed.</summary>
    public PostgreSqlTarget(PostgreSqlReadingsOptions options, Func<string?> readPassword)
    {
        NpgsqlConnectionStringBuilder builder = new(options.ConnectionString);
        _connectionString = builder.ConnectionString;
        _readPassword = readPassword;
        Schema = options.Schema;
        Location = $"PostgreSQL {builder.Host}:{builder.Port}/{builder.Database}, schema {options.Schema}";
    }

    public string Schema { get; }

    /// <summary>Where it is, for messages: without user and password.</summary>
    public string Location { get; }

    /// <summary>Number of the lock that the writer of this schema holds; locks are counted by database.</summary>
    public long LockKey => Number($"labwatch-readings/{Schema}");

    /// <summary>Number of the lock under which the tables of the quarantine are made.</summary>
    public long QuarantineLockKey => Number($"labwatch-quarantine/{Schema}");

    /// <summary>Name of the commit mark in the data directory: another database has another mark.</summary>
    public string MarkName => $"readings-postgresql-{unchecked((ulong)Number(Location)):x16}.mark";

    /// <summary>
    /// Connection string of one kind of connection: not pooled, because the lock lives as long as its connection. Throws
    /// <see cref="StoreUnavailableException"/> where the password is not found.
    /// </summary>
    public string Builder(string applicationName)
    {
        NpgsqlConnectionStringBuilder builder = new(_connectionString)
        {
            ApplicationName = applicationName,
            SearchPath = Schema,
            Pooling = false,
            Enlist = false,
            IncludeErrorDetail = false,
            MaxAutoPrepare = 64,
            AutoPrepareMinUsages = 2,
            CancellationTimeout = 1000,
        };
        builder.Password = _readPassword() ?? builder.Password;
        builder.Timeout = builder.ContainsKey("Timeout") ? builder.Timeout : 5;
        builder.CommandTimeout = builder.ContainsKey("Command Timeout") ? builder.CommandTimeout : 10;
        return builder.ConnectionString;
    }

    private static long Number(string text) => BinaryPrimitives.ReadInt64LittleEndian(SHA256.HashData(Encoding.UTF8.GetBytes(text)));
}
