using LabWatch.Lab.Alerts;
using LabWatch.Records.Alerts;

namespace LabWatch.Tests.Records.Contract;

/// <summary>What every engine's alert ledger does.</summary>
public abstract class AlertLedgerContract : IAsyncLifetime
{
    private protected abstract ValueTask<IRecordsUnderTest> OpenAsync();

    private IRecordsUnderTest _records = null!;

    private IAlertLedger Ledger => _records.Alerts;

    private static CancellationToken Token => TestContext.Current.CancellationToken;

    public async ValueTask InitializeAsync() => _records = await OpenAsync();

    public async ValueTask DisposeAsync()
    {
        await _records.DisposeAsync();
        GC.SuppressFinalize(this);
    }

    [Fact]
    public async Task An_alert_lives_from_raised_to_normal_and_every_step_stays_readable()
    {
        Alert raised = Sample.Alert(Sample.Fir, Guid.CreateVersion7(), Sample.Noon);
        Alert acknowledged = raised with
        {
            State = AlertState.RaisedAcknowledged,
            AcknowledgedAt = Sample.Noon + TimeSpan.FromMinutes(1),
            AcknowledgedBy = "kim",
            AcknowledgeNote = "seen",
            Value = 60,
        };
        Alert normal = acknowledged with { State = AlertState.Normal, ReturnedAt = Sample.Noon + TimeSpan.FromMinutes(5), Headline = "over", Value = null };
        await Ledger.RecordAsync(Sample.Raised(raised), [], Token);
        await Ledger.RecordAsync(new(acknowledged, 2, Sample.Noon, "acknowledged", "kim", "seen"), [], Token);
        Assert.Equal(acknowledged, Assert.Single(await Ledger.OpenAsync(Token)));
        await Ledger.RecordAsync(new(normal, 3, Sample.Noon, "returned", "labwatch", null), [], Token);
        Assert.Empty(await Ledger.OpenAsync(Token));
        Assert.Equal(normal, await Ledger.FindAsync(raised.Id, Token));
        IReadOnlyList<AlertTransition> steps = await Ledger.TransitionsAsync(raised.Id, Token);
        Assert.Equal([raised, acknowledged, normal], steps.Select(step => step.Alert));
        Assert.Equal([(1, "raised"), (2, "acknowledged"), (3, "returned")], steps.Select(step => (step.Sequence, step.Event)));
        Assert.Equal(("kim", "seen"), (steps[1].By, steps[1].Note));
    }

    [Fact]
    public async Task A_step_recorded_twice_changes_nothing()
    {
        Alert alert = Sample.Alert(Sample.Fir, Guid.CreateVersion7(), Sample.Noon);
        await Ledger.RecordAsync(Sample.Raised(alert), [Sample.Message("m1", alert.Id, Sample.Noon)], Token);
        await Ledger.RecordAsync(Sample.Raised(alert with { Headline = "another" }), [Sample.Message("m2", alert.Id, Sample.Noon)], Token);
        Assert.Equal(alert, await Ledger.FindAsync(alert.Id, Token));
        Assert.Single(await Ledger.TransitionsAsync(alert.Id, Token));
        Assert.Equal("m1", Assert.Single(await Ledger.MessagesAsync(alert.Id, Token)).Id);
    }

    [Fact]
    public async Task A_step_that_comes_after_a_later_one_does_not_turn_the_alert_back()
    {
        Alert raised = Sample.Alert(Sample.Fir, Guid.CreateVersion7(), Sample.Noon);
        Alert normal = raised with { State = AlertState.Normal };
        await Ledger.RecordAsync(new(normal, 2, Sample.Noon, "returned", "labwatch", null), [], Token);
        await Ledger.RecordAsync(Sample.Raised(raised), [], Token);
        Assert.Equal(AlertState.Normal, (await Ledger.FindAsync(raised.Id, Token))!.State);
        Assert.Equal(2, (await Ledger.TransitionsAsync(raised.Id, Token)).Count);
    }

    [Fact]
    public async Task Messages_fall_due_oldest_first_until_they_are_settled()
    {
        Alert alert = Sample.Alert(Sample.Fir, Guid.CreateVersion7(), Sample.Noon);
        OutboxMessage[] messages =
            [.. Enumerable.Range(0, 3).Select(index => Sample.Message($"m{index}", alert.Id, Sample.Noon + TimeSpan.FromSeconds(index)))];
        await Ledger.RecordAsync(Sample.Raised(alert), messages, Token);
        Assert.Equal(["m0", "m1"], (await Ledger.DueAsync(Sample.Noon + TimeSpan.FromSeconds(1), 10, Token)).Select(message => message.Id));
        OutboxMessage sent = messages[0] with { SentAt = Sample.Noon, Attempts = 1 };
        OutboxMessage tryAgain = messages[1] with { DueAt = Sample.Noon + TimeSpan.FromHours(1), Attempts = 1, LastError = "503" };
        OutboxMessage givenUp = messages[2] with { GivenUpAt = Sample.Noon, Attempts = 9, LastError = "410" };
        foreach (OutboxMessage settled in new[] { sent, tryAgain, givenUp })
        {
            await Ledger.SettleAsync(settled, Token);
        }

        Assert.Empty(await Ledger.DueAsync(Sample.Noon + TimeSpan.FromMinutes(1), 10, Token));
        Assert.Equal(tryAgain, Assert.Single(await Ledger.DueAsync(Sample.Noon + TimeSpan.FromHours(2), 10, Token)));
        Assert.Equal([sent, tryAgain, givenUp], await Ledger.MessagesAsync(alert.Id, Token));
    }

    [Fact]
    public async Task Pages_of_alerts_follow_each_other_newest_first()
    {
        for (int index = 0; index < 5; index++)
        {
            Alert alert = Sample.Alert(index == 2 ? Sample.Yew : Sample.Fir, Guid.CreateVersion7(), Sample.Noon + TimeSpan.FromSeconds(index / 2))
                with
            { Subject = $"s{index}", State = index == 0 ? AlertState.Normal : AlertState.RaisedUnacknowledged };
            await Ledger.RecordAsync(Sample.Raised(alert), [], Token);
        }

        AlertPage first = await Ledger.ListAsync(new(null, false, null, 3), Token);
        AlertPage second = await Ledger.ListAsync(new(null, false, first.Next, 3), Token);
        Assert.Equal(["s4", "s3", "s2", "s1", "s0"], first.Items.Concat(second.Items).Select(alert => alert.Subject));
        Assert.Null(second.Next);
        Assert.Equal(["s4", "s3", "s1"], (await Ledger.ListAsync(new(Sample.Fir, true, null, 3), Token)).Items.Select(alert => alert.Subject));
    }

    [Fact]
    public async Task A_position_is_zero_until_it_is_set_and_then_what_was_set_last()
    {
        Assert.Equal(0, await Ledger.PositionAsync("alerts", Token));
        await Ledger.SetPositionAsync("alerts", 5_000_000_000, Token);
        await Ledger.SetPositionAsync("alerts", 5_000_000_001, Token);
        Assert.Equal(5_000_000_001, await Ledger.PositionAsync("alerts", Token));
        Assert.Equal(0, await Ledger.PositionAsync("planner", Token));
    }

    [Fact]
    public async Task An_unknown_alert_has_no_steps() => Assert.Empty(await Ledger.TransitionsAsync(Guid.CreateVersion7(), Token));
}
