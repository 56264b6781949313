using System.Data.Common;
using LabWatch.Lab.Assessments;
using LabWatch.Lab.Findings;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Time;
using LabWatch.Readings.Head;
using Microsoft.Extensions.Logging;

namespace LabWatch.Readings.Engine;

/// <summary>
/// The engine of sealed source-hours over a database: commits go to a journal and to memory, hours that are over are sealed by
/// <see cref="SealDueAsync"/> beside them, reads take both. Opens on first use.
/// </summary>
internal sealed class BlockReadingStore : IReadingStore, IReadingSealer, IReadingStoreHealth, IReadingIntegrity
{
    private readonly ReadingsOptions _options;
    private readonly StoreDialect _dialect;
    private readonly TimeProvider _clock;
    private readonly HeadState _head = new();
    private readonly SemaphoreSlim _writing = new(1, 1);
    private readonly StoreSession _session;
    private readonly Sealer _sealer;
    private readonly ReaderPool _readers;
    private readonly StoreIncidents _incidents;
    private readonly WindowReader _windows;
    private readonly Reducer _reducer;
    private readonly HourLister _hours;
    private CommitStage? _stage;
    private StoreWriter? _stageWriter;
    private int _disposed;

    public BlockReadingStore(StoreDialect dialect, string markPath, ReadingsOptions options, TimeProvider clock, ILogger log)
    {
        _options = options;
        _dialect = dialect;
        _clock = clock;
        _incidents = new StoreIncidents(dialect.Location, clock, log);
        _session = new StoreSession(dialect, markPath, _head, _incidents, clock, log);
        _sealer = new Sealer(_session, _writing, _head, _incidents, options, clock, log);
        _readers = new ReaderPool(dialect);
        _windows = new WindowReader(dialect, _head, _readers, _incidents);
        _reducer = new Reducer(_head, _readers, _incidents, _windows);
        _hours = new HourLister(_head, _readers, _incidents);
    }

    /// <summary>What was found damaged or missing.</summary>
    public IReadOnlyList<Finding> Findings => _incidents.Findings;

    /// <summary>Why the last attempt to write failed; null where it worked.</summary>
    public string? Trouble => _session.Trouble;

    /// <summary>Whether so much is unsealed that sealing should not wait for its next turn.</summary>
    public bool NeedsSealing => _head.Unsealed > _options.UnsealedReadingsLimit || _session.JournalBytes > _options.JournalBytesLimit;

    public async ValueTask<AppendResult> AppendAsync(IReadOnlyList<ReadingPack> packs, CancellationToken cancellationToken)
    {
        ArgumentNullException.ThrowIfNull(packs);
        if (_head.Unsealed > 2L * _options.UnsealedReadingsLimit)
        {
            await SealDueAsync(cancellationToken);
        }

        await _writing.WaitAsync(cancellationToken);
        try
        {
            // On a thread of its own: a caller may stop waiting for a slow disk, the commit still ends one way or the other.
            return await Task.Run(() => _session.Use(writer => Append(writer, packs)), CancellationToken.None);
        }
        finally
        {
            _writing.Release();
        }
    }

    /// <summary>Opens the store if it is not open yet.</summary>
    public async ValueTask OpenAsync(CancellationToken cancellationToken)
    {
        if (_session.IsReady)
        {
            return;
        }

        await _writing.WaitAsync(cancellationToken);
        try
        {
            await Task.Run(() => _session.Use(_ => 0), CancellationToken.None);
        }
        finally
        {
            _writing.Release();
        }
    }

    /// <inheritdoc/>
    public ValueTask<IntegrityBatch> CheckSealedAsync(long afterSeal, int count, CancellationToken cancellationToken) =>
        ReadAsync(() => new IntegrityCheck(_readers, _incidents).Run(afterSeal, count, cancellationToken), cancellationToken);

    public Task<int> SealDueAsync(CancellationToken cancellationToken) => Task.Run(() => _sealer.PassAsync(everything: false, cancellationToken), cancellationToken);

