using LabWatch.Lab.Findings;
using LabWatch.Records.Alerts;

namespace LabWatch.Alerts;

/// <summary>
/// The alerts that are open now, hazards included, from memory: it answers whether the records database does or not. Thread-safe.
/// </summary>
public interface IAlertBoard
{
    /// <summary>
    /// Raised for each step of each alert, in order, from one thread. Handlers return at once and do not throw. To follow without a gap:
    /// subscribe, then take <see cref="View"/>, then leave out changes whose number is not above the view's.
    /// </summary>
    event EventHandler<AlertBoardChange>? Changed;

    /// <summary>What keeps hazards from being watched as somebody may expect, under the present lab file.</summary>
    IReadOnlyList<Finding> Findings { get; }

    /// <summary>Steps that wait to be recorded in the database; more than a few for long means that it does not answer.</summary>
    int WaitingForLedger { get; }

    /// <summary>Whether the last write of the local alert journal failed, so that steps are in memory only.</summary>
    bool JournalFailing { get; }

    /// <summary>The open alerts; a standing hot surface shows the latest value of its sensor.</summary>
    AlertBoardView View();

    /// <summary>
    /// Acknowledges an alert; works without the records database, and is recorded there later. Acknowledging again changes nothing and gives
    /// the alert as it is. Completes when the step is durable, or when the disk was waited for as long as the options say.
    /// </summary>
    /// <param name="id">Id of the alert.</param>
    /// <param name="by">Who acknowledges, 1 to 100 characters.</param>
    /// <param name="note">What that person has to say, at most 2000 characters; null for nothing.</param>
    /// <param name="cancellationToken">Stops waiting; the acknowledgement may still happen.</param>
    ValueTask<AcknowledgeResult> AcknowledgeAsync(Guid id, string by, string? note, CancellationToken cancellationToken);

    /// <summary>Shelves an alert, or takes it out of service: people are not told of it until that ends. Never a hazard.</summary>
    /// <param name="id">Id of the alert.</param>
    /// <param name="by">Who decides it.</param>
    /// <param name="length">For how long; null for out of service.</param>
    /// <param name="reason">Why, 1 to 1000 characters.</param>
    /// <param name="cancellationToken">Stops waiting; it may still happen.</param>
    ValueTask<AcknowledgeResult> ShelveAsync(Guid id, string by, TimeSpan? length, string? reason, CancellationToken cancellationToken);

    /// <summary>Ends a shelf, or puts an alert back into service: what stands needs a new acknowledgement.</summary>
    ValueTask<AcknowledgeResult> UnshelveAsync(Guid id, string by, string? note, CancellationToken cancellationToken);

    /// <summary>The messages still to be sent, with attempts made and the last error.</summary>
    IReadOnlyList<OutboxMessage> PendingMessages();
}
