using System.Collections.Concurrent;
using System.Collections.Immutable;
using LabWatch.Lab;
using LabWatch.Lab.Time;
using LabWatch.Records;
using LabWatch.Records.Accounts;

namespace LabWatch.Service.Api.Access;

/// <summary>
/// Finds callers by session or token. What was found counts for some seconds, so that a page full of requests asks the records once; while
/// the records do not answer, it goes on counting, because hazards must be seen then too. What this process ends is forgotten at once.
/// </summary>
internal sealed class SignedInCallers(
    ISessionLedger ledger, ILabSnapshotSource lab, SessionClock clock, AccessOptions options, LastUses uses) : ICallers
{
    /// <summary>How long what was found counts: what another process ended is noticed after this time.</summary>
    public static readonly TimeSpan Fresh = TimeSpan.FromSeconds(5);

    private readonly ConcurrentDictionary<Credential, Entry> _known = new();

    public async ValueTask<Caller?> FindAsync(HttpContext http)
    {
        Credential? credential = Credential.Of(http.Request);
        if (credential is null)
        {
            return null;
        }

        Entry? entry = await LookAsync(credential, http.RequestAborted);
        Caller? caller = entry is null ? null : CallerOf(entry, clock.Now);
        if (caller is null)
        {
            _known.TryRemove(credential, out _);
        }

        return caller;
    }

    /// <summary>Forgets everything that was found about an account.</summary>
    public void Forget(string account)
    {
        foreach (KeyValuePair<Credential, Entry> entry in _known.Where(entry => entry.Value.Account.Name == account))
        {
            _known.TryRemove(entry);
        }
    }

    /// <summary>Forgets everything that was found about tokens.</summary>
    public void ForgetTokens()
    {
        foreach (Credential credential in _known.Keys.Where(credential => credential.IsToken))
        {
            _known.TryRemove(credential, out _);
        }
    }

    private async ValueTask<Entry?> LookAsync(Credential credential, CancellationToken cancellationToken)
    {
        Entry? known = _known.GetValueOrDefault(credential);
        long now = clock.Clock.GetTimestamp();
        if (known is not null && clock.Clock.GetElapsedTime(known.Stamp, now) < Fresh)
        {
            return known;
        }

        try
        {
            Entry? found = await AskAsync(credential, now, cancellationToken);
            if (found is not null)
            {
                _known[credential] = found;
            }

            return found;
        }
        catch (RecordsUnavailableException) when (known is not null)
        {
            _known[credential] = known with { Stamp = now };
            return known;
        }
    }

    private async ValueTask<Entry?> AskAsync(Credential credential, long now, CancellationToken cancellationToken)
    {
        string site = lab.Current.Site.Id;
        if (credential.IsToken)
        {
            return await ledger.FindTokenAsync(site, credential.Digest, cancellationToken) is { } token ? new Entry(null, token.Token, token.Account, now) : null;
        }

        return await ledger.FindAsync(site, credential.Digest, cancellationToken) is { } session ? new Entry(session.Session, null, session.Account, now) : null;
    }

    private Caller? CallerOf(Entry entry, Instant now)
    {
        if (entry.Account.IsDisabled)
        {
            return null;
        }

        return entry.Session is { } session ? OfSession(session, entry.Account, now) : OfToken(entry.Token!, entry.Account, now);
    }

    private Caller? OfSession(Session session, Account account, Instant now)
    {
        Instant used = uses.Find(session.Id) is { } later && later > session.LastUsedAt ? later : session.LastUsedAt;
        if (now >= session.ExpiresAt || now - used >= options.IdleTime)
        {
            return null;
        }

        uses.OfSession(session.Id, now);
        TimeSpan since = now - session.ConfirmedAt;
        return new Caller(account.Name, account.DisplayName, account.Roles)
        {
            Session = session.Id,
            ExpiresAt = session.ExpiresAt,
            ConfirmedAt = session.ConfirmedAt,
            MustChangePassword = account.MustChangePassword,
            ToBeConfirmed = [.. Enum.GetValues<Permission>().Where(permission => since >= Confirmation(permission))],
        };
    }

    private Caller? OfToken(ApiToken token, Account account, Instant now)
    {
        if (token.RevokedAt is not null || now >= token.ExpiresAt)
        {
            return null;
        }

        uses.OfToken(token.Id, now);
        ImmutableArray<Role> roles = [.. token.Roles.Intersect(account.Roles)];
        return new Caller(account.Name, account.DisplayName, roles) { ExpiresAt = token.ExpiresAt, MustChangePassword = account.MustChangePassword };
    }

    private TimeSpan Confirmation(Permission permission) => permission switch
    {
        Permission.Read or Permission.ReadTrail => TimeSpan.MaxValue,
        Permission.ManageAccounts => options.ConfirmAdministrationWithin,
        _ => options.ConfirmChangesWithin,
    };

    private sealed record Entry(Session? Session, ApiToken? Token, Account Account, long Stamp);
}
