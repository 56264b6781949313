using LabWatch.Lab.Assessments;
using LabWatch.Lab.Findings;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Time;
using LabWatch.Readings.Quarantine;
using Microsoft.Extensions.Logging;

namespace LabWatch.Readings.Influx;

/// <summary>
/// Readings in InfluxDB. The hours that readings come for are in memory, so that the first value stays and repeats cost nothing; a commit
/// is one request where it fits, and the state of each hour travels with its readings. Opens on first use.
/// </summary>
internal sealed class InfluxReadingStore : IReadingStore, IReadingSealer, IReadingStoreHealth
{
    private const int SupplementPatience = 5;

    private readonly ReadingsOptions _options;
    private readonly TimeProvider _clock;
    private readonly ILogger _log;
    private readonly SemaphoreSlim _writing = new(1, 1);
    private readonly InfluxConnection _connection;
    private readonly InfluxQueries _queries;
    private readonly InfluxHead _head;
    private readonly InfluxSealer _sealer;
    private readonly InfluxSession _session;
    private readonly InfluxBatchWriter _batches;
    private readonly InfluxDeadLetters _deadLetters;
    private readonly InfluxReader _reader;
    private readonly Dictionary<(SourceKey, long), long> _changes = [];
    private volatile string? _trouble;
    private int _disposed;

    public InfluxReadingStore(ReadingsOptions options, IQuarantine quarantine, TimeProvider clock, ILogger log)
    {
        _options = options;
        _clock = clock;
        _log = log;
        ReadingsSecrets secrets = new(options.SecretsDirectory);
        _connection = new InfluxConnection(options.InfluxDb, () => secrets.Read(options.InfluxDb.TokenSecret));
        _queries = new InfluxQueries(_connection);
        _head = new InfluxHead(_queries, options.UnsealedReadingsLimit, clock);
        _sealer = new InfluxSealer(_connection, _queries, _head, clock);
        _session = new InfluxSession(options.InfluxDb, Path.GetFullPath(options.DataDirectory), _connection, _queries, _sealer, clock);
        _batches = new InfluxBatchWriter(_connection, options.InfluxDb.BatchPoints);
        _deadLetters = new InfluxDeadLetters(quarantine);
        _reader = new InfluxReader(_queries, _head);
    }

    /// <inheritdoc/>
    public IReadOnlyList<Finding> Findings => _session.Findings;

    /// <inheritdoc/>
    public string? Trouble => _trouble;

    /// <summary>Never: what is not sealed lies in the database, not in memory.</summary>
    public bool NeedsSealing => false;

    /// <inheritdoc/>
    public async ValueTask OpenAsync(CancellationToken cancellationToken)
    {
        if (!_session.IsReady)
        {
            await AloneAsync(() => Task.FromResult(0), cancellationToken);
        }
    }

    /// <inheritdoc/>
    public async ValueTask<AppendResult> AppendAsync(IReadOnlyList<ReadingPack> packs, CancellationToken cancellationToken)
    {
        ArgumentNullException.ThrowIfNull(packs);
        long started = _clock.GetTimestamp();

        // A caller may stop waiting for a slow server; the commit still ends one way or the other.
        AppendResult result = await Task.Run(() => AloneAsync(() => AppendAsync(packs), cancellationToken), CancellationToken.None);
        ReadingsMetrics.OnAppended(result.Accepted, result.Duplicates, result.Conflicts.Count, _clock.GetElapsedTime(started));
        return result;
    }

    /// <inheritdoc/>
    public async ValueTask<ReadingWindow> ReadAsync(SourceKey source, IReadOnlyCollection<string>? channels, TimeWindow window, CancellationToken cancellationToken)
    {
        await OpenAsync(cancellationToken);
        return await _reader.ReadAsync(source, channels, window, cancellationToken);
    }

    /// <inheritdoc/>
    public async ValueTask<IReadOnlyList<ReadingSummary>> ReduceAsync(ChannelKey channel, TimeWindow window, TimeSpan bucket, CancellationToken cancellationToken)
    {
        long step = bucket.Ticks / TimeSpan.TicksPerMicrosecond;
        ArgumentOutOfRangeException.ThrowIfNegativeOrZero(step, nameof(bucket));
        await OpenAsync(cancellationToken);
        return window.End <= window.Start ? [] : await _queries.ReduceAsync(channel, window, step, cancellationToken);
    }

