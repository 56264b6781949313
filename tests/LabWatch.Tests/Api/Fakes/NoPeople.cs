using LabWatch.Lab.Time;
using LabWatch.Records.Accounts;

namespace LabWatch.Tests.Api.Fakes;

/// <summary>Ledgers of people for tests that are about something else: somebody has an account, nobody signs in.</summary>
internal sealed class NoPeople : IAccountLedger, ISessionLedger
{
    public ValueTask<bool> AnyAsync(string site, CancellationToken cancellationToken) => ValueTask.FromResult(true);

    public ValueTask<Account?> FindAsync(string site, string name, CancellationToken cancellationToken) => ValueTask.FromResult<Account?>(null);

    public ValueTask<IReadOnlyList<Account>> ListAsync(string site, CancellationToken cancellationToken) => ValueTask.FromResult<IReadOnlyList<Account>>([]);

    public ValueTask<AccountOutcome> AddAsync(string site, Account account, string by, Instant at, bool isFirst, CancellationToken cancellationToken) => throw new NotSupportedException();

    public ValueTask<AccountOutcome> ChangeAsync(string site, string name, AccountChange change, string by, Instant at, CancellationToken cancellationToken) => throw new NotSupportedException();

    public ValueTask RefusedAsync(string site, IReadOnlyList<SignInRefusals> refusals, Instant at, CancellationToken cancellationToken) => ValueTask.CompletedTask;

    public ValueTask StartAsync(string site, Session session, string digest, Instant at, Guid? replaces, CancellationToken cancellationToken) => throw new NotSupportedException();

    ValueTask<(Session Session, Account Account)?> ISessionLedger.FindAsync(string site, string digest, CancellationToken cancellationToken) => ValueTask.FromResult<(Session, Account)?>(null);

    ValueTask<IReadOnlyList<Session>> ISessionLedger.ListAsync(string site, string account, CancellationToken cancellationToken) => ValueTask.FromResult<IReadOnlyList<Session>>([]);

    public ValueTask<bool> EndAsync(string site, string account, Guid id, Instant at, CancellationToken cancellationToken) => ValueTask.FromResult(false);

    public ValueTask EndAllAsync(string site, IReadOnlyList<string> accounts, CancellationToken cancellationToken) => ValueTask.CompletedTask;

    public ValueTask ConfirmAsync(Guid id, Instant confirmedAt, CancellationToken cancellationToken) => ValueTask.CompletedTask;

    public ValueTask AddTokenAsync(string site, ApiToken token, string digest, CancellationToken cancellationToken) => throw new NotSupportedException();

    public ValueTask<(ApiToken Token, Account Account)?> FindTokenAsync(string site, string digest, CancellationToken cancellationToken) => ValueTask.FromResult<(ApiToken, Account)?>(null);

    public ValueTask<IReadOnlyList<ApiToken>> ListTokensAsync(string site, string? account, CancellationToken cancellationToken) => ValueTask.FromResult<IReadOnlyList<ApiToken>>([]);

    public ValueTask<bool> RevokeTokenAsync(string site, string? account, Guid id, string by, Instant at, CancellationToken cancellationToken) => ValueTask.FromResult(false);

    public ValueTask UsedAsync(IReadOnlyDictionary<Guid, Instant> sessions, IReadOnlyDictionary<Guid, Instant> tokens, CancellationToken cancellationToken) => ValueTask.CompletedTask;
}
