using System.Text.Json;
using LabWatch.Alerts;
using LabWatch.Lab.Alerts;

namespace LabWatch.Tests.Alerts;

/// <summary>The whole room together: reading to notifier, ledger and board, with and without a records database, over restarts.</summary>
public sealed class AlertsRoomTests : IDisposable
{
    private readonly string _folder = Directory.CreateTempSubdirectory("labwatch-alerts-").FullName;
    private readonly SteppingClock _clock = new(TestSite.Start.ToDateTimeOffset());
    private readonly MemoryAlertLedger _ledger = new();

    [Fact]
    public async Task A_hot_reading_reaches_board_webhook_and_ledger()
    {
        await using AlertsHost host = new(_folder, _clock, _ledger);
        await host.StartAsync();
        host.Send(186);
        await AlertsHost.UntilAsync(() => !host.Receiver.Received.IsEmpty, "the webhook");
        await AlertsHost.UntilAsync(() => _ledger.Messages.Count(message => message.SentAt is not null) == 2, "both messages recorded as sent");
        Alert alert = Assert.Single(host.Board.View().Open);
        Assert.Equal((HazardCode.HotSurface, AlertState.RaisedUnacknowledged, 186.0), (alert.Code, alert.State, alert.Value));
        Assert.Equal(alert.Id, Assert.Single(_ledger.Alerts));
        Assert.Empty(host.Board.PendingMessages());
        await host.StopAsync();
    }

    [Fact]
    public async Task The_board_shows_the_latest_value_of_a_standing_hot_surface()
    {
        await using AlertsHost host = new(_folder, _clock, _ledger);
        await host.StartAsync();
        host.Send(50);
        host.Pass(1, 186);
        await AlertsHost.UntilAsync(() => host.Board.View().Open.Count == 1, "the alert");
        Assert.Contains("186 degC", host.Board.View().Open[0].Headline, StringComparison.Ordinal);
        Assert.Equal(186, host.Board.View().Open[0].Value);
        await host.StopAsync();
    }

    [Theory]
    [InlineData(false)]
    [InlineData(true)]
    public async Task Without_the_records_database_hazards_are_raised_sent_and_acknowledged_and_recorded_later(bool hanging)
    {
        _ledger.Stopped = !hanging;
        _ledger.Hanging = hanging;
        await using AlertsHost host = new(_folder, _clock, _ledger);
        await host.StartAsync();
        host.Send(186);
        await AlertsHost.UntilAsync(() => !host.Receiver.Received.IsEmpty, "the webhook");
        AcknowledgeResult result = await host.Board.AcknowledgeAsync(host.Board.View().Open[0].Id, "A. Person", "seen", TestContext.Current.CancellationToken);
        Assert.Equal(AlertState.RaisedAcknowledged, result.Alert!.State);
        host.Pass(32, 30);
        await AlertsHost.UntilAsync(() => host.Board.View().Open.Count == 0, "the end of the alert");
        await AlertsHost.UntilAsync(() => host.Board.PendingMessages().Count == 0, "all messages");
        Assert.Equal(3, host.Receiver.Received.Count);
        Assert.Empty(_ledger.Alerts);
        _ledger.Stopped = false;
        _ledger.Hanging = false;
        await host.UntilAsync(() => host.Board.WaitingForLedger == 0, "the ledger", TimeSpan.FromSeconds(1));
        Guid id = Assert.Single(_ledger.Alerts);
        Assert.Equal(["raised", "acknowledged", "returned"], _ledger.Steps(id).Select(step => step.Event));
        Assert.All(_ledger.Messages, message => Assert.NotNull(message.SentAt));
        await host.StopAsync();
    }

    [Fact]
    public async Task An_open_hazard_survives_a_restart_without_the_database_and_returns_as_if_nothing_had_happened()
    {
        _ledger.Stopped = true;
        Guid id;
        await using (AlertsHost first = new(_folder, _clock, _ledger))
        {
            await first.StartAsync();
            first.Send(186);
            await AlertsHost.UntilAsync(() => first.Board.PendingMessages().Count == 0 && !first.Receiver.Received.IsEmpty, "the webhook");
            id = first.Board.View().Open[0].Id;
            await first.StopAsync();
        }

        await using AlertsHost second = new(_folder, _clock, _ledger);
        await second.StartAsync();
        Assert.Equal(id, Assert.Single(second.Board.View().Open).Id);
        await second.Board.AcknowledgeAsync(id, "A. Person", null, TestContext.Current.CancellationToken);
        second.Pass(32, 30);
        await AlertsHost.UntilAsync(() => second.Board.View().Open.Count == 0, "the end of the alert");
        _ledger.Stopped = false;
        await second.UntilAsync(() => second.Board.WaitingForLedger == 0, "the ledger", TimeSpan.FromSeconds(1));
        Assert.Equal(["raised", "acknowledged", "returned"], _ledger.Steps(id).Select(step => step.Event));
        Assert.DoesNotContain("raised", second.Receiver.Received.Select(EventOf));
        await second.StopAsync();
    }