    /// <inheritdoc/>
    public async ValueTask<IReadOnlyList<Reading>> NewestAsync(SourceKey source, CancellationToken cancellationToken)
    {
        await OpenAsync(cancellationToken);
        return await _reader.NewestAsync(source, cancellationToken);
    }

    /// <inheritdoc/>
    public async ValueTask<IReadOnlyList<SourceHourRead>> HoursAsync(SourceKey source, TimeWindow window, CancellationToken cancellationToken)
    {
        await OpenAsync(cancellationToken);
        return await _reader.HoursAsync(source, window, cancellationToken);
    }

    /// <inheritdoc/>
    public async ValueTask<ChangedHours> ChangesAsync(long afterChange, CancellationToken cancellationToken)
    {
        await OpenAsync(cancellationToken);
        long change;
        HashSet<(SourceKey Source, long Hour)> hours;
        lock (_head.Sync)
        {
            change = _session.Change;
            hours = [.. _changes.Where(one => one.Value > afterChange).Select(one => one.Key)];
        }

        if (afterChange < _session.OpenedAt)
        {
            hours.UnionWith(await _queries.ChangedAsync(afterChange, cancellationToken));
        }

        return new ChangedHours(change, [.. hours.OrderBy(one => one.Hour).Select(one => (one.Source, new Instant(one.Hour)))]);
    }

    /// <inheritdoc/>
    public async ValueTask<IReadOnlyList<SealedHour>> SealedHoursAsync(long afterSeal, int count, CancellationToken cancellationToken)
    {
        ArgumentOutOfRangeException.ThrowIfNegativeOrZero(count);
        await OpenAsync(cancellationToken);
        for (long after = afterSeal; after < Math.Max(_sealer.Last, 1); after += count)
        {
            if (await _queries.SealsAsync(after, after + count, cancellationToken) is { Count: > 0 } found)
            {
                return [.. found.Take(count)];
            }
        }

        return [];
    }

    /// <inheritdoc/>
    public Task<int> SealDueAsync(CancellationToken cancellationToken) => SealAsync(everything: false, cancellationToken);

    /// <inheritdoc/>
    public Task<int> SealEverythingAsync(CancellationToken cancellationToken) => SealAsync(everything: true, cancellationToken);

    /// <inheritdoc/>
    public async ValueTask DisposeAsync()
    {
        if (Interlocked.Exchange(ref _disposed, 1) != 0)
        {
            return;
        }

        await _writing.WaitAsync();
        try
        {
            using CancellationTokenSource patience = new(TimeSpan.FromSeconds(2), TimeProvider.System);
            await (_session.Claim?.LeaveAsync(patience.Token) ?? Task.CompletedTask);
        }
        catch (Exception error) when (error is StoreUnavailableException or OperationCanceledException or InfluxRefusedException)
        {
            // The claim runs out by itself.
        }

        _session.Dispose();
        _connection.Dispose();
        _writing.Dispose();
    }

    private async Task<T> AloneAsync<T>(Func<Task<T>> action, CancellationToken cancellationToken)
    {
        ObjectDisposedException.ThrowIf(_disposed != 0, this);
        await _writing.WaitAsync(cancellationToken);
        try
        {
            await _session.OpenAsync(CancellationToken.None);
            return await action();
        }
        catch (StoreUnavailableException error)
        {
            _trouble = error.Message;
            ReadingsLog.Unavailable(_log, error.Message, error);
            throw;
        }
        finally
        {
            _writing.Release();
        }
    }

    private async Task<AppendResult> AppendAsync(IReadOnlyList<ReadingPack> packs)
    {
        HashSet<(string, long)> refused = [];
        List<(InfluxPoint, string)> letters = [];
        int accepted = -1;
        while (true)
        {
            InfluxCommit commit = new(_head);
            try
            {
                await commit.StageAsync(packs, refused, CancellationToken.None);
                letters.AddRange(refused.Count == 0 ? commit.Unholdable.Select(one => (one, "Its time or its channel has no form in the database.")) : []);
                List<(InfluxPoint Point, string Reason)> more = await WriteAsync(commit);
                if (more.Count == 0)
                {
                    await KeepAsync(letters);
                    Publish(commit);
                    return accepted < 0
                        ? new AppendResult(commit.Accepted, commit.Duplicates, commit.Conflicts)
                        : new AppendResult(accepted - refused.Count, commit.Duplicates - (accepted - refused.Count - commit.Accepted), commit.Conflicts);
                }

                accepted = accepted < 0 ? commit.Accepted : accepted;
                letters.AddRange(more);
                refused.UnionWith(more.Select(one => (InfluxLines.Channel(one.Point.Pack!.Source, one.Point.Reading.Channel), one.Point.Reading.Time.Microseconds)));
                commit.Rollback();
            }
            catch
            {
                commit.Rollback();
                throw;
            }
        }
    }

