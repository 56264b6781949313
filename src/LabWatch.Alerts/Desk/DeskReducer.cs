using LabWatch.Alerts.Journal;
using LabWatch.Alerts.LifeCycle;
using LabWatch.Alerts.Outbox;
using LabWatch.Lab.Alerts;
using LabWatch.Lab.Time;
using LabWatch.Records.Alerts;

namespace LabWatch.Alerts.Desk;

/// <summary>Turns work into journal entries and adds them to the state: the whole logic of the desk, without threads, clock or disk.</summary>
/// <param name="state">The state.</param>
/// <param name="notifiers">Whom to tell, at present.</param>
internal sealed class DeskReducer(JournalState state, Func<IReadOnlyList<Notifier>> notifiers)
{
    // What ended while the ledger was being read: its copy of it is out of date.
    private readonly HashSet<Guid> _closed = [];
    private readonly HashSet<string> _settled = new(StringComparer.Ordinal);
    private bool _adopted;

    /// <summary>The state.</summary>
    public JournalState State => state;

    /// <summary>Does one piece of work; the entries that came of it.</summary>
    public IReadOnlyList<JournalEntry> Do(DeskWork work, Instant now) => work switch
    {
        DeskWork.Condition condition => OnCondition(condition.Found),
        DeskWork.Acknowledge acknowledge => OnAcknowledge(acknowledge, now),
        DeskWork.Settled settled => OnSettled(settled.Message),
        DeskWork.Recorded recorded => Add(new JournalEntry(0) { RecordedUpTo = recorded.UpTo }),
        DeskWork.Adopt adopt => OnAdopt(adopt, now),
        DeskWork.Follow follow => [.. follow.Found.SelectMany(OnCondition), .. Add(new JournalEntry(0) { Followed = follow.Position })],
        _ => [],
    };

    private IReadOnlyList<JournalEntry> OnCondition(AlertCondition found) =>
        AlertLifeCycle.Next(state.Find(found.Key), found) is { } step ? AddStep(step, found.Headline, found.Detail) : [];

    private IReadOnlyList<JournalEntry> OnAcknowledge(DeskWork.Acknowledge work, Instant now) =>
        state.Open.TryGetValue(work.Id, out AlertTransition? last) && AlertLifeCycle.Acknowledge(last, now, work.By, work.Note) is { } step
            ? AddStep(step, MessageFactory.Acknowledged(step), step.Alert.Detail)
            : [];

    // A message that is settled already can come back from an attempt that was under way when the ledger's copy was taken over.
    private IReadOnlyList<JournalEntry> OnSettled(OutboxMessage message) =>
        state.Pending.ContainsKey(message.Id) ? Add(new JournalEntry(state.NextNumber) { Settled = message }) : [];

    private List<JournalEntry> OnAdopt(DeskWork.Adopt work, Instant now)
    {
        List<JournalEntry> entries = [];
        foreach (AlertTransition last in work.Open.Where(last => !state.Open.ContainsKey(last.Alert.Id) && !_closed.Contains(last.Alert.Id)))
        {
            bool taken = state.Find(AlertKey.Of(last.Alert)) is not null;
            entries.AddRange(Add(new JournalEntry(0) { Open = last }));
            if (taken && AlertLifeCycle.OnAbsent(last, now, "Goes on as a newer alert about the same thing.") is { } step)
            {
                entries.AddRange(AddStep(step, step.Alert.Headline, step.Alert.Detail, tell: false));
            }
        }

        entries.AddRange(work.Pending
            .Where(message => !state.Pending.ContainsKey(message.Id) && !_settled.Contains(message.Id))
            .SelectMany(message => Add(new JournalEntry(0) { Pending = message })));
        _adopted = true;
        _closed.Clear();
        _settled.Clear();
        return entries;
    }

    private IReadOnlyList<JournalEntry> AddStep(AlertTransition step, string headline, string detail, bool tell = true) => Add(
        new JournalEntry(state.NextNumber) { Transition = step, Messages = tell ? MessageFactory.For(step, headline, detail, notifiers()) : [] });

    private IReadOnlyList<JournalEntry> Add(JournalEntry entry)
    {
        state.Apply(entry);
        if (!_adopted && entry.Transition is { Alert: { State: AlertState.Normal } over })
        {
            _closed.Add(over.Id);
        }
        else if (!_adopted && entry.Settled is { } settled)
        {
            _settled.Add(settled.Id);
        }

        return [entry];
    }
}
