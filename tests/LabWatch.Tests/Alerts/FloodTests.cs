using LabWatch.Alerts.Desk;
using LabWatch.Alerts.Journal;
using LabWatch.Alerts.LifeCycle;
using LabWatch.Lab.Alerts;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Limits;
using LabWatch.Lab.Time;
using LabWatch.Records.Alerts;

namespace LabWatch.Tests.Alerts;

/// <summary>
/// One cause with its followers makes one message, and a flood one a minute, naming the count; the first of each hazard and source goes at once.
/// A flood: more than ten alarms in ten minutes for one person (ISA-18.2, EEMUA 191; from memory).
/// </summary>
public sealed class FloodTests
{
    private static readonly Notifier[] Notifiers = [new("hook", NotifierKind.Webhook, new Uri("https://messages.example/"), null)];
    private readonly JournalState _state = new();
    private readonly DeskReducer _desk;
    private Instant _now = TestSite.Start;

    public FloodTests() => _desk = new DeskReducer(_state, () => Notifiers, TimeSpan.FromSeconds(60));

    [Fact]
    public void Followers_of_a_cause_wait_for_one_summary()
    {
        Assert.Equal(1, Raise("rowan", HazardCode.HazardSilent, "case"));
        Assert.Equal(0, Raise("rowan", HazardCode.HazardSilent, "lip"));
        Assert.Equal(0, Raise("rowan", HazardCode.HazardSilent, "cut-out"));
        OutboxMessage summary = Assert.Single(Pass(6));
        Assert.Contains("2 alerts together: 2 hazard-silent (sources: 1)", summary.Body, StringComparison.Ordinal);
        Assert.Contains("LabWatch is no protective device", summary.Body, StringComparison.Ordinal);
        Assert.Empty(Pass(300));
    }

    [Fact]
    public void Another_hazard_or_another_source_is_never_held_back()
    {
        Assert.Equal(1, Raise("rowan", HazardCode.HazardSilent, "case"));
        Assert.Equal(1, Raise("rowan", HazardCode.HotSurface, "case"));
        Assert.Equal(1, Raise("yew", HazardCode.HazardSilent, "case"));
    }

    [Fact]
    public void An_alert_that_comes_and_goes_is_told_three_times_and_then_by_summary()
    {
        List<int> told = [];
        for (int i = 0; i < 6; i++)
        {
            told.Add(Raise("rowan", CriterionCode.Stability, "well-1", AlertPriority.Medium));
            DeskWork.Condition gone = Work("rowan", CriterionCode.Stability, "well-1", AlertPriority.Medium);
            _desk.Do(new DeskWork.Condition(gone.Found with { Present = false }), _now);
            _now += TimeSpan.FromSeconds(2);
        }

        Assert.Equal([1, 1, 1, 0, 0, 0], told);
        Assert.Single(Pass(10));
    }

    [Fact]
    public void The_same_hazard_goes_at_once_again_when_the_time_is_over()
    {
        Raise("rowan", HazardCode.HotSurface, "case");
        _now += TimeSpan.FromSeconds(60);
        Assert.Equal(1, Raise("rowan", HazardCode.HotSurface, "lip"));
    }

    [Fact]
    public void A_flood_of_ten_thousand_gives_one_message_a_minute_that_names_the_count()
    {
        DeskWork[] all = [.. Enumerable.Range(0, 10_000).Select(i => Work($"source-{i % 200}", CriterionCode.Stability, $"s-{i / 200}", AlertPriority.Medium))];
        List<OutboxMessage> sent = [];
        foreach (DeskWork[] batch in all.Chunk(2048))
        {
            _desk.Expect(batch, _now);
            sent.AddRange(batch.SelectMany(work => _desk.Do(work, _now)).SelectMany(entry => entry.Messages ?? []));
        }

        Assert.Empty(sent);
        OutboxMessage summary = Assert.Single(Pass(59));
        Assert.Contains("10000 alerts together: 10000 stability (sources: 200)", summary.Body, StringComparison.Ordinal);
        Assert.Equal(10_000, _state.Open.Count);
    }

