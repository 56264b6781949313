using LabWatch.Lab.Findings;
using LabWatch.Lab.LabFile;
using LabWatch.Lab.Time;
using LabWatch.Records;
using LabWatch.Records.Revisions;

namespace LabWatch.Service.Hosting;

/// <summary>
/// Finds the lab that a start begins with. Hazards must not wait for a database: where nothing has changed none is asked, and where one
/// does not answer soon the start goes on with what is known and the import is made later.
/// </summary>
internal sealed class LabStart(string dataDirectory, RecordsOptions options, TimeProvider clock)
{
    private readonly string _cache = LabSnapshotSource.CachePath(dataDirectory);

    /// <summary>How long the records are waited for.</summary>
    public TimeSpan Patience { get; init; } = TimeSpan.FromSeconds(5);

    /// <summary>The lab to begin with, or all that speaks against it.</summary>
    /// <param name="order">The lab file given; null to go on with what is in force.</param>
    /// <param name="lookOnly">Whether to change nothing, because the start cannot be made for another reason.</param>
    /// <param name="cancellationToken">Ends the wait.</param>
    public async Task<(LabSnapshotSource? Lab, IReadOnlyList<Finding> Findings)> LoadAsync(LabOrder? order, bool lookOnly, CancellationToken cancellationToken)
    {
        try
        {
            return await FindAsync(order, lookOnly, cancellationToken);
        }
        catch (RecordsVersionException exception)
        {
            return (null, [Newer(exception)]);
        }
    }

    /// <summary>The finding for records that a newer program has written.</summary>
    internal static Finding Newer(RecordsVersionException exception) =>
        new("records-newer", "--data", exception.Message, null, "Install the newer version again, or restore the backup from before the upgrade.");

    private async Task<(LabSnapshotSource? Lab, IReadOnlyList<Finding> Findings)> FindAsync(LabOrder? order, bool lookOnly, CancellationToken cancellationToken)
    {
        LabInForce? known = Known();
        if (order is null or { IsFirst: true })
        {
            (LabSnapshotSource? lab, IReadOnlyList<Finding> findings) = known is null ? await FromRecordsAsync(cancellationToken) : LabSnapshotSource.Of(known.Text, _cache);
            if (lab is not null || order is null)
            {
                return (lab, findings);
            }
        }

        if (known?.Recorded?.ImportDigest is { } digest && string.Equals(digest, LabInForce.DigestOf(order.Document), StringComparison.Ordinal))
        {
            return LabSnapshotSource.Of(known.Text, _cache);
        }

        LabImportOutcome? outcome = await AskAsync(records => records.ImportAsync(
            new LabImportOrder(order.Document, order.FileName, order.Author, Instant.Now(clock)) { Reason = order.Reason, Accept = order.Accept, DryRun = lookOnly }, cancellationToken));
        if (outcome is null)
        {
            // No database: what was in force before, else the file as it stands.
            return LabSnapshotSource.Of(known?.Text ?? order.Document, _cache, order);
        }

        return outcome switch
        {
            { Refused.Count: > 0 } => (null, outcome.Refused),
            { Records: { } recorded } => LabSnapshotSource.Of(recorded.Compose()!, _cache),
            _ => (null, []),
        };
    }

    private LabInForce? Known() =>
        File.Exists(_cache) && LabSnapshotSource.ReadFile(_cache).Text is { } text ? LabInForce.Read(text).InForce : null;

    private async Task<(LabSnapshotSource? Lab, IReadOnlyList<Finding> Findings)> FromRecordsAsync(CancellationToken cancellationToken)
    {
        LabRecordSet? only = await AskAsync(async records =>
            await records.SitesAsync(cancellationToken) is [{ } site] ? await records.ReadAsync(site, cancellationToken) : null!);
        if (only?.Compose() is { } text)
        {
            return LabSnapshotSource.Of(text, _cache);
        }

        (ReadOnlyMemory<byte>? kept, _) = File.Exists(_cache) ? LabSnapshotSource.ReadFile(_cache) : (null, null);
        return (null, kept is { } spoilt
            ? LabFileReader.Read(spoilt).Findings
            : [new Finding("no-lab-file", "--lab", "There is no lab file yet.", null, "Name one with --lab FILE; `labwatch demo` shows a lab without one.")]);
    }

    /// <summary>Asks the records; null where they do not answer in time. What was asked then still ends by itself.</summary>
    private async Task<T?> AskAsync<T>(Func<ILabRecords, ValueTask<T>> ask)
        where T : class
    {
        Task<T> answer = Task.Run(async () =>
        {
            await using ServiceProvider services = new ServiceCollection().AddSingleton(clock).AddLabWatchRecords(options).BuildServiceProvider();
            return await ask(services.GetRequiredService<ILabRecords>());
        });
        try
        {
            return await answer.WaitAsync(Patience);
        }
        catch (Exception exception) when (exception is RecordsUnavailableException or TimeoutException)
        {
            _ = answer.ContinueWith(static late => late.Exception, TaskScheduler.Default);
            return null;
        }
    }
}
