using LabWatch.Lab.Time;
using LabWatch.Records.Audit;
using LabWatch.Records.Storage;
using LabWatch.Records.Storage.Rows;
using Microsoft.EntityFrameworkCore;

namespace LabWatch.Records.Accounts;

/// <summary>Sessions and tokens in the records database.</summary>
internal sealed class SessionLedger(RecordsDatabase database) : ISessionLedger
{
    public async ValueTask StartAsync(string site, Session session, string digest, Instant at, Guid? replaces, CancellationToken cancellationToken) =>
        await database.WriteAsync(
            async context =>
            {
                await context.Sessions.Where(row => row.ExpiresAt <= session.StartedAt.Microseconds || row.Id == replaces).ExecuteDeleteAsync(cancellationToken);
                context.Sessions.Add(ToRow(site, session, digest));
                if (replaces is null)
                {
                    AccountUseRow use = await AccountRows.UseAsync(context, site, session.Account, cancellationToken);
                    use.LastSignInAt = at.Microseconds;
                    use.Failures = 0;
                    await AuditChain.AppendAsync(context, AccountNotes.SignedIn(site, session, at), cancellationToken);
                }

                return 0;
            },
            cancellationToken);

    public ValueTask<(Session Session, Account Account)?> FindAsync(string site, string digest, CancellationToken cancellationToken) =>
        database.ReadAsync<(Session, Account)?>(
            async context =>
            {
                SessionRow? row = await context.Sessions.FirstOrDefaultAsync(row => row.Digest == digest && row.Site == site, cancellationToken);
                return row is not null && await AccountRows.FindAsync(context, site, row.Account, cancellationToken) is { } account ? (ToSession(row), account) : null;
            },
            cancellationToken);

    public async ValueTask<IReadOnlyList<Session>> ListAsync(string site, string account, CancellationToken cancellationToken)
    {
        List<SessionRow> rows = await database.ReadAsync(
            context => context.Sessions.Where(row => row.Site == site && row.Account == account).OrderByDescending(row => row.StartedAt).ToListAsync(cancellationToken),
            cancellationToken);
        return rows.ConvertAll(ToSession);
    }

    public ValueTask<bool> EndAsync(string site, string account, Guid id, Instant at, CancellationToken cancellationToken) =>
        database.WriteAsync(
            async context =>
            {
                int ended = await context.Sessions.Where(row => row.Id == id && row.Site == site && row.Account == account).ExecuteDeleteAsync(cancellationToken);
                if (ended > 0)
                {
                    await AuditChain.AppendAsync(context, AccountNotes.SignedOut(site, account, id, at), cancellationToken);
                }

                return ended > 0;
            },
            cancellationToken);

    public async ValueTask EndAllAsync(string site, IReadOnlyList<string> accounts, CancellationToken cancellationToken) =>
        await database.WriteAsync(
            context => context.Sessions.Where(row => row.Site == site && accounts.Contains(row.Account)).ExecuteDeleteAsync(cancellationToken), cancellationToken);

    public async ValueTask ConfirmAsync(Guid id, Instant confirmedAt, CancellationToken cancellationToken) =>
        await database.WriteAsync(
            context => context.Sessions.Where(row => row.Id == id).ExecuteUpdateAsync(row => row.SetProperty(target => target.ConfirmedAt, confirmedAt.Microseconds), cancellationToken),
            cancellationToken);

    public async ValueTask AddTokenAsync(string site, ApiToken token, string digest, CancellationToken cancellationToken) =>
        await database.WriteAsync(
            async context =>
            {
                TokenRow row = ToRow(site, token, digest);
                context.Tokens.Add(row);
                await AuditChain.CoverAsync(context, row, AccountNotes.TokenCreated(site, token), cancellationToken);
                return 0;
            },
            cancellationToken);