    [Fact]
    public void In_a_flood_the_first_message_of_each_hazard_and_source_goes_at_once_and_so_does_what_is_graver()
    {
        for (int i = 0; i < 20; i++)
        {
            Raise($"source-{i}", CriterionCode.DataHealth, "x", AlertPriority.Low);
        }

        Assert.Equal(0, Raise("source-30", CriterionCode.DataHealth, "x", AlertPriority.Low));
        Assert.Equal(1, Raise("source-30", CriterionCode.Stability, "x", AlertPriority.Medium));
        Assert.Equal(0, Raise("source-31", CriterionCode.Stability, "x", AlertPriority.Medium));
        Assert.Equal(1, Raise("source-31", HazardCode.OxygenLow, "x"));
    }

    [Fact]
    public void What_was_held_back_outlives_a_restart_and_is_summarised_after_it()
    {
        Raise("rowan", HazardCode.HazardSilent, "case");
        Raise("rowan", HazardCode.HazardSilent, "lip");
        JournalState again = new();
        foreach (JournalEntry entry in _state.Snapshot())
        {
            again.Apply(entry);
        }

        DeskReducer desk = new(again, () => Notifiers, TimeSpan.FromSeconds(60));
        desk.Do(new DeskWork.Tick(), _now);
        Assert.Single(desk.Do(new DeskWork.Tick(), _now + TimeSpan.FromSeconds(6)).SelectMany(entry => entry.Messages ?? []));
        Assert.Empty(again.Held);
    }

    [Fact]
    public void A_shelved_alert_tells_nobody_until_its_shelf_ends()
    {
        Raise("rowan", CriterionCode.Stability, "well-1", AlertPriority.Medium);
        Guid id = Assert.Single(_state.Open).Key;
        AlertShelf shelf = new("tess", _now, _now + TimeSpan.FromMinutes(30), "compressor is serviced");
        Assert.Single(Messages(_desk.Do(new DeskWork.Shelve(id, shelf, new TaskCompletionSource<Alert?>()), _now)));
        _now += TimeSpan.FromMinutes(10);
        AlertKey key = new(new SourceKey(TestSite.Site, "rowan"), CriterionCode.Stability, "well-1");
        Assert.Empty(Messages(_desk.Do(new DeskWork.Condition(Condition(key, AlertPriority.Medium) with { Present = false }), _now)));
        Assert.Empty(Messages(_desk.Do(new DeskWork.Condition(Condition(key, AlertPriority.Medium)), _now)));
        _now += TimeSpan.FromMinutes(20);
        Assert.Contains("Told again", Assert.Single(Messages(_desk.Do(new DeskWork.Tick(), _now))).Body, StringComparison.Ordinal);
        Assert.Null(_state.Open[id].Alert.Shelf);
    }

    private static IEnumerable<OutboxMessage> Messages(IEnumerable<JournalEntry> entries) => entries.SelectMany(entry => entry.Messages ?? []);

    private int Raise(string source, string code, string subject, AlertPriority priority = AlertPriority.High) =>
        Messages(_desk.Do(Work(source, code, subject, priority), _now)).Count();

    private List<OutboxMessage> Pass(int seconds)
    {
        List<OutboxMessage> sent = [];
        for (int i = 0; i < seconds; i++)
        {
            _now += TimeSpan.FromSeconds(1);
            sent.AddRange(Messages(_desk.Do(new DeskWork.Tick(), _now)));
        }

        return sent;
    }

    private DeskWork.Condition Work(string source, string code, string subject, AlertPriority priority) =>
        new(Condition(new AlertKey(new SourceKey(TestSite.Site, source), code, subject), priority));

    private AlertCondition Condition(AlertKey key, AlertPriority priority) => new(key, true, _now, priority, $"{key.Source.Source}: {key.Code}.", "Detail.", null, null, string.Empty);
}
