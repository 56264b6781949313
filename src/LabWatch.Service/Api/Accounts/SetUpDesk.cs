using System.Security.Cryptography;
using System.Text;
using LabWatch.Lab;
using LabWatch.Lab.Time;
using LabWatch.Records;
using LabWatch.Records.Accounts;
using LabWatch.Records.Accounts.Passwords;
using LabWatch.Service.Api.Access;

namespace LabWatch.Service.Api.Accounts;

/// <summary>
/// The first start: while nobody has an account, whoever knows the code that the service printed makes the first administrator. There is
/// no password to begin with that could stay in place.
/// </summary>
internal sealed class SetUpDesk(
    IAccountLedger accounts, PasswordHasher hasher, ILabSnapshotSource lab, TimeProvider labClock, SessionClock clock, ILogger<SetUpDesk> logger,
    DemoCredentials demo, SetUpFile? file = null) : BackgroundService
{
    private static readonly TimeSpan Retry = TimeSpan.FromSeconds(5);

    private volatile string? _code;
    private volatile bool _isDone;

    /// <summary>Whether nobody has an account yet.</summary>
    public async ValueTask<bool> IsNeededAsync(CancellationToken cancellationToken)
    {
        // In a demo the people come by themselves; and accounts never go away again.
        _isDone = _isDone || demo.Codes.Count > 0 || await accounts.AnyAsync(lab.Current.Site.Id, cancellationToken);
        return !_isDone;
    }

    /// <summary>Whether a text is the code.</summary>
    public bool IsCode(string? text) =>
        _code is { } code && CryptographicOperations.FixedTimeEquals(SHA256.HashData(Encoding.UTF8.GetBytes(code)), SHA256.HashData(Encoding.UTF8.GetBytes(text?.Trim() ?? string.Empty)));

    /// <summary>Makes the first administrator. The caller has checked code, names and password.</summary>
    /// <returns>What became of it; null where too many hashes wait.</returns>
    public async Task<AccountOutcome?> FinishAsync(string name, string displayName, string password, CancellationToken cancellationToken)
    {
        PasswordHash? hash = await hasher.HashAsync(password, cancellationToken);
        if (hash is null)
        {
            return null;
        }

        Instant now = Instant.Now(labClock);
        Account account = new(name, 1, displayName, [Role.Administrator], false, false, hash, now, null, 0);
        AccountOutcome outcome = await accounts.AddAsync(lab.Current.Site.Id, account, name, now, isFirst: true, cancellationToken);
        if (outcome is AccountOutcome.Done or AccountOutcome.NotTheFirst)
        {
            Close();
        }

        if (outcome is AccountOutcome.Done)
        {
            AccessLog.SetUpDone(logger, name);
        }

        return outcome;
    }

    protected override async Task ExecuteAsync(CancellationToken stoppingToken)
    {
        while (!stoppingToken.IsCancellationRequested)
        {
            try
            {
                await OpenAsync(stoppingToken);
                return;
            }
            catch (RecordsUnavailableException failure)
            {
                AccessLog.SetUpUnknown(logger, failure.Message);
            }

            await Task.Delay(Retry, clock.Clock, stoppingToken).ConfigureAwait(ConfigureAwaitOptions.SuppressThrowing);
        }
    }

    private async Task OpenAsync(CancellationToken cancellationToken)
    {
        if (!await IsNeededAsync(cancellationToken))
        {
            file?.Delete();
            return;
        }

        string code = OneTimePassword.Draw();
        file?.Keep(code);
        _code = code;
        AccessLog.SetUpNeeded(logger, code, file?.Path ?? string.Empty);
    }

    private void Close()
    {
        _isDone = true;
        _code = null;
        file?.Delete();
    }
}