    public ValueTask<(ApiToken Token, Account Account)?> FindTokenAsync(string site, string digest, CancellationToken cancellationToken) =>
        database.ReadAsync<(ApiToken, Account)?>(
            async context =>
            {
                TokenRow? row = await context.Tokens.FirstOrDefaultAsync(row => row.Digest == digest && row.Site == site, cancellationToken);
                return row is not null && await AccountRows.FindAsync(context, site, row.Account, cancellationToken) is { } account ? (ToToken(row), account) : null;
            },
            cancellationToken);

    public async ValueTask<IReadOnlyList<ApiToken>> ListTokensAsync(string site, string? account, CancellationToken cancellationToken)
    {
        List<TokenRow> rows = await database.ReadAsync(
            context => context.Tokens.Where(row => row.Site == site && (account == null || row.Account == account)).OrderByDescending(row => row.CreatedAt).ToListAsync(cancellationToken),
            cancellationToken);
        return rows.ConvertAll(ToToken);
    }

    public ValueTask<bool> RevokeTokenAsync(string site, string? account, Guid id, string by, Instant at, CancellationToken cancellationToken) =>
        database.WriteAsync(
            async context =>
            {
                TokenRow? row = await context.Tokens.FirstOrDefaultAsync(row => row.Id == id && row.Site == site && (account == null || row.Account == account), cancellationToken);
                if (row is { RevokedAt: null })
                {
                    row.RevokedAt = at.Microseconds;
                    row.RevokedBy = by;
                    await AuditChain.CoverAsync(context, row, AccountNotes.TokenRevoked(site, row.Account, row.Name, by, at), cancellationToken);
                }

                return row is not null;
            },
            cancellationToken);

    public async ValueTask UsedAsync(IReadOnlyDictionary<Guid, Instant> sessions, IReadOnlyDictionary<Guid, Instant> tokens, CancellationToken cancellationToken) =>
        await database.WriteAsync(
            async context =>
            {
                foreach ((Guid id, Instant used) in sessions)
                {
                    await context.Sessions.Where(row => row.Id == id && row.LastUsedAt < used.Microseconds)
                        .ExecuteUpdateAsync(row => row.SetProperty(target => target.LastUsedAt, used.Microseconds), cancellationToken);
                }

                foreach ((Guid id, Instant used) in tokens)
                {
                    await context.Tokens.Where(row => row.Id == id && (row.LastUsedAt == null || row.LastUsedAt < used.Microseconds))
                        .ExecuteUpdateAsync(row => row.SetProperty(target => target.LastUsedAt, used.Microseconds), cancellationToken);
                }

                return 0;
            },
            cancellationToken);

    private static SessionRow ToRow(string site, Session session, string digest) => new()
    {
        Id = session.Id,
        Site = site,
        Account = session.Account,
        Digest = digest,
        StartedAt = session.StartedAt.Microseconds,
        ConfirmedAt = session.ConfirmedAt.Microseconds,
        LastUsedAt = session.LastUsedAt.Microseconds,
        ExpiresAt = session.ExpiresAt.Microseconds,
        Address = session.Address,
        Agent = session.Agent,
    };

    private static Session ToSession(SessionRow row) => new(
        row.Id, row.Account, new Instant(row.StartedAt), new Instant(row.ConfirmedAt), new Instant(row.LastUsedAt), new Instant(row.ExpiresAt), row.Address, row.Agent);

    private static TokenRow ToRow(string site, ApiToken token, string digest) => new()
    {
        Id = token.Id,
        Site = site,
        Account = token.Account,
        Name = token.Name,
        Digest = digest,
        Roles = RoleWords.Join(token.Roles),
        CreatedAt = token.CreatedAt.Microseconds,
        ExpiresAt = token.ExpiresAt.Microseconds,
    };

    private static ApiToken ToToken(TokenRow row) => new(
        row.Id, row.Account, row.Name, RoleWords.Split(row.Roles), new Instant(row.CreatedAt), new Instant(row.ExpiresAt),
        row.LastUsedAt is { } used ? new Instant(used) : null, row.RevokedAt is { } revoked ? new Instant(revoked) : null);
}
