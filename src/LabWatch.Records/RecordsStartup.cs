using LabWatch.Records.Storage;
using Microsoft.Extensions.Hosting;
using Microsoft.Extensions.Logging;

namespace LabWatch.Records;

/// <summary>
/// Prepares the database when the service starts. A database that cannot be reached does not hold the start up, because hazards are
/// watched without it; one that is newer than the program ends it.
/// </summary>
internal sealed class RecordsStartup(RecordsDatabase database, ILogger<RecordsStartup> logger) : IHostedService
{
    public async Task StartAsync(CancellationToken cancellationToken)
    {
        try
        {
            await database.PrepareAsync(cancellationToken);
        }
        catch (RecordsUnavailableException exception)
        {
            RecordsLog.NotReady(logger, exception.Message);
        }
    }

    public Task StopAsync(CancellationToken cancellationToken) => Task.CompletedTask;
}
