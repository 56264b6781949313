using LabWatch.Lab.Assessments;
using LabWatch.Lab.Findings;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Time;
using LabWatch.Readings.Engine;
using LabWatch.Readings.Engine.Sqlite;
using Microsoft.Data.Sqlite;
using Microsoft.Extensions.Logging;

namespace LabWatch.Readings;

/// <summary>
/// Readings in a SQLite file: every commit is forced to the disk, hours that are over lie in sealed blocks. One process owns the file;
/// others may read it. Opens on first use, so that a start does not depend on the disk.
/// </summary>
public sealed class SqliteReadingStore : IReadingStore, IReadingSealer, IReadingStoreHealth, IReadingIntegrity
{
    /// <summary>Name of the database in the data directory.</summary>
    public const string FileName = "readings.db";

    private readonly BlockReadingStore _engine;

    /// <summary>Makes the store; nothing is opened yet.</summary>
    /// <param name="options">Where and how; validate them first.</param>
    /// <param name="clock">The clock.</param>
    /// <param name="log">The log.</param>
    public SqliteReadingStore(ReadingsOptions options, TimeProvider clock, ILogger<SqliteReadingStore> log)
        : this(options, clock, log, null)
    {
    }

    internal SqliteReadingStore(ReadingsOptions options, TimeProvider clock, ILogger<SqliteReadingStore> log, Action<SqliteConnection>? onWriterOpened)
    {
        ArgumentNullException.ThrowIfNull(options);
        string path = Path.Combine(Path.GetFullPath(options.DataDirectory), FileName);
        _engine = new BlockReadingStore(new SqliteDialect(path, onWriterOpened), Path.ChangeExtension(path, ".mark"), options, clock, log);
    }

    /// <inheritdoc/>
    public IReadOnlyList<Finding> Findings => _engine.Findings;

    /// <inheritdoc/>
    public string? Trouble => _engine.Trouble;

    /// <inheritdoc/>
    public bool NeedsSealing => _engine.NeedsSealing;

    /// <inheritdoc/>
    public ValueTask OpenAsync(CancellationToken cancellationToken) => _engine.OpenAsync(cancellationToken);

    /// <inheritdoc/>
    public ValueTask<AppendResult> AppendAsync(IReadOnlyList<ReadingPack> packs, CancellationToken cancellationToken) => _engine.AppendAsync(packs, cancellationToken);

    /// <inheritdoc/>
    public ValueTask<ReadingWindow> ReadAsync(SourceKey source, IReadOnlyCollection<string>? channels, TimeWindow window, CancellationToken cancellationToken) =>
        _engine.ReadAsync(source, channels, window, cancellationToken);

    /// <inheritdoc/>
    public ValueTask<IReadOnlyList<ReadingSummary>> ReduceAsync(ChannelKey channel, TimeWindow window, TimeSpan bucket, CancellationToken cancellationToken) =>
        _engine.ReduceAsync(channel, window, bucket, cancellationToken);

    /// <inheritdoc/>
    public ValueTask<IReadOnlyList<Reading>> NewestAsync(SourceKey source, CancellationToken cancellationToken) => _engine.NewestAsync(source, cancellationToken);

    /// <inheritdoc/>
    public ValueTask<IReadOnlyList<SourceHourRead>> HoursAsync(SourceKey source, TimeWindow window, CancellationToken cancellationToken) =>
        _engine.HoursAsync(source, window, cancellationToken);

    /// <inheritdoc/>
    public ValueTask<ChangedHours> ChangesAsync(long afterChange, CancellationToken cancellationToken) => _engine.ChangesAsync(afterChange, cancellationToken);

    /// <inheritdoc/>
    public ValueTask<IReadOnlyList<SealedHour>> SealedHoursAsync(long afterSeal, int count, CancellationToken cancellationToken) =>
        _engine.SealedHoursAsync(afterSeal, count, cancellationToken);

    /// <inheritdoc/>
    public ValueTask<IntegrityBatch> CheckSealedAsync(long afterSeal, int count, CancellationToken cancellationToken) =>
        _engine.CheckSealedAsync(afterSeal, count, cancellationToken);

    /// <inheritdoc/>
    public Task<int> SealDueAsync(CancellationToken cancellationToken) => _engine.SealDueAsync(cancellationToken);

    /// <inheritdoc/>
    public Task<int> SealEverythingAsync(CancellationToken cancellationToken) => _engine.SealEverythingAsync(cancellationToken);

    /// <inheritdoc/>
    public ValueTask DisposeAsync() => _engine.DisposeAsync();
}
