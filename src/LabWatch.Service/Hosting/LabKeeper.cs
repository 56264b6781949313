using LabWatch.Lab.Findings;
using LabWatch.Lab.Time;
using LabWatch.Records;
using LabWatch.Records.Revisions;

namespace LabWatch.Service.Hosting;

/// <summary>
/// Keeps what is in force and what is on record the same. The service does not wait for it: hazards are watched and readings are taken
/// without a records database; a lab file that is not on record yet is imported as soon as that answers, and revisions that another node
/// recorded come into force.
/// </summary>
internal sealed class LabKeeper(LabSnapshotSource lab, ILabRecords records, TimeProvider clock, ILogger<LabKeeper> logger) : BackgroundService
{
    private static readonly TimeSpan LookEvery = TimeSpan.FromSeconds(10);
    private static readonly TimeSpan Retry = TimeSpan.FromSeconds(5);

    private LabOrder? _pending = lab.Pending ?? (lab.Sequence == 0 ? new LabOrder(lab.Text, "the lab file in force", "labwatch") : null);

    /// <summary>Why a lab file given at the start is not on record; empty where it is.</summary>
    public IReadOnlyList<Finding> Refused { get; private set; } = [];

    /// <summary>One look: the import that is still to be made, then what has been recorded elsewhere.</summary>
    public async Task LookAsync(CancellationToken cancellationToken)
    {
        if (_pending is { } order)
        {
            LabImportOutcome outcome = await records.ImportAsync(
                new LabImportOrder(order.Document, order.FileName, order.Author, Instant.Now(clock)) { Reason = order.Reason, Accept = order.Accept }, cancellationToken);
            _pending = null;
            Refused = outcome.Refused;
            foreach (Finding finding in outcome.Refused)
            {
                HostLog.LabRefused(logger, finding);
            }

            if (outcome is { Records: { } after, Import: { } import })
            {
                HostLog.LabInForce(logger, import.Site, import.Sequence, import.Digest);
                Adopt(after);
            }
        }

        string site = lab.Current.Site.Id;
        if (await records.HeadAsync(site, cancellationToken) > lab.Sequence)
        {
            Adopt(await records.ReadAsync(site, cancellationToken));
        }
    }

    /// <inheritdoc/>
    protected override async Task ExecuteAsync(CancellationToken stoppingToken)
    {
        while (!stoppingToken.IsCancellationRequested)
        {
            TimeSpan pause = LookEvery;
            try
            {
                await LookAsync(stoppingToken);
            }
            catch (RecordsUnavailableException exception)
            {
                HostLog.LabNotRecorded(logger, exception.Message);
                pause = Retry;
            }

            // Of real time: a demo that runs faster needs no more looks.
            await Task.Delay(pause, TimeProvider.System, stoppingToken).ConfigureAwait(ConfigureAwaitOptions.SuppressThrowing);
        }
    }

    private void Adopt(LabRecordSet set)
    {
        IReadOnlyList<Finding> findings = lab.Adopt(set);
        foreach (Finding finding in findings)
        {
            HostLog.LabRefused(logger, finding);
        }
    }
}
