using LabWatch.Records.Storage;
using Microsoft.Extensions.Hosting;
using Microsoft.Extensions.Logging;

namespace LabWatch.Records;

/// <summary>
/// Prepares the database beside the start of the service: hazards are watched without it, so that a locked file or a server that is away
/// must not hold them up. A database that is newer than the program ends the service.
/// </summary>
internal sealed class RecordsStartup(RecordsDatabase database, ILogger<RecordsStartup> logger) : BackgroundService
{
    protected override Task ExecuteAsync(CancellationToken stoppingToken) => Task.Run(
        async () =>
        {
            try
            {
                await database.PrepareAsync(stoppingToken);
            }
            catch (RecordsUnavailableException exception)
            {
                RecordsLog.NotReady(logger, exception.Message);
            }
            catch (OperationCanceledException) when (stoppingToken.IsCancellationRequested)
            {
                // Stopping before it answered; whoever needs it prepares it.
            }
        },
        stoppingToken);
}
