using System.Text;
using LabWatch.Lab.Time;
using LabWatch.Records;
using LabWatch.Records.LabFiles;

namespace LabWatch.Service.Hosting;

/// <summary>
/// Puts the lab file in force on the record. The service does not wait for it: hazards are watched and readings are taken without a
/// records database, and the import is made as soon as that answers.
/// </summary>
internal sealed class LabImporter(LabSnapshotSource lab, ILabImportLedger ledger, TimeProvider clock, ILogger<LabImporter> logger) : BackgroundService
{
    private static readonly TimeSpan Retry = TimeSpan.FromSeconds(5);

    protected override async Task ExecuteAsync(CancellationToken stoppingToken)
    {
        string text = Encoding.UTF8.GetString(lab.Text.Span);
        while (!stoppingToken.IsCancellationRequested)
        {
            try
            {
                LabImport import = await ledger.RecordAsync(lab.Current.Site.Id, text, Instant.Now(clock), "labwatch", stoppingToken);
                HostLog.LabInForce(logger, import.Site, import.Sequence, import.Digest);
                return;
            }
            catch (RecordsUnavailableException exception)
            {
                HostLog.LabNotRecorded(logger, exception.Message);
            }

            await Task.Delay(Retry, clock, stoppingToken).ConfigureAwait(ConfigureAwaitOptions.SuppressThrowing);
        }
    }
}
