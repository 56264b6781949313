using LabWatch.Intake.Brokers.Embedded;
using LabWatch.Intake.Brokers.External;
using LabWatch.Intake.Diagnostics;
using LabWatch.Intake.Options;
using LabWatch.Intake.Pipeline;
using LabWatch.Intake.Spool;
using Microsoft.Extensions.Hosting;
using Microsoft.Extensions.Logging;

namespace LabWatch.Intake;

/// <summary>
/// Starts the parts and stops them as a protocol: refuse new messages, finish those under way, acknowledge them, leave the brokers,
/// all within a budget. What is not finished then was not acknowledged, so its sender still has it.
/// </summary>
internal sealed class IntakeService(
    IntakeOptions options,
    IntakeQueue queue,
    IntakeSpool spool,
    Committer committer,
    SpoolDrain drain,
    TimeProvider clock,
    ILogger<IntakeService> logger,
    EmbeddedBroker? embedded = null,
    BrokerSupervisor? supervisor = null) : IHostedService, IDisposable
{
    private readonly CancellationTokenSource _stopLink = new();
    private readonly CancellationTokenSource _stopCommitter = new();
    private readonly CancellationTokenSource _stopDrain = new();
    private int _stopped;
    private Task _link = Task.CompletedTask;
    private Task _committing = Task.CompletedTask;
    private Task _draining = Task.CompletedTask;

    /// <inheritdoc/>
    public async Task StartAsync(CancellationToken cancellationToken)
    {
        _draining = Task.Run(() => drain.RunAsync(_stopDrain.Token), CancellationToken.None);
        _committing = Task.Run(() => committer.RunAsync(_stopCommitter.Token), CancellationToken.None);
        if (embedded is not null)
        {
            await embedded.StartAsync();
        }

        if (supervisor is not null)
        {
            _link = Task.Run(() => supervisor.RunAsync(_stopLink.Token), CancellationToken.None);
        }
    }

    /// <inheritdoc/>
    public async Task StopAsync(CancellationToken cancellationToken)
    {
        if (Interlocked.Exchange(ref _stopped, 1) == 1)
        {
            return;
        }

        IntakeLog.Stopping(logger, queue.Count, spool.Entries);
        supervisor?.Refuse();
        embedded?.Refuse();
        queue.Close();
        await FinishCommitsAsync(cancellationToken);
        await _stopLink.CancelAsync();
        await _link;
        if (embedded is not null)
        {
            await embedded.StopAsync();
        }

        await _stopDrain.CancelAsync();
        await _draining;
    }

    /// <inheritdoc/>
    public void Dispose()
    {
        _stopLink.Dispose();
        _stopCommitter.Dispose();
        _stopDrain.Dispose();
    }

    private async Task FinishCommitsAsync(CancellationToken cancellationToken)
    {
        try
        {
            await _committing.WaitAsync(options.StopBudget, clock, cancellationToken);
        }
        catch (Exception exception) when (exception is TimeoutException or OperationCanceledException)
        {
            IntakeLog.StopBudgetUsed(logger, options.StopBudget.TotalSeconds);
            await _stopCommitter.CancelAsync();
            await _committing;
        }
    }
}
