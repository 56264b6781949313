using System.Collections.Concurrent;
using LabWatch.Alerts.Desk;
using LabWatch.Alerts.Journal;
using LabWatch.Lab.Alerts;
using LabWatch.Lab.Time;
using LabWatch.Records.Alerts;
using Microsoft.Extensions.Logging;

namespace LabWatch.Alerts.Recording;

/// <summary>
/// Carries what the journal holds into the alert ledger, in order, as soon as the ledger answers. Recording twice changes nothing there, so a
/// crash between the two costs nothing. Hazards and notifiers never wait for it.
/// </summary>
internal sealed class LedgerRecorder(
    IAlertLedger ledger, DeskQueue desk, SetAsideFile setAside, TimeProvider clock, ILogger<LedgerRecorder> logger) : IEntryListener, IDisposable
{
    private const int TriesBeforeSetAside = 8;
    private const int AdoptedAtOnce = 500;
    private static readonly TimeSpan CallTime = TimeSpan.FromSeconds(15);
    private static readonly TimeSpan LongestWait = TimeSpan.FromSeconds(30);
    private static readonly TimeSpan FarAhead = TimeSpan.FromDays(60);

    private readonly ConcurrentQueue<JournalEntry> _waiting = new();
    private readonly SemaphoreSlim _signal = new(0);
    private bool _failing;

    /// <summary>Entries that the ledger does not have yet.</summary>
    public int Waiting => _waiting.Count;

    /// <inheritdoc/>
    public void OnEntries(IReadOnlyList<JournalEntry> entries)
    {
        foreach (JournalEntry entry in entries.Where(entry => entry.IsForLedger))
        {
            _waiting.Enqueue(entry);
            _signal.Release();
        }
    }

    /// <summary>Records until the token is cancelled. First what stands from before; then what the ledger alone knows is taken over, once.</summary>
    public async Task RunAsync(CancellationToken stopping)
    {
        await DrainAsync(stopping);
        await UntilDoneAsync(AdoptAsync, stopping);
        while (true)
        {
            await _signal.WaitAsync(stopping);
            await DrainAsync(stopping);
        }
    }

    /// <inheritdoc/>
    public void Dispose() => _signal.Dispose();

    private async Task DrainAsync(CancellationToken stopping)
    {
        while (_waiting.TryPeek(out JournalEntry? entry))
        {
            await UntilDoneAsync(token => RecordAsync(entry, token), stopping, entry);
            _waiting.TryDequeue(out _);
            desk.Post(new DeskWork.Recorded(entry.Number));
        }
    }

    private async Task UntilDoneAsync(Func<CancellationToken, Task> call, CancellationToken stopping, JournalEntry? entry = null)
    {
        for (int tries = 1; ; tries++)
        {
            try
            {
                await CallAsync(call, stopping);
                Answered();
                return;
            }
            catch (Exception exception) when (exception is not OperationCanceledException || !stopping.IsCancellationRequested)
            {
                // Whatever the ledger throws, the entry stays in the journal and is tried again; only one that it alone refuses is set aside.
                Failed(exception);
                if (entry is not null && tries >= TriesBeforeSetAside && await AnswersAsync(stopping))
                {
                    Log.SetAside(logger, setAside.Keep(entry), exception);
                    return;
                }
            }

            TimeSpan wait = TimeSpan.FromSeconds(Math.Min(Math.Pow(2, Math.Min(tries - 1, 10)), LongestWait.TotalSeconds));
            await Task.Delay(wait, clock, stopping);
        }
    }

    private async Task RecordAsync(JournalEntry entry, CancellationToken cancellationToken)
    {
        if (entry.Transition is { } step)
        {
            await ledger.RecordAsync(step, entry.Messages ?? [], cancellationToken);
        }
        else if (entry.Settled is { } message)
        {
            await ledger.SettleAsync(message, cancellationToken);
        }
    }

    private async Task AdoptAsync(CancellationToken cancellationToken)
    {
        List<AlertTransition> open = [];
        foreach (Alert alert in await ledger.OpenAsync(cancellationToken))
        {
            IReadOnlyList<AlertTransition> steps = await ledger.TransitionsAsync(alert.Id, cancellationToken);
            open.Add(new AlertTransition(alert, steps.Count == 0 ? 1 : steps.Max(step => step.Sequence), alert.RaisedAt, string.Empty, string.Empty, null));
        }

        IReadOnlyList<OutboxMessage> pending = await ledger.DueAsync(Instant.Now(clock) + FarAhead, AdoptedAtOnce, cancellationToken);
        desk.Post(new DeskWork.Adopt(open, pending));
    }

    private async Task<bool> AnswersAsync(CancellationToken stopping)
    {
        try
        {
            await CallAsync(async token => await ledger.OpenAsync(token), stopping);
            return true;
        }
        catch (Exception exception) when (exception is not OperationCanceledException || !stopping.IsCancellationRequested)
        {
            // It does not answer at all, so it is not this entry's fault.
            return false;
        }
    }

    private async Task CallAsync(Func<CancellationToken, Task> call, CancellationToken stopping)
    {
        using CancellationTokenSource timeout = new(CallTime, clock);
        using CancellationTokenSource both = CancellationTokenSource.CreateLinkedTokenSource(timeout.Token, stopping);
        await call(both.Token).WaitAsync(both.Token);
    }

    private void Failed(Exception exception)
    {
        if (!_failing)
        {
            Log.LedgerFailed(logger, _waiting.Count, exception);
        }

        _failing = true;
    }

    private void Answered()
    {
        if (_failing)
        {
            Log.LedgerBack(logger);
        }

        _failing = false;
    }
}
