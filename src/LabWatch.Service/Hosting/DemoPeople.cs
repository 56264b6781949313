using LabWatch.Lab;
using LabWatch.Lab.Time;
using LabWatch.Records;
using LabWatch.Records.Accounts;
using LabWatch.Service.Api.Access;

namespace LabWatch.Service.Hosting;

/// <summary>
/// The invented people of the demo, one a role. They have no passwords: the codes that the demo prints are in memory alone. Sessions of an
/// earlier run end.
/// </summary>
internal sealed class DemoPeople(
    IAccountLedger accounts, ISessionLedger sessions, ILabSnapshotSource lab, TimeProvider labClock, ILogger<DemoPeople> logger) : BackgroundService
{
    private static readonly TimeSpan Retry = TimeSpan.FromSeconds(2);

    /// <summary>The people: name of the account, name for people, role.</summary>
    public static IReadOnlyList<(string Name, string DisplayName, Role Role)> All { get; } =
    [
        ("technician", "Wren Tolliver", Role.Technician),
        ("quality-manager", "Sorrel Quince", Role.QualityManager),
        ("auditor", "Lark Fenwillow", Role.Auditor),
        ("administrator", "Moss Tarnley", Role.Administrator),
    ];

    protected override async Task ExecuteAsync(CancellationToken stoppingToken)
    {
        while (!stoppingToken.IsCancellationRequested)
        {
            try
            {
                await RecordAsync(stoppingToken);
                return;
            }
            catch (RecordsUnavailableException failure)
            {
                AccessLog.PeopleNotRecorded(logger, failure.Message);
            }

            await Task.Delay(Retry, TimeProvider.System, stoppingToken).ConfigureAwait(ConfigureAwaitOptions.SuppressThrowing);
        }
    }

    private async Task RecordAsync(CancellationToken cancellationToken)
    {
        string site = lab.Current.Site.Id;
        Instant now = Instant.Now(labClock);
        await sessions.EndAllAsync(site, [.. All.Select(person => person.Name)], cancellationToken);
        foreach ((string name, string displayName, Role role) in All)
        {
            Account account = new(name, 1, displayName, [role], false, false, null, now, null, 0);
            await accounts.AddAsync(site, account, "labwatch", now, isFirst: false, cancellationToken);
        }
    }
}
