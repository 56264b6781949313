using LabWatch.Alerts.Journal;
using LabWatch.Alerts.LifeCycle;
using LabWatch.Alerts.Messages;
using LabWatch.Alerts.Outbox;
using LabWatch.Lab.Alerts;
using LabWatch.Lab.Time;
using LabWatch.Records.Alerts;

namespace LabWatch.Alerts.Desk;

/// <summary>Turns work into journal entries and adds them to the state: the whole logic of the desk, without threads, clock or disk.</summary>
/// <param name="state">The state.</param>
/// <param name="notifiers">Whom to tell, at present.</param>
/// <param name="window">What follows within this time on the same thing is told by summary; zero tells everything at once.</param>
internal sealed class DeskReducer(JournalState state, Func<IReadOnlyList<Notifier>> notifiers, TimeSpan window = default)
{
    private static readonly TimeSpan Gathering = TimeSpan.FromSeconds(5);

    private readonly MessageGate _gate = new(window);
    private Instant _summarisedAt = Instant.MinValue;
    private Instant? _heldSince;

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
        DeskWork.Shelve shelve => OnAsked(shelve.Id, last => AlertLifeCycle.Shelve(last, shelve.Shelf), AlertTexts.ShelvedHeadline),
        DeskWork.Unshelve unshelve => OnAsked(unshelve.Id, last => AlertLifeCycle.Unshelve(last, now, unshelve.By, unshelve.Note), AlertTexts.UnshelvedHeadline),
        DeskWork.Tick => OnTick(now),
        DeskWork.Settled settled => OnSettled(settled.Message),
        DeskWork.Recorded recorded => Add(new JournalEntry(0) { RecordedUpTo = recorded.UpTo }),
        DeskWork.Adopt adopt => OnAdopt(adopt, now),
        DeskWork.Follow follow => [.. follow.Found.SelectMany(OnCondition), .. Add(new JournalEntry(0) { Followed = follow.Position })],
        _ => [],
    };

    /// <summary>Learns what comes at once, before it is done piece by piece.</summary>
    public void Expect(IReadOnlyList<DeskWork> batch, Instant now) =>
        _gate.Expect(batch.Sum(work => work is DeskWork.Follow follow ? follow.Found.Count : work is DeskWork.Condition ? 1 : 0), now);

    private IReadOnlyList<JournalEntry> OnAsked(Guid id, Func<AlertTransition, AlertTransition?> next, string text) =>
        state.Open.TryGetValue(id, out AlertTransition? last) && next(last) is { } step
            ? AddStep(step, Phrase.Headline(text, Phrase.Cut(step.By, 40), step.Alert.Headline), step.Note is { } note ? $"{note}\n{step.Alert.Detail}" : step.Alert.Detail)
            : [];

    private List<JournalEntry> OnTick(Instant now)
    {
        List<JournalEntry> entries = [];
        foreach (AlertTransition last in state.Open.Values.Where(last => last.Alert.Shelf?.Until <= now).ToList())
        {
            AlertTransition step = AlertLifeCycle.Unshelve(last, now, AlertLifeCycle.Service, AlertTexts.ShelfEnded)!;
            entries.AddRange(AddStep(step, Phrase.Headline(AlertTexts.UnshelvedHeadline, AlertLifeCycle.Service, step.Alert.Headline), step.Alert.Detail));
        }

        entries.AddRange(Summarise(now));
        return entries;
    }

    // One message for everything that was held back, at most one each window.
    private IReadOnlyList<JournalEntry> Summarise(Instant now)
    {
        if (state.Held.Count == 0)
        {
            _heldSince = null;
            return [];
        }

        _heldSince ??= now;
        if (now - _heldSince.Value < Gathering || (_summarisedAt != Instant.MinValue && now - _summarisedAt < window))
        {
            return [];
        }

        List<AlertTransition> held =
        [
            .. state.Held.Select(id => state.Open.GetValueOrDefault(id)).OfType<AlertTransition>()
                .OrderByDescending(last => last.Alert.IsHazard).ThenByDescending(last => last.Alert.Priority).ThenBy(last => last.Alert.RaisedAt),
        ];
        _heldSince = null;
        if (held.Count == 0)
        {
            // All of it is over already: there is nothing that anybody should do.
            return Add(new JournalEntry(0) { HeldAlerts = [] });
        }

        _summarisedAt = now;
        IReadOnlyList<Alert> alerts = [.. held.Select(last => last.Alert)];
        string headline = SummaryTexts.Headline(alerts);
        AlertTransition step = AlertLifeCycle.Summarise(held[0], now, headline);
        return Add(new JournalEntry(state.NextNumber)
        {
            Transition = step,
            Messages = MessageFactory.For(step, headline, SummaryTexts.Detail(alerts), notifiers()),
            HeldAlerts = [],
        });
    }

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

    private IReadOnlyList<JournalEntry> AddStep(AlertTransition step, string headline, string detail, bool tell = true)
    {
        // Of what is shelved nobody hears but that it was.
        tell &= step.Alert.Shelf is null || step.Event is AlertEvent.Shelved or AlertEvent.OutOfService;
        bool now = tell && _gate.MayTell(step, state.Held.Contains(step.Alert.Id));
        return Add(new JournalEntry(state.NextNumber)
        {
            Transition = step,
            Messages = now ? MessageFactory.For(step, headline, detail, notifiers()) : [],
            Held = tell && !now ? true : null,
        });
    }

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
