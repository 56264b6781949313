using LabWatch.Lab;
using LabWatch.Lab.Alerts;
using LabWatch.Lab.Assessments;
using LabWatch.Lab.Limits;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Tests.Alerts;

/// <summary>Assessments raise and end alerts, by the rules of the verdict.</summary>
public sealed class AssessmentFollowerTests : IDisposable
{
    private static readonly TimeSpan Step = TimeSpan.FromSeconds(1);
    private readonly string _folder = Directory.CreateTempSubdirectory("labwatch-follow-").FullName;
    private readonly SteppingClock _clock = new(TestSite.Start.ToDateTimeOffset());
    private readonly MemoryAlertLedger _ledger = new();

    [Theory]
    [InlineData(Decision.Fail, AlertPriority.Medium)]
    [InlineData(Decision.ConditionalFail, AlertPriority.Low)]
    public async Task A_fail_raises(Decision decision, AlertPriority priority)
    {
        await using AlertsHost host = await StartAsync();
        host.Assessments.Add(Window(0, decision));
        await host.UntilAsync(() => host.Board.View().Open.Count == 1, "the alert", Step);
        Alert alert = host.Board.View().Open[0];
        Assert.Equal((CriterionCode.Stability, priority, false), (alert.Code, alert.Priority, alert.IsHazard));
        Assert.Contains("limit 0.2 K", alert.Headline, StringComparison.Ordinal);
        await host.StopAsync();
    }

    [Theory]
    [InlineData(Decision.Pass)]
    [InlineData(Decision.ConditionalPass)]
    [InlineData(Decision.NotDecided)]
    public async Task Nothing_else_raises(Decision decision)
    {
        await using AlertsHost host = await StartAsync();
        host.Assessments.Add(Window(0, decision));
        await FollowedAsync(host, 1);
        Assert.Empty(host.Board.View().Open);
        await host.StopAsync();
    }

    [Theory]
    [InlineData(Decision.Pass, AlertState.ReturnedUnacknowledged)]
    [InlineData(Decision.ConditionalPass, AlertState.RaisedUnacknowledged)]
    [InlineData(Decision.NotDecided, AlertState.RaisedUnacknowledged)]
    [InlineData(Decision.ConditionalFail, AlertState.RaisedUnacknowledged)]
    public async Task Only_a_clear_pass_of_a_newer_window_returns(Decision decision, AlertState state)
    {
        await using AlertsHost host = await StartAsync();
        host.Assessments.Add(Window(-1, Decision.Fail));
        await FollowedAsync(host, 1);
        host.Assessments.Add(Window(0, decision));
        await FollowedAsync(host, 2);
        Assert.Equal((state, AlertPriority.Medium), (host.Board.View().Open[0].State, host.Board.View().Open[0].Priority));
        await host.StopAsync();
    }

    [Fact]
    public async Task A_superseding_revision_of_the_newest_window_counts_and_of_an_older_one_does_not()
    {
        await using AlertsHost host = await StartAsync();
        host.Assessments.Add(Window(-1, Decision.Fail), Window(0, Decision.Fail));
        await FollowedAsync(host, 2);
        host.Assessments.Add(Window(-1, Decision.Pass, revision: 2));
        await FollowedAsync(host, 3);
        Assert.Equal(AlertState.RaisedUnacknowledged, host.Board.View().Open[0].State);
        host.Assessments.Add(Window(0, Decision.Pass, revision: 2));
        await FollowedAsync(host, 4);
        Assert.Equal(AlertState.ReturnedUnacknowledged, host.Board.View().Open[0].State);
        host.Assessments.Add(Window(0, Decision.Fail, revision: 1));
        await FollowedAsync(host, 5);
        Assert.Equal(AlertState.ReturnedUnacknowledged, host.Board.View().Open[0].State);
        await host.StopAsync();
    }

    [Fact]
    public async Task A_month_of_history_raises_nothing_but_its_newest_window_may()
    {
        await using AlertsHost host = await StartAsync();
        host.Assessments.Add([.. Enumerable.Range(0, 1200).Select(i => Window(i - 1210, Decision.Fail))]);
        await FollowedAsync(host, 1200);
        Assert.Empty(_ledger.Alerts);
        host.Assessments.Add(Window(-1, Decision.Fail));
        await host.UntilAsync(() => host.Board.View().Open.Count == 1, "the alert", Step);
        await host.StopAsync();
    }

    [Fact]
    public async Task Bad_data_raise_at_low_priority()
    {
        await using AlertsHost host = await StartAsync(lab: Lab(TestSite.Limit(TestSite.Rowan, CriterionCode.DataHealth, "%")));
        host.Assessments.Add(Window(0, Decision.Fail) with { Criterion = CriterionCode.DataHealth, Scope = string.Empty, Unit = "%" });
        await host.UntilAsync(() => host.Board.View().Open.Count == 1, "the alert", Step);
        Assert.Equal(AlertPriority.Low, host.Board.View().Open[0].Priority);
        await host.StopAsync();
    }

