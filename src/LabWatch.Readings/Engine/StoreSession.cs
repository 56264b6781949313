using System.Data.Common;
using LabWatch.Readings.Blocks;
using LabWatch.Readings.Head;
using LabWatch.Readings.Journal;
using Microsoft.Extensions.Logging;

namespace LabWatch.Readings.Engine;

/// <summary>
/// The writing side while it works: opens on first use, closes on every failure, opens again and takes over what became durable although
/// its commit reported a failure. Used by one caller at a time.
/// </summary>
internal sealed class StoreSession(
    StoreDialect dialect, string markPath, HeadState head, StoreIncidents incidents, TimeProvider clock, ILogger log) : IDisposable
{
    private CommitMark? _mark;
    private StoreWriter? _writer;
    private bool _disposed;
    private volatile string? _trouble;

    /// <summary>Bytes of journal rows, as far as known.</summary>
    public long JournalBytes { get; private set; }

    /// <summary>Whether the head has been built once: reads can be answered even while writing fails.</summary>
    public bool IsReady { get; private set; }

    /// <summary>Why the last attempt to write failed; null where it worked.</summary>
    public string? Trouble => _trouble;

    /// <summary>Runs something on the writer. Throws <see cref="StoreUnavailableException"/> where the database or a file fails.</summary>
    public T Use<T>(Func<StoreWriter, T> action)
    {
        ObjectDisposedException.ThrowIf(_disposed, this);
        try
        {
            return action(_writer ??= Open());
        }
        catch (Exception error) when (error is DbException or IOException or UnauthorizedAccessException or DamagedDataException or TimeoutException)
        {
            Close();
            _trouble = error.Message;
            if (error is StoreUnavailableException)
            {
                throw;
            }

            ReadingsLog.Unavailable(log, error.Message, error);
            throw new StoreUnavailableException($"The readings in {dialect.Location} cannot be written: {error.Message}", error);
        }
    }

    /// <summary>Notes that a commit is durable.</summary>
    public void OnCommitted(long change, int bytes)
    {
        SetJournalBytes(JournalBytes + bytes);
        _trouble = null;
        try
        {
            _mark?.Write(change);
        }
        catch (IOException error)
        {
            // The commit itself is durable; an old mark only notices less.
            ReadingsLog.MarkFailed(log, error);
        }
    }

    /// <summary>After a failure: writes what changes nothing, to learn whether writing works again although no reading comes.</summary>
    public void Probe(StoreWriter writer)
    {
        if (_trouble is not null)
        {
            writer.Connection.Execute(null, StoreDialect.Touch);
            _trouble = null;
        }
    }

    /// <summary>Measures the journal again after rows were dropped.</summary>
    public void MeasureJournal(StoreWriter writer) => SetJournalBytes(writer.Connection.Number(null, StoreDialect.JournalBytes));

    public void Dispose()
    {
        _disposed = true;
        Close();
        _mark?.Dispose();
    }

    private void Close()
    {
        _writer?.Dispose();
        _writer = null;
    }

    private void SetJournalBytes(long bytes)
    {
        ReadingsMetrics.OnJournal(bytes - JournalBytes);
        JournalBytes = bytes;
    }

    private StoreWriter Open()
    {
        _mark ??= TakeMark();
        try
        {
            return OpenAndRecover(_mark);
        }
        catch (Exception error) when (!IsReady && (error is DamagedDataException || (error is DbException database && dialect.SaysDamaged(database))))
        {
            SetWholeAside(error);
            return OpenAndRecover(_mark);
        }
    }

    private StoreWriter OpenAndRecover(CommitMark mark)
    {
        StoreWriter writer = new(dialect, new StoreConnection(dialect.OpenWriter()), incidents);
        try
        {
            long started = clock.GetTimestamp();
            Recovery recovery = new(dialect, writer, head, incidents, clock);
            recovery.Run(head.Change, mark.Last);
            Report(recovery, clock.GetElapsedTime(started));
            lock (head.Sync)
            {
                head.Change = Math.Max(head.Change, recovery.Last);
            }

            head.Unsealed += recovery.Readings;
            ReadingsMetrics.OnRecovered(recovery.Readings);
            MeasureJournal(writer);
            incidents.Persist(writer.Connection);
            IsReady = true;
            return writer;
        }
        catch
        {
            writer.Dispose();
            throw;
        }
    }

    private void SetWholeAside(Exception error)
    {
        string stamp = clock.GetUtcNow().ToString("yyyyMMdd'T'HHmmss'Z'", System.Globalization.CultureInfo.InvariantCulture);
        string target = dialect.SetWholeAside(stamp);
        head.Clear();
        ReadingsLog.WholeSetAside(log, target, error);
        incidents.Report(StoreIncidents.FileKind, clock.GetUtcNow().ToUnixTimeSeconds(), $"The store could not be opened ({error.Message}) and was moved to {target}.");
    }

    private void Report(Recovery recovery, TimeSpan elapsed)
    {
        if (!IsReady)
        {
            ReadingsLog.Opened(log, dialect.Location, recovery.Last, recovery.Rows, recovery.Readings, elapsed.TotalMilliseconds);
        }
        else if (recovery.Rows > 0)
        {
            ReadingsLog.FoundDurable(log, recovery.Rows);
        }
    }

    private CommitMark TakeMark()
    {
        try
        {
            Directory.CreateDirectory(Path.GetDirectoryName(markPath)!);
            return new CommitMark(markPath);
        }
        catch (IOException error)
        {
            throw new StoreUnavailableException(
                $"The readings are in use by another process, or {markPath} cannot be written: {error.Message} Stop the other process or choose another data directory.",
                error);
        }
    }
}
