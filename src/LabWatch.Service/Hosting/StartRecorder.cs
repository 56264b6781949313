using System.Reflection;
using System.Runtime.InteropServices;
using System.Text.Json.Nodes;
using LabWatch.Lab;
using LabWatch.Lab.Time;
using LabWatch.Records;
using LabWatch.Records.Audit;
using LabWatch.Service.Configuration;

namespace LabWatch.Service.Hosting;

/// <summary>
/// Enters the start of the service in the trail, with the version of the program and the digest of the configuration in force. The service
/// does not wait for it; the time entered is that of the start.
/// </summary>
internal sealed class StartRecorder(
    ILabSnapshotSource lab, ServiceSettings settings, IAuditLedger trail, TimeProvider clock, ILogger<StartRecorder> logger) : BackgroundService
{
    private static readonly TimeSpan Retry = TimeSpan.FromSeconds(5);

    /// <summary>Version of the program, with the commit it was built from where that is known.</summary>
    private static string Version =>
        typeof(StartRecorder).Assembly.GetCustomAttribute<AssemblyInformationalVersionAttribute>()?.InformationalVersion ?? "unknown";

    protected override async Task ExecuteAsync(CancellationToken stoppingToken)
    {
        AuditNote[] notes = Notes(lab.Current.Site.Id, Instant.Now(clock));
        while (!stoppingToken.IsCancellationRequested)
        {
            try
            {
                await trail.AppendAsync(notes, null, stoppingToken);
                return;
            }
            catch (RecordsUnavailableException exception)
            {
                HostLog.StartNotRecorded(logger, exception.Message);
            }

            await Task.Delay(Retry, TimeProvider.System, stoppingToken).ConfigureAwait(ConfigureAwaitOptions.SuppressThrowing);
        }
    }

    private AuditNote[] Notes(string site, Instant now) =>
    [
        new(site, now, AuditActor.Service, AuditActions.ServiceStarted, "service/labwatch", new JsonObject
        {
            ["version"] = Version,
            ["runtime"] = RuntimeInformation.FrameworkDescription,
            ["system"] = RuntimeInformation.OSDescription,
        }, null),
        new(site, now, AuditActor.Service, AuditActions.ConfigurationInForce, "configuration/service", ConfigurationDigest.Of(settings), null),
    ];
}
