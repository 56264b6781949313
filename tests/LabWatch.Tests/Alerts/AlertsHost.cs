using LabWatch.Alerts;
using LabWatch.Alerts.Outbox;
using LabWatch.Lab;
using LabWatch.Lab.Alerts;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Time;
using LabWatch.Records.Alerts;
using LabWatch.Records.Assessments;
using Microsoft.Extensions.DependencyInjection;
using Microsoft.Extensions.Hosting;

namespace LabWatch.Tests.Alerts;

/// <summary>The whole room as the service registers it, on a fake clock, with ledgers in memory and a webhook receiver in place of a network.</summary>
internal sealed class AlertsHost : IAsyncDisposable
{
    private readonly ServiceProvider _services;

    public AlertsHost(string folder, SteppingClock clock, MemoryAlertLedger ledger, LabSnapshot? lab = null, WebhookReceiver? receiver = null, MemoryAssessmentLedger? assessments = null)
    {
        Clock = clock;
        Ledger = ledger;
        Receiver = receiver ?? new WebhookReceiver();
        Assessments = assessments ?? new MemoryAssessmentLedger();
        Lab = new FixedLab(lab ?? WithHook());
        ServiceCollection services = new();
        services.AddLogging();
        services.AddSingleton<TimeProvider>(clock);
        services.AddSingleton<ILabSnapshotSource>(Lab);
        services.AddSingleton<IAlertLedger>(ledger);
        services.AddSingleton<IAssessmentLedger>(Assessments);
        AlertsOptions options = new() { DataDirectory = folder, JournalPatience = TimeSpan.FromSeconds(10), SilenceMinimum = TimeSpan.FromSeconds(600) };
        services.AddLabWatchAlerts(options).AddLabWatchAlerts(options);
        services.AddHttpClient(WebhookChannel.ClientName).ConfigurePrimaryHttpMessageHandler(() => Receiver);
        _services = services.BuildServiceProvider();
        Board = _services.GetRequiredService<IAlertBoard>();
        Tap = Assert.Single(_services.GetServices<IReadingTap>());
    }

    public SteppingClock Clock { get; }

    public MemoryAlertLedger Ledger { get; }

    public WebhookReceiver Receiver { get; }

    public MemoryAssessmentLedger Assessments { get; }

    public FixedLab Lab { get; }

    public IAlertBoard Board { get; }

    public IReadingTap Tap { get; }

    public static LabSnapshot WithHook() => TestSite.Lab(
        [new Notifier("log", NotifierKind.Log, null, null), new Notifier("hook", NotifierKind.Webhook, new Uri("https://messages.example/labwatch"), null)],
        [], [], TestSite.Source(TestSite.Rowan, TestSite.Surface(TestSite.Rowan), TestSite.Well(TestSite.Rowan)));

    public async Task StartAsync()
    {
        foreach (IHostedService service in _services.GetServices<IHostedService>())
        {
            await service.StartAsync(CancellationToken.None);
        }
    }

    public async Task StopAsync()
    {
        foreach (IHostedService service in _services.GetServices<IHostedService>())
        {
            await service.StopAsync(CancellationToken.None);
        }
    }

    public void Send(double value, string channel = "case") =>
        Tap.OnPack(new ReadingPack(TestSite.Rowan, Instant.Now(Clock), [new Reading(channel, Instant.Now(Clock), value)]));

    /// <summary>Sends one value each second for some seconds.</summary>
    public void Pass(int seconds, double value)
    {
        for (int i = 0; i < seconds; i++)
        {
            Clock.Advance(TimeSpan.FromSeconds(1));
            Send(value);
        }
    }

    /// <summary>Waits for work of other threads, to a deadline; nothing is slept away when it is done.</summary>
    public static async Task UntilAsync(Func<bool> done, string what)
    {
        long start = TimeProvider.System.GetTimestamp();
        while (!done())
        {
            Assert.True(TimeProvider.System.GetElapsedTime(start) < TimeSpan.FromSeconds(20), "Waited in vain for: " + what);
            await Task.Delay(TimeSpan.FromMilliseconds(1), TimeProvider.System);
        }
    }

    /// <summary>The same, letting the fake clock run at a pace that other threads can follow, for work that waits between attempts.</summary>
    public async Task UntilAsync(Func<bool> done, string what, TimeSpan step)
    {
        for (int steps = 0; !done(); steps++)
        {
            Assert.True(steps < 4000, "Waited in vain for: " + what);
            Clock.Advance(step);
            await Task.Delay(TimeSpan.FromMilliseconds(2), TimeProvider.System);
        }
    }

    public async ValueTask DisposeAsync() => await _services.DisposeAsync();
}
