using LabWatch.Lab.Time;
using LabWatch.Records.Accounts;
using LabWatch.Records.Audit;

namespace LabWatch.Tests.Records.Contract;

/// <summary>What every engine's ledgers of accounts, sessions and tokens do.</summary>
public abstract class AccountLedgerContract : IAsyncLifetime
{
    private const string Site = "hollin-vale";
    private static readonly PasswordHash Hash = new("$argon2id$v=19$m=64,t=1,p=1$AAAAAAAAAAAAAAAAAAAAAA$AAAAAAAAAAAAAAAAAAAAAAAAAAAAAAAAAAAAAAAAAAA");

    private IRecordsUnderTest _records = null!;

    private protected abstract ValueTask<IRecordsUnderTest> OpenAsync();

    private static CancellationToken Token => TestContext.Current.CancellationToken;

    private static Instant Noon => Sample.Noon;

    public async ValueTask InitializeAsync() => _records = await OpenAsync();

    public async ValueTask DisposeAsync()
    {
        await _records.DisposeAsync();
        GC.SuppressFinalize(this);
    }

    [Fact]
    public async Task Accounts_are_revisions_of_a_site_and_the_newest_counts()
    {
        Assert.False(await _records.Accounts.AnyAsync(Site, Token));
        Assert.Equal(AccountOutcome.Done, await AddAsync("kim", isFirst: true, Role.Administrator));
        Assert.Equal(AccountOutcome.NotTheFirst, await AddAsync("lee", isFirst: true, Role.Administrator));
        Assert.Equal(AccountOutcome.Done, await AddAsync("lee", isFirst: false, Role.Technician, Role.Auditor));
        Assert.Equal(AccountOutcome.NameTaken, await AddAsync("lee", isFirst: false, Role.Technician));
        Assert.Equal(AccountOutcome.Done, await ChangeAsync("lee", new AccountChange { DisplayName = "L. Ee", Roles = [Role.QualityManager] }));
        Assert.Equal(AccountOutcome.Done, await ChangeAsync("lee", new AccountChange { DisplayName = "L. Ee" }));
        Assert.Equal(AccountOutcome.Unknown, await ChangeAsync("moss", new AccountChange { IsDisabled = true }));
        Assert.Equal(AccountOutcome.LastAdministrator, await ChangeAsync("kim", new AccountChange { IsDisabled = true }));

        Account lee = (await _records.Accounts.FindAsync(Site, "lee", Token))!;
        Assert.Equal((2, "L. Ee", Noon), (lee.Revision, lee.DisplayName, lee.CreatedAt));
        Assert.Equal([Role.QualityManager], lee.Roles);
        Assert.Equal(["kim", "lee"], (await _records.Accounts.ListAsync(Site, Token)).Select(account => account.Name));
        Assert.False(await _records.Accounts.AnyAsync("other", Token));
        Assert.Equal(["account-changed", "account-created", "set-up-done", "account-created"], (await EntriesAsync()).Select(entry => entry.Action));
        Assert.All((await EntriesAsync()).Where(entry => entry.Subject.StartsWith("account/", StringComparison.Ordinal)), entry => Assert.NotNull(entry.RecordDigest));
    }

    [Fact]
    public async Task A_session_is_found_by_its_digest_until_it_ends()
    {
        await AddAsync("kim", isFirst: true, Role.Administrator);
        Session first = await StartAsync("kim", "a", null);
        Session second = await StartAsync("kim", "b", first.Id);
        Session third = await StartAsync("kim", "c", null);

        Assert.Null(await _records.Sessions.FindAsync(Site, "a", Token));
        Assert.Equal(second.Id, (await _records.Sessions.FindAsync(Site, "b", Token))!.Value.Session.Id);
        await _records.Sessions.UsedAsync(new Dictionary<Guid, Instant> { [third.Id] = Noon + TimeSpan.FromHours(1) }, new Dictionary<Guid, Instant>(), Token);
        await _records.Sessions.ConfirmAsync(third.Id, Noon + TimeSpan.FromHours(2), Token);
        (Session known, Account account) = (await _records.Sessions.FindAsync(Site, "c", Token))!.Value;
        Assert.Equal((Noon + TimeSpan.FromHours(1), Noon + TimeSpan.FromHours(2), "kim"), (known.LastUsedAt, known.ConfirmedAt, account.Name));
        Assert.Equal(Noon, account.LastSignInAt);
        Assert.Equal(2, (await _records.Sessions.ListAsync(Site, "kim", Token)).Count);
        Assert.True(await _records.Sessions.EndAsync(Site, "kim", second.Id, Noon, Token));
        Assert.False(await _records.Sessions.EndAsync(Site, "kim", second.Id, Noon, Token));
        await ChangeAsync("kim", new AccountChange { Password = Hash with { Text = Hash.Text.Replace("m=64", "m=65", StringComparison.Ordinal) } });
        Assert.Empty(await _records.Sessions.ListAsync(Site, "kim", Token));
        await StartAsync("kim", "d", null);
        await _records.Sessions.EndAllAsync(Site, ["kim"], Token);
        Assert.Empty(await _records.Sessions.ListAsync(Site, "kim", Token));
    }