    [Fact]
    public async Task Each_scope_has_an_alert_of_its_own()
    {
        AcceptanceLimit limit = TestSite.Limit(TestSite.Rowan, CriterionCode.EffectiveEmissivity, "/");
        await using AlertsHost host = await StartAsync(lab: Lab(limit));
        host.Assessments.Add(InBand("lw", Decision.Fail), InBand("mw", Decision.Fail));
        await host.UntilAsync(() => host.Board.View().Open.Count == 2, "both alerts", Step);
        host.Assessments.Add(InBand("lw", Decision.Pass, revision: 2), InBand("mw", Decision.NotDecided, revision: 2));
        await FollowedAsync(host, 4);
        Assert.Equal(AlertState.ReturnedUnacknowledged, host.Board.View().Open.Single(alert => alert.Subject == "lw").State);
        Assert.Equal(AlertState.RaisedUnacknowledged, host.Board.View().Open.Single(alert => alert.Subject == "mw").State);
        await host.StopAsync();
    }

    [Theory]
    [InlineData("source")]
    [InlineData("band")]
    [InlineData("limit withdrawn")]
    [InlineData("limit removed")]
    public async Task What_is_not_judged_any_more_leaves_no_alert_standing(string gone)
    {
        AcceptanceLimit limit = TestSite.Limit(TestSite.Rowan, CriterionCode.EffectiveEmissivity, "/", "lw");
        await using AlertsHost host = await StartAsync(lab: Lab(limit));
        host.Assessments.Add(InBand("lw", Decision.Fail));
        await host.UntilAsync(() => host.Board.View().Open.Count == 1, "the alert", Step);
        host.Lab.Replace(Lab(limit with { MinimumCelsius = 400 }));
        int looks = 0;
        await host.UntilAsync(() => ++looks > 20, "a look at a limit for another set point", Step);
        Assert.Equal(AlertState.RaisedUnacknowledged, host.Board.View().Open[0].State);
        host.Lab.Replace(gone switch
        {
            "source" => TestSite.Lab(AlertsHost.WithHook().Notifiers, [], []),
            "band" => Lab([limit], "mw"),
            "limit withdrawn" => Lab(limit with { WithdrawnFrom = TestSite.Start - TimeSpan.FromHours(1) }),
            _ => Lab(),
        });
        await host.UntilAsync(() => host.Board.View().Open[0].State == AlertState.ReturnedUnacknowledged, "the end of the condition", Step);
        await host.UntilAsync(
            () => host.Receiver.Received.Any(request => System.Text.Encoding.UTF8.GetString(request.Body).Contains("is not judged any more", StringComparison.Ordinal)), "the message", Step);
        host.Assessments.Add(InBand("lw", Decision.Fail, revision: 2));
        await FollowedAsync(host, 2);
        Assert.Equal(AlertState.ReturnedUnacknowledged, host.Board.View().Open[0].State);
        await host.StopAsync();
    }

    [Fact]
    public async Task A_restart_repeats_nothing()
    {
        MemoryAssessmentLedger assessments = new();
        await using (AlertsHost first = await StartAsync(assessments))
        {
            assessments.Add(Window(0, Decision.Fail));
            await FollowedAsync(first, 1);
            Guid id = first.Board.View().Open[0].Id;
            await first.Board.AcknowledgeAsync(id, "A. Person", null, TestContext.Current.CancellationToken);
            assessments.Add(Window(0, Decision.Pass, revision: 2));
            await FollowedAsync(first, 2);
            Assert.Empty(first.Board.View().Open);
            await first.StopAsync();
        }

        await _ledger.SetPositionAsync("alerts", 0, TestContext.Current.CancellationToken);
        await using AlertsHost second = await StartAsync(assessments);
        assessments.Add(Window(0, Decision.Fail, revision: 1));
        await FollowedAsync(second, 3);
        Assert.Empty(second.Board.View().Open);
        await second.StopAsync();
    }

    public void Dispose() => Directory.Delete(_folder, recursive: true);

    private async Task<AlertsHost> StartAsync(MemoryAssessmentLedger? assessments = null, LabSnapshot? lab = null)
    {
        AlertsHost host = new(_folder, _clock, _ledger, lab, assessments: assessments);
        await host.StartAsync();
        return host;
    }

    private async Task FollowedAsync(AlertsHost host, long sequence) => await host.UntilAsync(
        () => _ledger.PositionAsync("alerts", CancellationToken.None).AsTask().GetAwaiter().GetResult() == sequence, $"assessment {sequence}", Step);

    private static LabSnapshot Lab(params AcceptanceLimit[] limits) => Lab(limits, "lw", "mw");

    private static LabSnapshot Lab(AcceptanceLimit[] limits, params string[] bands)
    {
        LabSnapshot plain = AlertsHost.WithHook();
        return new(
            plain.Site, [plain.Sources[0] with { Bands = [.. bands.Select(band => new WorkingBand(band, $"Band {band}", 8, 14))] }],
            plain.Instruments, plain.Installations, plain.Certificates, limits, plain.Notifiers);
    }

    private static Assessment InBand(string band, Decision decision, int revision = 1) =>
        Window(0, decision, revision) with { Criterion = CriterionCode.EffectiveEmissivity, Scope = band, Unit = "/" };

    /// <summary>The half-hour window that ends so many windows from the start of the test (0: just then).</summary>
    private static Assessment Window(int end, Decision decision, int revision = 1)
    {
        Instant until = TestSite.Start + TimeSpan.FromMinutes(30 * end);
        return new Assessment(
            TestSite.Rowan, CriterionCode.Stability, "well-1", new TimeWindow(until - TimeSpan.FromMinutes(30), until), revision,
            new Estimate(0.31, 0.02), "K", 0.2, 2, decision, 0.01, [], "Half-range 0.31 K.", new Provenance("", [], [], "limit@1", "0"), until, null);
    }
}
