using LabWatch.Alerts.Journal;
using LabWatch.Lab.Alerts;
using LabWatch.Lab.Time;
using LabWatch.Records.Alerts;
using Microsoft.Extensions.Logging;

namespace LabWatch.Alerts.Desk;

/// <summary>
/// The one owner of the open alerts. Takes work in batches, makes the steps durable, then tells notifiers, ledger and pages. Its thread
/// (<see cref="DeskThread"/>) is the only one that calls <see cref="Pump"/>.
/// </summary>
internal sealed class AlertDesk
{
    private const int ClosedKept = 1000;

    private readonly DeskQueue _queue;
    private readonly DeskReducer _reducer;
    private readonly IEntryWriter _writer;
    private readonly IReadOnlyList<IEntryListener> _listeners;
    private readonly TimeProvider _clock;
    private readonly ILogger _logger;
    private readonly Dictionary<Guid, Alert> _closed = [];
    private readonly Queue<Guid> _closedOrder = [];
    private volatile AlertBoardView _view;

    public AlertDesk(
        DeskQueue queue, DeskReducer reducer, IEntryWriter writer, IReadOnlyList<IEntryListener> listeners, TimeProvider clock, ILogger<AlertDesk> logger)
    {
        _queue = queue;
        _reducer = reducer;
        _writer = writer;
        _listeners = listeners;
        _clock = clock;
        _logger = logger;
        _view = ViewOf(0);
    }

    /// <summary>Raised for each step, in order, after it is durable.</summary>
    public event EventHandler<AlertBoardChange>? Changed;

    /// <summary>The open alerts after the last batch.</summary>
    public AlertBoardView View => _view;

    /// <summary>The messages that are neither sent nor given up, after the last batch.</summary>
    public IReadOnlyList<OutboxMessage> Pending { get; private set; } = [];

    /// <summary>Does one batch of work; false where there was none.</summary>
    public bool Pump()
    {
        IReadOnlyList<DeskWork> batch = _queue.Take();
        if (batch.Count == 0)
        {
            return false;
        }

        List<JournalEntry> entries = [];
        _reducer.Expect(batch, Instant.Now(_clock));
        foreach (DeskWork work in batch)
        {
            Do(work, entries);
        }

        if (entries.Count > 0)
        {
            _writer.Write(entries, _reducer.State);
            Publish(entries);
        }

        Answer(batch);
        return true;
    }

    private void Do(DeskWork work, List<JournalEntry> entries)
    {
        try
        {
            entries.AddRange(_reducer.Do(work, Instant.Now(_clock)));
        }
        catch (Exception exception)
        {
            // A defect in one piece of work must not end the desk; that piece is lost, and said so.
            Log.WorkFailed(_logger, exception);
        }
    }

    private void Publish(List<JournalEntry> entries)
    {
        List<AlertTransition> steps = [.. entries.Where(entry => entry.Transition is not null).Select(entry => entry.Transition!)];
        long first = _view.Sequence + 1;
        foreach (AlertTransition step in steps.Where(step => step.Alert.State == AlertState.Normal))
        {
            KeepClosed(step.Alert);
        }

        Pending = [.. _reducer.State.Pending.Values];
        _view = ViewOf(_view.Sequence + steps.Count);
        foreach (IEntryListener listener in _listeners)
        {
            listener.OnEntries(entries);
        }

        for (int i = 0; i < steps.Count; i++)
        {
            Changed?.Invoke(this, new AlertBoardChange(first + i, steps[i]));
        }
    }

    private void Answer(IReadOnlyList<DeskWork> batch)
    {
        foreach (DeskWork work in batch)
        {
            if (work is DeskWork.Asked asked)
            {
                asked.Answer.TrySetResult(_reducer.State.Open.GetValueOrDefault(asked.Id)?.Alert ?? _closed.GetValueOrDefault(asked.Id));
            }
            else if (work is DeskWork.Barrier barrier)
            {
                barrier.Answer.TrySetResult();
            }
        }
    }

    private AlertBoardView ViewOf(long sequence) =>
        new(sequence, [.. _reducer.State.Open.Values.Select(last => last.Alert).OrderByDescending(alert => alert.RaisedAt).ThenByDescending(alert => alert.Id)]);

    private void KeepClosed(Alert alert)
    {
        _closed[alert.Id] = alert;
        _closedOrder.Enqueue(alert.Id);
        if (_closedOrder.Count > ClosedKept)
        {
            _closed.Remove(_closedOrder.Dequeue());
        }
    }
}