    [Fact]
    public async Task A_token_is_found_used_and_taken_back()
    {
        await AddAsync("kim", isFirst: true, Role.Administrator);
        ApiToken token = new(Guid.CreateVersion7(), "kim", "script", [Role.Administrator], Noon, Noon + TimeSpan.FromDays(1), null, null);
        await _records.Sessions.AddTokenAsync(Site, token, "digest", Token);
        await _records.Sessions.UsedAsync(new Dictionary<Guid, Instant>(), new Dictionary<Guid, Instant> { [token.Id] = Noon + TimeSpan.FromMinutes(1) }, Token);

        Assert.False(await _records.Sessions.RevokeTokenAsync(Site, "lee", token.Id, "lee", Noon, Token));
        Assert.True(await _records.Sessions.RevokeTokenAsync(Site, null, token.Id, "boss", Noon + TimeSpan.FromHours(1), Token));
        ApiToken known = (await _records.Sessions.FindTokenAsync(Site, "digest", Token))!.Value.Token;

        Assert.Equal((Noon + TimeSpan.FromMinutes(1), Noon + TimeSpan.FromHours(1)), (known.LastUsedAt!.Value, known.RevokedAt!.Value));
        Assert.Single(await _records.Sessions.ListTokensAsync(Site, null, Token));
        Assert.Equal(["token-revoked", "token-created"], (await EntriesAsync()).Take(2).Select(entry => entry.Action));
    }

    [Fact]
    public async Task Refused_sign_ins_are_counted_and_forgiven_by_the_next_that_succeeds()
    {
        await AddAsync("kim", isFirst: true, Role.Administrator);
        await _records.Accounts.RefusedAsync(
            Site, [new SignInRefusals("kim", 7, Noon, Noon, ["192.0.2.1"], 7), new SignInRefusals(null, 3, Noon, Noon, ["192.0.2.2"], 0)], Noon, Token);

        Assert.Equal(7, (await _records.Accounts.FindAsync(Site, "kim", Token))!.Failures);
        Assert.Equal(2, (await EntriesAsync()).Count(entry => entry.Action == "sign-in-refused"));
        await StartAsync("kim", "a", null);
        Assert.Equal(0, (await _records.Accounts.FindAsync(Site, "kim", Token))!.Failures);
    }

    private ValueTask<AccountOutcome> AddAsync(string name, bool isFirst, params Role[] roles) =>
        _records.Accounts.AddAsync(Site, new Account(name, 1, name, [.. roles], false, false, Hash, Noon, null, 0), "labwatch", Noon, isFirst, Token);

    private ValueTask<AccountOutcome> ChangeAsync(string name, AccountChange change) => _records.Accounts.ChangeAsync(Site, name, change, "kim", Noon, Token);

    private async Task<Session> StartAsync(string account, string digest, Guid? replaces)
    {
        Session session = new(Guid.CreateVersion7(), account, Noon, Noon, Noon, Noon + TimeSpan.FromDays(30), "192.0.2.1", "test");
        await _records.Sessions.StartAsync(Site, session, digest, Noon, replaces, Token);
        return session;
    }

    private async Task<IReadOnlyList<AuditEntry>> EntriesAsync() => (await _records.Audit.ListAsync(new AuditQuery(Site, 500), Token)).Items;
}