    private async Task<List<(InfluxPoint Point, string Reason)>> WriteAsync(InfluxCommit commit)
    {
        if (commit.IsEmpty)
        {
            return [];
        }

        // The number is used up even where the commit fails: part of it may be in the database.
        long change = ++_session.Change;
        IEnumerable<InfluxPoint> points = commit.Points(change);
        return await _batches.WriteAsync(_session.Claim!.Due() is { } claim ? points.Append(new InfluxPoint(null, default, claim)) : points, CancellationToken.None);
    }

    private void Publish(InfluxCommit commit)
    {
        _trouble = null;
        if (commit.IsEmpty)
        {
            return;
        }

        long change = _session.Change;
        foreach ((InfluxSource source, InfluxHour hour) in commit.Publish(change))
        {
            lock (_head.Sync)
            {
                _changes[(source.Key, hour.Hour)] = change;
                _session.Open[(source.Key, hour.Hour)] = _clock.GetTimestamp();
            }
        }

        try
        {
            _session.Claim!.OnCommitted(change);
        }
        catch (IOException error)
        {
            // The commit itself is durable; an old mark only notices less.
            ReadingsLog.MarkFailed(_log, error);
        }
    }

    private async Task KeepAsync(List<(InfluxPoint Point, string Reason)> letters)
    {
        if (letters.Count > 0)
        {
            await _deadLetters.KeepAsync(letters, CancellationToken.None);
            ReadingsLog.RefusedByDatabase(_log, letters.Count, letters[0].Reason);
        }
    }

    private async Task<int> SealAsync(bool everything, CancellationToken cancellationToken)
    {
        await RenewAsync(cancellationToken);
        int parts = 0;
        foreach ((SourceKey source, long hour) in Due(everything))
        {
            cancellationToken.ThrowIfCancellationRequested();
            parts += await AloneAsync(() => SealAsync(source, hour), cancellationToken);
        }

        return parts;
    }

    private async Task<int> SealAsync(SourceKey source, long hour)
    {
        try
        {
            int added = await _sealer.SealAsync(source, hour, CancellationToken.None);
            lock (_head.Sync)
            {
                _session.Open.Remove((source, hour));
            }

            return added > 0 ? 1 : 0;
        }
        catch (StoreUnavailableException)
        {
            // The sealing may be in the database after all: its number and the hour's state are asked for before the next.
            _head.Forget([(_head.Source(source), await _head.LoadAsync(_head.Source(source), hour, CancellationToken.None))]);
            _sealer.Last = (await _queries.StateAsync(CancellationToken.None)).Seal;
            throw;
        }
    }

    private async Task RenewAsync(CancellationToken cancellationToken) => await AloneAsync(
        async () =>
        {
            if (_session.Claim!.Due() is { } line)
            {
                await _connection.WriteAsync([line], CancellationToken.None);
                _trouble = null;
            }

            return 0;
        },
        cancellationToken);

    private List<(SourceKey Source, long Hour)> Due(bool everything)
    {
        long now = Instant.Now(_clock).Microseconds;
        lock (_head.Sync)
        {
            return [.. _session.Open.Where(one => everything || IsDue(one.Key, one.Value, now)).Select(one => one.Key).OrderBy(one => one.Hour)];
        }
    }

    private bool IsDue((SourceKey Source, long Hour) key, long touched, long now)
    {
        bool isSupplement = _head.Source(key.Source).Hours.TryGetValue(key.Hour, out InfluxHour? hour) && hour.SealedReadings > 0;
        return now >= key.Hour + Instant.MicrosecondsPerHour
            && _clock.GetElapsedTime(touched) >= _options.QuietPeriod * (isSupplement ? SupplementPatience : 1);
    }
}
