using LabWatch.Alerts.Desk;
using LabWatch.Alerts.Journal;
using LabWatch.Alerts.LifeCycle;
using LabWatch.Lab.Alerts;
using LabWatch.Lab.Time;
using LabWatch.Records.Alerts;

namespace LabWatch.Tests.Alerts;

/// <summary>The service is killed after every single write of the journal: what a start then finds must be complete and consistent.</summary>
public sealed class DeskCrashTests
{
    private static readonly Notifier[] Notifiers = [new("log", NotifierKind.Log, null, null), new("hook", NotifierKind.Webhook, new Uri("https://messages.example/"), null)];

    public static TheoryData<int> Seeds => [.. Enumerable.Range(1, 25)];

    [Theory]
    [MemberData(nameof(Seeds))]
    public void After_any_prefix_of_the_journal_nothing_is_lost(int seed)
    {
        List<JournalEntry> entries = Live(seed, 120);
        JournalState state = new();
        List<AlertTransition> steps = [];
        HashSet<string> queued = [];
        HashSet<string> done = [];
        long recorded = 0;
        foreach (JournalEntry entry in entries)
        {
            state.Apply(entry);
            steps.AddRange(entry.Transition is { } step ? [step] : []);
            queued.UnionWith((entry.Messages ?? []).Select(message => message.Id));
            done.UnionWith(entry.Settled is { SentAt: not null } sent ? [sent.Id] : []);
            recorded = entry.RecordedUpTo ?? recorded;
            AssertNoneDisappeared(state, steps);
            Assert.Equal(queued.Except(done).Order(), state.Pending.Keys.Order());
            Assert.Equal(entries.TakeWhile(other => !ReferenceEquals(other, entry)).Append(entry).Where(other => other.Number > recorded), state.Unrecorded);
        }
    }

    [Theory]
    [MemberData(nameof(Seeds))]
    public void A_journal_rewritten_at_any_point_goes_on_the_same(int seed)
    {
        List<JournalEntry> entries = Live(seed, 80);
        JournalState whole = Fold(entries);
        for (int cut = 0; cut <= entries.Count; cut += 5)
        {
            JournalState rewritten = Fold([.. Fold(entries[..cut]).Snapshot(), .. entries[cut..]]);
            Assert.Equal(whole.Open.OrderBy(pair => pair.Key), rewritten.Open.OrderBy(pair => pair.Key));
            Assert.Equal(whole.Pending.OrderBy(pair => pair.Key), rewritten.Pending.OrderBy(pair => pair.Key));
            Assert.Equal(whole.Unrecorded, rewritten.Unrecorded);
            Assert.Equal(whole.NextNumber, rewritten.NextNumber);
        }
    }

    [Theory]
    [MemberData(nameof(Seeds))]
    public void What_reaches_the_ledger_after_a_crash_is_every_step_once_and_in_order(int seed)
    {
        List<JournalEntry> entries = Live(seed, 100);
        Random random = new(seed);
        Dictionary<Guid, int> ledger = [];
        for (int at = 0; at < entries.Count; at += random.Next(1, 10))
        {
            Recover(ledger, entries[..(at + 1)]);
        }

        Recover(ledger, entries);
        Dictionary<Guid, int> all = entries.Where(entry => entry.Transition is not null).GroupBy(entry => entry.Transition!.Alert.Id)
            .ToDictionary(life => life.Key, life => life.Count());
        Assert.Equal(all.OrderBy(pair => pair.Key), ledger.OrderBy(pair => pair.Key));
    }

    // Before the crash the ledger had got what the journal says it had; after it, it gets the rest.
    private static void Recover(Dictionary<Guid, int> ledger, List<JournalEntry> survived)
    {
        long recorded = survived.Max(entry => entry.RecordedUpTo ?? 0);
        Record(ledger, survived.Where(entry => entry.Number > 0 && entry.Number <= recorded));
        Record(ledger, Fold(survived).Unrecorded);
    }

    private static void Record(Dictionary<Guid, int> ledger, IEnumerable<JournalEntry> entries)
    {
        foreach (AlertTransition step in entries.Where(entry => entry.Transition is not null).Select(entry => entry.Transition!))
        {
            int known = ledger.GetValueOrDefault(step.Alert.Id);
            Assert.True(step.Sequence <= known + 1, "A step is missing.");
            ledger[step.Alert.Id] = Math.Max(known, step.Sequence);
        }
    }

    // There is at most one alert with a standing condition for each thing, and one leaves only when returned and acknowledged.
    private static void AssertNoneDisappeared(JournalState state, List<AlertTransition> steps)
    {
        foreach (IGrouping<Guid, AlertTransition> life in steps.GroupBy(step => step.Alert.Id).Where(life => !state.Open.ContainsKey(life.Key)))
        {
            Assert.Contains(life, step => step.Event == AlertEvent.Acknowledged);
            Assert.Contains(life, step => step.Event == AlertEvent.Returned);
            Assert.Equal(AlertState.Normal, life.Last().Alert.State);
        }

        Assert.Equal(state.Open.Count, state.Open.Values.Select(last => AlertKey.Of(last.Alert)).Distinct().Count());
    }

    private static JournalState Fold(IEnumerable<JournalEntry> entries)
    {
        JournalState state = new();
        foreach (JournalEntry entry in entries)
        {
            state.Apply(entry);
        }

        return state;
    }

    private static List<JournalEntry> Live(int seed, int acts)
    {
        Random random = new(seed);
        DeskReducer desk = new(new JournalState(), () => Notifiers);
        List<JournalEntry> entries = [];
        for (int i = 0; i < acts; i++)
        {
            entries.AddRange(desk.Do(Act(random, desk.State, TestSite.Start + TimeSpan.FromSeconds(i)), TestSite.Start + TimeSpan.FromSeconds(i)));
        }

        return entries;
    }

    private static DeskWork Act(Random random, JournalState state, Instant now)
    {
        switch (random.Next(8))
        {
            case 0 when state.Open.Count > 0:
                return new DeskWork.Acknowledge(state.Open.Keys.Order().ElementAt(random.Next(state.Open.Count)), "A. Person", null, new TaskCompletionSource<Alert?>());
            case 1 or 2 when state.Pending.Count > 0:
                OutboxMessage message = state.Pending.Values.OrderBy(candidate => candidate.Id).ElementAt(random.Next(state.Pending.Count));
                return new DeskWork.Settled(random.Next(3) == 0 ? message with { Attempts = message.Attempts + 1, LastError = "no" } : message with { SentAt = now });
            case 3 when state.Unrecorded.Count > 0:
                return new DeskWork.Recorded(state.Unrecorded.ElementAt(random.Next(state.Unrecorded.Count)).Number);
            default:
                return new DeskWork.Condition(new AlertCondition(
                    new AlertKey(TestSite.Rowan, HazardCode.HotSurface, $"case-{random.Next(3)}"), random.Next(2) == 0, now, (AlertPriority)random.Next(3), "h", "d", 60, 48, "Cel"));
        }
    }
}