    public Task<int> SealEverythingAsync(CancellationToken cancellationToken) => Task.Run(() => _sealer.PassAsync(everything: true, cancellationToken), cancellationToken);

    public ValueTask<ReadingWindow> ReadAsync(SourceKey source, IReadOnlyCollection<string>? channels, TimeWindow window, CancellationToken cancellationToken) =>
        ReadAsync(() => _windows.Read(source, channels, window, cancellationToken), cancellationToken);

    public ValueTask<IReadOnlyList<ReadingSummary>> ReduceAsync(ChannelKey channel, TimeWindow window, TimeSpan bucket, CancellationToken cancellationToken) =>
        ReadAsync(() => _reducer.Reduce(channel, window, bucket, cancellationToken), cancellationToken);

    public ValueTask<IReadOnlyList<Reading>> NewestAsync(SourceKey source, CancellationToken cancellationToken) =>
        ReadAsync(() => Newest(source), cancellationToken);

    public ValueTask<IReadOnlyList<SourceHourRead>> HoursAsync(SourceKey source, TimeWindow window, CancellationToken cancellationToken) =>
        ReadAsync(() => _hours.Hours(source, window), cancellationToken);

    public ValueTask<ChangedHours> ChangesAsync(long afterChange, CancellationToken cancellationToken) =>
        ReadAsync(() => _hours.Changes(afterChange), cancellationToken);

    public ValueTask<IReadOnlyList<SealedHour>> SealedHoursAsync(long afterSeal, int count, CancellationToken cancellationToken) =>
        ReadAsync(() => _hours.Sealed(afterSeal, count), cancellationToken);

    public async ValueTask DisposeAsync()
    {
        if (Interlocked.Exchange(ref _disposed, 1) != 0)
        {
            return;
        }

        await _sealer.DisposeAsync();
        await _writing.WaitAsync();
        _readers.Dispose();
        _session.Dispose();
        _dialect.Close();
        _writing.Dispose();
    }

    private AppendResult Append(StoreWriter writer, IReadOnlyList<ReadingPack> packs)
    {
        long started = _clock.GetTimestamp();
        if (!ReferenceEquals(_stageWriter, writer))
        {
            _stage = new CommitStage(_head, writer);
            _stageWriter = writer;
        }

        CommitStage stage = _stage!;
        try
        {
            stage.Stage(packs);
            if (stage.Accepted > 0)
            {
                Commit(writer, stage);
            }
        }
        catch
        {
            stage.Rollback();
            throw;
        }

        AppendResult result = new(stage.Accepted, stage.Duplicates, stage.Conflicts);
        ReadingsMetrics.OnAppended(result.Accepted, result.Duplicates, result.Conflicts.Count, _clock.GetElapsedTime(started));
        return result;
    }

    private void Commit(StoreWriter writer, CommitStage stage)
    {
        long change = _head.Change + 1;
        byte[] row = stage.FinishRow(change);
        writer.Append(change, row, stage);
        stage.Publish(change, _clock.GetTimestamp());
        _head.Unsealed += stage.Accepted;
        _session.OnCommitted(change, row.Length);
    }

    private IReadOnlyList<Reading> Newest(SourceKey key)
    {
        lock (_head.Sync)
        {
            return _head.Find(key) is { } source
                ? [.. source.Channels.Where(one => one.Newest is not null).Select(one => one.Newest!.Value).OrderBy(one => one.Channel, StringComparer.Ordinal)]
                : [];
        }
    }

    private async ValueTask<T> ReadAsync<T>(Func<T> read, CancellationToken cancellationToken)
    {
        await OpenAsync(cancellationToken);
        cancellationToken.ThrowIfCancellationRequested();
        try
        {
            return read();
        }
        catch (Exception error) when (error is DbException or TimeoutException)
        {
            throw new StoreUnavailableException($"The readings cannot be read: {error.Message}", error);
        }
    }
}
