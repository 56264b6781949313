using LabWatch.Alerts.LifeCycle;
using LabWatch.Lab.Alerts;
using LabWatch.Records.Alerts;

namespace LabWatch.Alerts.Journal;

/// <summary>
/// What the entries of the journal add up to. The living state of the alerts is this very fold, so what a restart finds is what was there.
/// Not thread-safe.
/// </summary>
internal sealed class JournalState
{
    private readonly Dictionary<Guid, AlertTransition> _open = [];
    private readonly Dictionary<AlertKey, Guid> _standing = [];
    private readonly Dictionary<string, OutboxMessage> _pending = new(StringComparer.Ordinal);
    private readonly HashSet<Guid> _held = [];
    private readonly Queue<JournalEntry> _unrecorded = [];
    private readonly Dictionary<(Lab.Identity.SourceKey Source, string Criterion, string Scope), DecidedWindow> _decided = [];

    /// <summary>Open alerts, each at its last step.</summary>
    public IReadOnlyDictionary<Guid, AlertTransition> Open => _open;

    /// <summary>Messages neither sent nor given up, by id.</summary>
    public IReadOnlyDictionary<string, OutboxMessage> Pending => _pending;

    /// <summary>Entries that the ledger does not have yet, in order.</summary>
    public IReadOnlyCollection<JournalEntry> Unrecorded => _unrecorded;

    /// <summary>Alerts of which people are told by the next summary.</summary>
    public IReadOnlySet<Guid> Held => _held;

    /// <summary>The newest decided windows.</summary>
    public IReadOnlyCollection<DecidedWindow> Decided => _decided.Values;

    /// <summary>Sequence of the last assessment looked at; 0 before the first.</summary>
    public long FollowedSequence { get; private set; }

    /// <summary>The number that the next entry for the ledger gets.</summary>
    public long NextNumber { get; private set; } = 1;

    /// <summary>The last step of the open alert about a key; null where there is none.</summary>
    public AlertTransition? Find(AlertKey key) => _standing.TryGetValue(key, out Guid id) ? _open[id] : null;

    /// <summary>The newest decided window of a source, criterion and scope; null where there is none.</summary>
    public DecidedWindow? FindDecided(DecidedWindow like) => _decided.GetValueOrDefault((like.Source, like.Criterion, like.Scope));

    /// <summary>Adds one entry.</summary>
    public void Apply(JournalEntry entry)
    {
        if (entry.IsForLedger)
        {
            NextNumber = Math.Max(NextNumber, entry.Number + 1);
            _unrecorded.Enqueue(entry);
        }

        NextNumber = Math.Max(NextNumber, entry.NextNumber ?? 1);
        Apply(entry.Transition ?? entry.Open);
        foreach (OutboxMessage message in entry.Messages ?? [])
        {
            Apply(message);
        }

        if (entry.HeldAlerts is { } held)
        {
            _held.Clear();
            _held.UnionWith(held);
        }

        if (entry is { Held: true, Transition: { } waiting })
        {
            _held.Add(waiting.Alert.Id);
        }

        Apply(entry.Pending);
        Apply(entry.Settled);
        Apply(entry.Followed);
        while (entry.RecordedUpTo is { } number && _unrecorded.TryPeek(out JournalEntry? first) && first.Number <= number)
        {
            _unrecorded.Dequeue();
        }
    }

    /// <summary>The entries of a journal that holds just this state.</summary>
    public IReadOnlyList<JournalEntry> Snapshot() =>
    [
        new JournalEntry(0) { NextNumber = NextNumber },
        .. _open.Values.Select(last => new JournalEntry(0) { Open = last }),
        .. _pending.Values.Select(message => new JournalEntry(0) { Pending = message }),
        new JournalEntry(0) { Followed = new FollowedPosition(FollowedSequence, [.. _decided.Values]) },
        .. _unrecorded,
        new JournalEntry(0) { HeldAlerts = [.. _held] },
    ];

    private void Apply(AlertTransition? step)
    {
        if (step is null || (_open.TryGetValue(step.Alert.Id, out AlertTransition? known) && known.Sequence >= step.Sequence))
        {
            return;
        }

        AlertKey key = AlertKey.Of(step.Alert);
        if (step.Alert.State == AlertState.Normal)
        {
            _open.Remove(step.Alert.Id);
            if (_standing.TryGetValue(key, out Guid standing) && standing == step.Alert.Id)
            {
                _standing.Remove(key);
            }

            return;
        }

        _open[step.Alert.Id] = step;
        if (!_standing.TryGetValue(key, out Guid other) || _open[other].Alert.RaisedAt < step.Alert.RaisedAt)
        {
            _standing[key] = step.Alert.Id;
        }
    }

    private void Apply(OutboxMessage? message)
    {
        if (message is { SentAt: null, GivenUpAt: null })
        {
            _pending[message.Id] = message;
        }
        else if (message is not null)
        {
            _pending.Remove(message.Id);
        }
    }

    private void Apply(FollowedPosition? position)
    {
        if (position is null)
        {
            return;
        }

        FollowedSequence = Math.Max(FollowedSequence, position.Sequence);
        foreach (DecidedWindow window in position.Changed)
        {
            _decided[(window.Source, window.Criterion, window.Scope)] = window;
        }
    }
}
