using LabWatch.Readings.Engine;
using LabWatch.Readings.Engine.Sqlite;
using LabWatch.Readings.Influx;
using LabWatch.Readings.Quarantine;
using Microsoft.Extensions.Logging;

namespace LabWatch.Readings;

/// <summary>One engine put together outside the service, for commands: the store and its quarantine. Nothing is opened yet.</summary>
public sealed class ReadingEngine : IAsyncDisposable
{
    private readonly TableQuarantine _quarantine;

    private ReadingEngine(IReadingStore store, IReadingSealer sealer, IReadingStoreHealth health, TableQuarantine quarantine)
    {
        Store = store;
        Sealer = sealer;
        Health = health;
        _quarantine = quarantine;
    }

    /// <summary>The readings.</summary>
    public IReadingStore Store { get; }

    /// <summary>Seals its hours.</summary>
    public IReadingSealer Sealer { get; }

    /// <summary>How it is.</summary>
    public IReadingStoreHealth Health { get; }

    /// <summary>What was refused.</summary>
    public IQuarantine Quarantine => _quarantine;

    /// <summary>Whether two engines of one data directory keep what was refused in the same place.</summary>
    public static bool ShareQuarantine(ReadingsEngine one, ReadingsEngine other) => one is ReadingsEngine.PostgreSql == other is ReadingsEngine.PostgreSql;

    /// <summary>Puts the engine of the options together.</summary>
    public static ReadingEngine Create(ReadingsOptions options, TimeProvider clock, ILoggerFactory logs)
    {
        ArgumentNullException.ThrowIfNull(options);
        TableQuarantine quarantine = options.Engine is ReadingsEngine.PostgreSql ? PostgreSqlReadingStore.Quarantine(options) : new SqliteQuarantine(options);
        return options.Engine switch
        {
            ReadingsEngine.PostgreSql => Of(PostgreSqlReadingStore.Create(options, clock, logs.CreateLogger<BlockReadingStore>()), quarantine),
            ReadingsEngine.InfluxDb => Of(new InfluxReadingStore(options, quarantine, clock, logs.CreateLogger<InfluxReadingStore>()), quarantine),
            _ => Of(new SqliteReadingStore(options, clock, logs.CreateLogger<SqliteReadingStore>()), quarantine),
        };
    }

    /// <summary>The database of an engine of sealed source-hours; null for another engine.</summary>
    internal static StoreDialect? Dialect(ReadingsOptions options) => options.Engine switch
    {
        ReadingsEngine.Sqlite => new SqliteDialect(Path.Combine(Directory.CreateDirectory(options.DataDirectory).FullName, SqliteReadingStore.FileName)),
        ReadingsEngine.PostgreSql => PostgreSqlReadingStore.Dialect(options),
        _ => null,
    };

    /// <inheritdoc/>
    public async ValueTask DisposeAsync()
    {
        await Store.DisposeAsync();
        _quarantine.Dispose();
    }

    private static ReadingEngine Of<TStore>(TStore store, TableQuarantine quarantine)
        where TStore : IReadingStore, IReadingSealer, IReadingStoreHealth => new(store, store, store, quarantine);
}
