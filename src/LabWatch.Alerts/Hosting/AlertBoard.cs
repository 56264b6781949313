using System.Globalization;
using LabWatch.Alerts.Desk;
using LabWatch.Alerts.Hazards;
using LabWatch.Alerts.Recording;
using LabWatch.Lab.Alerts;
using LabWatch.Lab.Findings;
using LabWatch.Lab.Time;
using LabWatch.Records.Alerts;

namespace LabWatch.Alerts.Hosting;

/// <inheritdoc cref="IAlertBoard"/>
internal sealed class AlertBoard(
    DeskQueue queue, AlertDesk desk, HazardWatch watch, LedgerRecorder recorder, AlertJournalHandle journal, IAlertLedger ledger, AlertsOptions options,
    TimeProvider clock) : IAlertBoard
{
    private const int LongestName = 100;
    private const int LongestNote = 2000;
    private static readonly TimeSpan LedgerTime = TimeSpan.FromSeconds(5);

    /// <inheritdoc/>
    public event EventHandler<AlertBoardChange>? Changed
    {
        add => desk.Changed += value;
        remove => desk.Changed -= value;
    }

    /// <inheritdoc/>
    public IReadOnlyList<Finding> Findings => watch.Findings;

    /// <inheritdoc/>
    public int WaitingForLedger => recorder.Waiting;

    /// <inheritdoc/>
    public bool JournalFailing => journal.Writer.Failing;

    /// <inheritdoc/>
    public AlertBoardView View()
    {
        AlertBoardView view = desk.View;
        return view with { Open = [.. view.Open.Select(watch.WithLatest)] };
    }

    /// <inheritdoc/>
    public async ValueTask<AcknowledgeResult> AcknowledgeAsync(Guid id, string by, string? note, CancellationToken cancellationToken)
    {
        List<Finding> findings = Check(by, note);
        if (findings.Count > 0)
        {
            return new AcknowledgeResult(null, findings);
        }

        TaskCompletionSource<Alert?> answer = new(TaskCreationOptions.RunContinuationsAsynchronously);
        queue.Post(new DeskWork.Acknowledge(id, by, string.IsNullOrWhiteSpace(note) ? null : note, answer));
        Alert? alert = await answer.Task.WaitAsync(cancellationToken) ?? await FromLedgerAsync(id, cancellationToken);
        return new AcknowledgeResult(alert, []);
    }

    /// <inheritdoc/>
    public async ValueTask<AcknowledgeResult> ShelveAsync(Guid id, string by, TimeSpan? length, string? reason, CancellationToken cancellationToken)
    {
        Alert? open = desk.View.Open.FirstOrDefault(alert => alert.Id == id);
        List<Finding> findings = [.. Check(by, null), .. ShelfChecks.Of(open, length, reason, options.ShelfLongest)];
        if (findings.Count > 0 || open is null)
        {
            return new AcknowledgeResult(null, findings);
        }

        Instant now = Instant.Now(clock);
        AlertShelf shelf = new(by, now, length is { } time ? now + time : null, reason!.Trim());
        TaskCompletionSource<Alert?> answer = new(TaskCreationOptions.RunContinuationsAsynchronously);
        queue.Post(new DeskWork.Shelve(id, shelf, answer));
        return new AcknowledgeResult(await answer.Task.WaitAsync(cancellationToken), []);
    }

    /// <inheritdoc/>
    public async ValueTask<AcknowledgeResult> UnshelveAsync(Guid id, string by, string? note, CancellationToken cancellationToken)
    {
        List<Finding> findings = Check(by, note);
        if (findings.Count > 0)
        {
            return new AcknowledgeResult(null, findings);
        }

        TaskCompletionSource<Alert?> answer = new(TaskCreationOptions.RunContinuationsAsynchronously);
        queue.Post(new DeskWork.Unshelve(id, by, string.IsNullOrWhiteSpace(note) ? null : note, answer));
        return new AcknowledgeResult(await answer.Task.WaitAsync(cancellationToken), []);
    }

    /// <inheritdoc/>
    public IReadOnlyList<OutboxMessage> PendingMessages() => desk.Pending;

    // An alert that is over long since: the ledger knows it, if it answers.
    private async Task<Alert?> FromLedgerAsync(Guid id, CancellationToken cancellationToken)
    {
        try
        {
            using CancellationTokenSource timeout = new(LedgerTime, clock);
            using CancellationTokenSource both = CancellationTokenSource.CreateLinkedTokenSource(timeout.Token, cancellationToken);
            return await ledger.FindAsync(id, both.Token).AsTask().WaitAsync(both.Token);
        }
        catch (Exception) when (!cancellationToken.IsCancellationRequested)
        {
            // The ledger does not answer, and the alert is not open: as far as is known there is none.
            return null;
        }
    }

    private static List<Finding> Check(string by, string? note)
    {
        List<Finding> findings = [];
        if (string.IsNullOrWhiteSpace(by) || by.Length > LongestName)
        {
            findings.Add(new Finding(
                "bad-name", "by", "An acknowledgement needs the name of the person.", Finding.Quote(by),
                string.Create(CultureInfo.InvariantCulture, $"Give 1 to {LongestName} characters.")));
        }

        if (note?.Length > LongestNote)
        {
            findings.Add(new Finding(
                "note-too-long", "note", "The note is too long.", Finding.Quote(note),
                string.Create(CultureInfo.InvariantCulture, $"Give at most {LongestNote} characters.")));
        }

        return findings;
    }
}
