using LabWatch.Lab;
using LabWatch.Lab.Time;
using LabWatch.Records.Accounts;
using LabWatch.Records.Accounts.Passwords;
using LabWatch.Service.Api.Access;

namespace LabWatch.Service.Api.Accounts;

/// <summary>Where people sign in, go on, and change their passwords.</summary>
internal sealed class PeopleDesk(
    IAccountLedger accounts,
    ISessionLedger sessions,
    PasswordHasher hasher,
    SignInThrottle throttle,
    RefusalKeeper refusals,
    DemoCredentials demo,
    SignedInCallers callers,
    ILabSnapshotSource lab,
    TimeProvider labClock,
    SessionClock clock,
    AccessOptions options)
{
    private const int LongestAgent = 200;
    private const int LongestName = 63;
    private const int LongestPassword = 1_024;

    /// <summary>The site whose people these are.</summary>
    public string Site => lab.Current.Site.Id;

    /// <summary>
    /// Signs a person in and gives the cookie. A name that is no account takes as long as a wrong password and is answered the same.
    /// </summary>
    public async Task<SignInResult> SignInAsync(HttpContext http, string? name, string? password)
    {
        string slug = (name ?? string.Empty).Trim().ToLowerInvariant();
        string given = password ?? string.Empty;
        if (slug.Length > LongestName || given.Length > LongestPassword)
        {
            slug = string.Empty;
            given = string.Empty;
        }

        (SignInResult result, Account? account) = await CheckAsync(slug, given, http);
        if (result.Kind is SignInKind.Done)
        {
            await StartAsync(http, account!, null);
        }

        return result;
    }

    /// <summary>Checks the password of a person who is signed in, with the same throttling.</summary>
    public async Task<SignInResult> CheckAsync(HttpContext http, Caller caller, string? password) =>
        (await CheckAsync(caller.Name, password is { Length: <= LongestPassword } ? password : string.Empty, http)).Result;

    /// <summary>Starts a session and gives the cookie.</summary>
    public async Task<Caller> StartAsync(HttpContext http, Account account, Guid? replaces)
    {
        Instant now = clock.Now;
        string secret = Secret.DrawSession();
        Session session = new(Guid.CreateVersion7(), account.Name, now, now, now, now + options.LongestSession, ClientAddress.Of(http), AgentOf(http));
        await sessions.StartAsync(Site, session, Secret.DigestOf(secret), Instant.Now(labClock), replaces, http.RequestAborted);
        SessionCookie.Set(http, secret, options.LongestSession);
        Caller caller = new(account.Name, account.DisplayName, account.Roles)
        {
            Session = session.Id,
            ExpiresAt = session.ExpiresAt,
            ConfirmedAt = now,
            MustChangePassword = account.MustChangePassword,
        };
        http.Features.Set(caller);
        return caller;
    }

    /// <summary>Notes that the password was entered again.</summary>
    public async Task<Caller> ConfirmAsync(HttpContext http, Caller caller)
    {
        Instant now = clock.Now;
        await sessions.ConfirmAsync(caller.Session!.Value, now, http.RequestAborted);
        callers.Forget(caller.Name);
        return caller with { ConfirmedAt = now, ToBeConfirmed = [] };
    }

    /// <summary>Gives a person a new password; all sessions end, and this one goes on as a fresh one. False where too many hashes wait.</summary>
    public async Task<bool> ChangePasswordAsync(HttpContext http, Caller caller, string password)
    {
        PasswordHash? hash = await hasher.HashAsync(password, http.RequestAborted);
        if (hash is null)
        {
            return false;
        }

        await ChangeAsync(caller.Name, new AccountChange { Password = hash }, caller.Name, CancellationToken.None);
        Account account = (await accounts.FindAsync(Site, caller.Name, CancellationToken.None))!;
        await StartAsync(http, account, caller.Session);
        return true;
    }

    /// <summary>Changes an account, and lets the change count at once.</summary>
    public async Task<AccountOutcome> ChangeAsync(string name, AccountChange change, string by, CancellationToken cancellationToken)
    {
        AccountOutcome outcome = await accounts.ChangeAsync(Site, name, change, by, Instant.Now(labClock), cancellationToken);
        callers.Forget(name);
        if (outcome is AccountOutcome.Done && change.Password is not null)
        {
            throttle.Forgive(name, hasSucceeded: true);
        }

        return outcome;
    }

    private async Task<(SignInResult Result, Account? Account)> CheckAsync(string name, string password, HttpContext http)
    {
        Account? account = await accounts.FindAsync(Site, name, http.RequestAborted);
        if (throttle.TryEnter(name, account) is { } wait)
        {
            refusals.Refused(account?.Name, ClientAddress.Of(http));
            return (new SignInResult(SignInKind.TooMany, wait), null);
        }

        Account? open = account is { IsDisabled: false } ? account : null;
        bool? isRight = open is not null && demo.Is(name, password) ? true : await IsRightAsync(name, password, open, http.RequestAborted);
        switch (isRight)
        {
            case null:
                throttle.Forgive(name, hasSucceeded: false);
                return (new SignInResult(SignInKind.Busy), null);
            case false:
                refusals.Refused(account?.Name, ClientAddress.Of(http));
                return (new SignInResult(SignInKind.Wrong), null);
            default:
                throttle.Forgive(name, hasSucceeded: true);
                return (new SignInResult(SignInKind.Done), await StrengthenAsync(open!, password, http.RequestAborted));
        }
    }

    private async Task<bool?> IsRightAsync(string name, string password, Account? account, CancellationToken cancellationToken)
    {
        try
        {
            return await hasher.IsAsync(password, account?.Password, cancellationToken);
        }
        catch (OperationCanceledException)
        {
            // Whoever hangs up has not tried.
            throttle.Forgive(name, hasSucceeded: false);
            throw;
        }
    }

    // A hash that was made at a lower cost than is usual by now is made again while the password is known.
    private async Task<Account> StrengthenAsync(Account account, string password, CancellationToken cancellationToken)
    {
        if (account.Password is { } stored && hasher.IsOutgrown(stored) && !demo.Is(account.Name, password)
            && await hasher.HashAsync(password, cancellationToken) is { } hash)
        {
            await ChangeAsync(account.Name, new AccountChange { Password = hash, IsSamePassword = true }, "labwatch", cancellationToken);
        }

        return account;
    }

    private static string AgentOf(HttpContext http)
    {
        string agent = new([.. http.Request.Headers.UserAgent.ToString().Where(c => c is >= ' ' and < '\u007f').Take(LongestAgent)]);
        return agent;
    }
}
