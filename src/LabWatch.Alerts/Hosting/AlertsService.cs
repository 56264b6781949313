using LabWatch.Alerts.Assessments;
using LabWatch.Alerts.Attention;
using LabWatch.Alerts.Desk;
using LabWatch.Alerts.Hazards;
using LabWatch.Alerts.Journal;
using LabWatch.Alerts.Outbox;
using LabWatch.Alerts.Recording;
using LabWatch.Lab;
using LabWatch.Lab.Findings;
using Microsoft.Extensions.Hosting;
using Microsoft.Extensions.Logging;

namespace LabWatch.Alerts.Hosting;

/// <summary>Starts and stops the alerts: what stands from before is restored first, then everything runs.</summary>
internal sealed class AlertsService(
    AlertJournalHandle journal,
    HazardWatch watch,
    DeskQueue queue,
    AlertDesk desk,
    MessageDispatcher dispatcher,
    LedgerRecorder recorder,
    AssessmentFollower follower,
    HazardTicker ticker,
    RunAttention attention,
    Heartbeat heartbeat,
    LastHeardFile heard,
    AlertsMetrics metrics,
    ILabSnapshotSource lab,
    TimeProvider clock,
    ILoggerFactory loggers) : IHostedService, IDisposable
{
    private readonly CancellationTokenSource _stopping = new();
    private readonly ILogger _logger = loggers.CreateLogger<AlertsService>();
    private DeskThread? _thread;
    private Task _running = Task.CompletedTask;

    /// <inheritdoc/>
    public Task StartAsync(CancellationToken cancellationToken)
    {
        JournalState state = journal.State;
        Log.Restored(_logger, state.Open.Count, state.Pending.Count, state.Unrecorded.Count);
        lab.Changed += OnLabChanged;
        Report();
        watch.Restore(state.Open.Values.Select(last => last.Alert));
        follower.Restore(state);
        recorder.OnEntries([.. state.Unrecorded]);
        foreach (LabWatch.Records.Alerts.OutboxMessage message in state.Pending.Values.OrderBy(message => message.QueuedAt))
        {
            dispatcher.Send(message);
        }

        Measure();
        _thread = new DeskThread(queue, desk, loggers.CreateLogger<DeskThread>());
        _running = Task.WhenAll(Loop(ticker.RunAsync), Loop(recorder.RunAsync), Loop(follower.RunAsync), Loop(attention.RunAsync), Loop(heartbeat.RunAsync));
        return Task.CompletedTask;
    }

    /// <inheritdoc/>
    public async Task StopAsync(CancellationToken cancellationToken)
    {
        lab.Changed -= OnLabChanged;
        await _stopping.CancelAsync();
        await dispatcher.StopAsync(clock);
        await _running;
        _thread?.Dispose();
        _thread = null;
        heard.Write(watch.LastHeard());
    }

    /// <inheritdoc/>
    public void Dispose()
    {
        _thread?.Dispose();
        _stopping.Dispose();
    }

    private Task Loop(Func<CancellationToken, Task> run) => Task.Run(async () =>
    {
        try
        {
            await run(_stopping.Token);
        }
        catch (OperationCanceledException) when (_stopping.IsCancellationRequested)
        {
            // A clean stop.
        }
    });

    private void OnLabChanged(object? sender, EventArgs arguments)
    {
        watch.Apply(lab.Current);
        Report();
    }

    private void Measure()
    {
        metrics.ObserveTotal("labwatch.hazards.packs", "{pack}", "Packs watched for hazards.", () => watch.Packs);
        metrics.ObserveTotal("labwatch.hazards.invalid_readings", "{reading}", "Readings of hazard channels without a valid value.", () => watch.InvalidReadings);
        metrics.Observe("labwatch.alerts.open", "{alert}", "Alerts that are not over.", () => desk.View.Open.Count);
        metrics.Observe("labwatch.alerts.pending_messages", "{message}", "Messages neither sent nor given up.", () => desk.Pending.Count);
        metrics.Observe("labwatch.alerts.unrecorded_steps", "{step}", "Steps that the records database does not have yet.", () => recorder.Waiting);
        metrics.Observe("labwatch.alerts.journal_failing", "1", "1 while the local alert journal cannot be written.", () => journal.Writer.Failing ? 1 : 0);
    }

    private void Report()
    {
        foreach (Finding finding in watch.Findings)
        {
            Log.HazardFinding(_logger, finding);
        }
    }
}