    [Fact]
    public async Task A_lost_journal_is_made_up_for_by_the_ledger()
    {
        Guid id;
        await using (AlertsHost first = new(_folder, _clock, _ledger))
        {
            first.Receiver.Answer = (_, _) => throw new HttpRequestException("no network");
            await first.StartAsync();
            first.Send(186);
            await AlertsHost.UntilAsync(() => first.Board.WaitingForLedger == 0 && _ledger.Messages.Any(message => message.Attempts > 0), "the ledger");
            id = Assert.Single(first.Board.View().Open).Id;
            await first.StopAsync();
        }

        Directory.Delete(_folder, recursive: true);
        await using AlertsHost second = new(_folder, _clock, _ledger);
        await second.StartAsync();
        await second.UntilAsync(() => second.Receiver.Received.Any(request => AlertOf(request) == id), "the message that was not sent", TimeSpan.FromSeconds(1));
        Assert.Equal(id, second.Board.View().Open.Single(alert => alert.Code == HazardCode.HotSurface).Id);
        await second.UntilAsync(
            () =>
            {
                // Each second, as a sensor does: the watch may learn of the alert from the ledger after the first of them.
                second.Send(30);
                return second.Board.View().Open.Any(alert => alert.State == AlertState.ReturnedUnacknowledged);
            },
            "the return",
            TimeSpan.FromSeconds(1));
        await second.StopAsync();
    }

    [Fact]
    public async Task An_acknowledgement_is_idempotent_and_an_unknown_alert_is_none()
    {
        await using AlertsHost host = new(_folder, _clock, _ledger);
        await host.StartAsync();
        host.Send(186);
        await AlertsHost.UntilAsync(() => host.Board.View().Open.Count == 1, "the alert");
        Guid id = host.Board.View().Open[0].Id;
        Alert first = (await host.Board.AcknowledgeAsync(id, "A. Person", "seen", TestContext.Current.CancellationToken)).Alert!;
        Alert again = (await host.Board.AcknowledgeAsync(id, "B. Person", "me too", TestContext.Current.CancellationToken)).Alert!;
        Assert.Equal(first, again);
        host.Pass(32, 30);
        await AlertsHost.UntilAsync(() => host.Board.View().Open.Count == 0, "the end");
        Assert.Equal("A. Person", (await host.Board.AcknowledgeAsync(id, "C. Person", null, TestContext.Current.CancellationToken)).Alert!.AcknowledgedBy);
        Assert.Null((await host.Board.AcknowledgeAsync(Guid.NewGuid(), "A. Person", null, TestContext.Current.CancellationToken)).Alert);
        Assert.Equal(["by", "note"], (await host.Board.AcknowledgeAsync(id, " ", new string('x', 2001), TestContext.Current.CancellationToken)).Findings.Select(finding => finding.Where));
        await host.StopAsync();
    }

    [Fact]
    public async Task Changes_are_numbered_without_a_gap_and_the_view_says_which_are_in_it()
    {
        await using AlertsHost host = new(_folder, _clock, _ledger);
        List<AlertBoardChange> changes = [];
        host.Board.Changed += (_, change) => changes.Add(change);
        await host.StartAsync();
        host.Send(186);
        host.Pass(32, 30);
        await AlertsHost.UntilAsync(() => changes.Count == 2, "raised and returned");
        await host.Board.AcknowledgeAsync(changes[0].Transition.Alert.Id, "A. Person", null, TestContext.Current.CancellationToken);
        await AlertsHost.UntilAsync(() => changes.Count == 3, "acknowledged");
        Assert.Equal([1L, 2L, 3L], changes.Select(change => change.Sequence));
        Assert.Equal(3, host.Board.View().Sequence);
        Assert.Equal(AlertState.Normal, changes[2].Transition.Alert.State);
        await host.StopAsync();
    }

    [Fact]
    public async Task An_entry_that_the_ledger_alone_refuses_is_set_aside_and_the_rest_goes_on()
    {
        _ledger.Refuses = step => step.Event == "raised";
        await using AlertsHost host = new(_folder, _clock, _ledger);
        await host.StartAsync();
        host.Send(186);
        await host.UntilAsync(() => File.Exists(Path.Combine(_folder, "alerts.set-aside")), "the entry set aside", TimeSpan.FromSeconds(5));
        Assert.Contains(host.Board.View().Open, alert => alert.Code == HazardCode.HotSurface);
        await host.StopAsync();
    }

    [Fact]
    public void Settings_out_of_range_are_all_listed()
    {
        AlertsOptions options = new() { DataDirectory = " ", HotSurfaceDeadBandKelvin = double.NaN, ParallelAttempts = 0, RetryLongest = TimeSpan.FromDays(1) };
        Assert.Equal(["DataDirectory", "HotSurfaceDeadBandKelvin", "RetryLongest", "ParallelAttempts"], options.Validate().Select(finding => finding.Where));
        Assert.Empty(new AlertsOptions { DataDirectory = "data" }.Validate());
    }

    public void Dispose()
    {
        if (Directory.Exists(_folder))
        {
            Directory.Delete(_folder, recursive: true);
        }
    }

    private static Guid AlertOf(ReceivedRequest request) => JsonDocument.Parse(request.Body).RootElement.GetProperty("alert").GetGuid();

    private static string EventOf(ReceivedRequest request) => JsonDocument.Parse(request.Body).RootElement.GetProperty("event").GetString()!;
}
