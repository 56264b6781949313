using Microsoft.Extensions.Logging;

namespace LabWatch.Alerts.Journal;

/// <summary>
/// Writes the journal on a thread of its own, so that a disk that stalls or fails holds a hazard up for no longer than a set patience.
/// What could not be written stays in memory, in order, and goes with the next write.
/// </summary>
internal sealed class JournalWriter : IDisposable
{
    private readonly IAlertJournal _journal;
    private readonly TimeSpan _patience;
    private readonly ILogger _logger;
    private readonly Lock _gate = new();
    private readonly AutoResetEvent _work = new(initialState: false);
    private readonly ManualResetEventSlim _idle = new(initialState: true);
    private readonly Thread _thread;
    private List<JournalEntry> _waiting = [];
    private IReadOnlyList<JournalEntry>? _rewrite;
    private int _generation;
    private volatile bool _stopping;
    private volatile bool _failing;

    public JournalWriter(IAlertJournal journal, TimeSpan patience, ILogger<JournalWriter> logger)
    {
        _journal = journal;
        _patience = patience;
        _logger = logger;
        _thread = new Thread(Run) { IsBackground = true, Name = "labwatch alert journal" };
        _thread.Start();
    }

    /// <summary>Bytes of the journal at rest.</summary>
    public long Length => _journal.Length;

    /// <summary>Whether the last write failed.</summary>
    public bool Failing => _failing;

    /// <summary>Writes entries; true when they are durable, false where that takes longer than the patience: they will be, later.</summary>
    public bool Write(IReadOnlyList<JournalEntry> entries)
    {
        lock (_gate)
        {
            _waiting.AddRange(entries);
            _idle.Reset();
        }

        _work.Set();
        bool done = _idle.Wait(_patience) && !_failing;
        if (!done && !_failing)
        {
            Log.JournalSlow(_logger, _patience);
        }

        return done;
    }

    /// <summary>Replaces the journal, together with the next write.</summary>
    public void Rewrite(IReadOnlyList<JournalEntry> snapshot)
    {
        lock (_gate)
        {
            _waiting = [];
            _rewrite = snapshot;
            _generation++;
            _idle.Reset();
        }

        _work.Set();
    }

    /// <inheritdoc/>
    public void Dispose()
    {
        _stopping = true;
        _work.Set();
        _thread.Join(TimeSpan.FromSeconds(5));
        _work.Dispose();
        _idle.Dispose();
    }

    private void Run()
    {
        bool again = true;
        while (again)
        {
            _work.WaitOne(TimeSpan.FromSeconds(1));
            again = !_stopping;
            WriteWaiting();
        }
    }

    private void WriteWaiting()
    {
        (List<JournalEntry> entries, IReadOnlyList<JournalEntry>? rewrite, int generation) = Take();
        try
        {
            if (rewrite is not null)
            {
                _journal.Rewrite(rewrite);
                rewrite = null;
            }

            if (entries.Count > 0)
            {
                _journal.Append(entries);
            }

            _failing = false;
        }
        catch (Exception exception)
        {
            // A full or broken disk must not end the thread: everything stays waiting and is tried again within a second.
            _failing = true;
            PutBack(entries, rewrite, generation);
            Log.JournalFailed(_logger, exception);
        }

        SayWhenIdle();
    }

    private (List<JournalEntry> Entries, IReadOnlyList<JournalEntry>? Rewrite, int Generation) Take()
    {
        lock (_gate)
        {
            (List<JournalEntry>, IReadOnlyList<JournalEntry>?, int) taken = (_waiting, _rewrite, _generation);
            _waiting = [];
            _rewrite = null;
            return taken;
        }
    }

    // What a newer snapshot holds anyway is not put back.
    private void PutBack(List<JournalEntry> entries, IReadOnlyList<JournalEntry>? rewrite, int generation)
    {
        lock (_gate)
        {
            if (generation == _generation)
            {
                _waiting.InsertRange(0, entries);
                _rewrite = rewrite;
            }
        }
    }

    private void SayWhenIdle()
    {
        lock (_gate)
        {
            bool idle = _waiting.Count == 0 && _rewrite is null;
            if (idle || _failing)
            {
                _idle.Set();
            }
            else
            {
                _work.Set();
            }
        }
    }
}
