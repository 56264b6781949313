using System.Net;
using System.Text.Json;
using LabWatch.Records.Accounts;
using LabWatch.Records.Accounts.Passwords;
using LabWatch.Records.Audit;
using LabWatch.Service.Api.Access;
using LabWatch.Service.Api.Accounts;
using LabWatch.Tests.Api;
using LabWatch.Tests.Records;
using Microsoft.Extensions.DependencyInjection;
using Microsoft.Extensions.Hosting;

namespace LabWatch.Tests.Access;

/// <summary>The API with real accounts, sessions and tokens in an SQLite file; hashes are cheap, everything else is as in service.</summary>
internal sealed class PeopleHost : IAsyncDisposable
{
    public const string Site = "hollin-vale";
    public const string Password = "seven quiet herons over slate";

    private static readonly PasswordCost Cheap = new(64, 1);
    private readonly SqliteRecords _records;

    private PeopleHost(ApiHost api, SqliteRecords records, string directory)
    {
        Api = api;
        _records = records;
        CodeFile = Path.Combine(directory, "set-up-code");
    }

    public ApiHost Api { get; }

    public string CodeFile { get; }

    public IAccountLedger Accounts => _records.Accounts;

    public ISessionLedger Sessions => _records.Sessions;

    public IAuditLedger Trail => _records.Audit;

    public string RecordsFile => _records.Options.FilePath;

    public static async Task<PeopleHost> StartAsync(bool isDemo = false, DemoCredentials? demo = null, Action<IServiceCollection>? change = null)
    {
        SqliteRecords records = await SqliteRecords.CopyAsync();
        ApiHost api = await ApiHost.StartAsync(isDemo, change: services =>
        {
            services.AddSingleton(records.Accounts);
            services.AddSingleton(records.Sessions);
            services.AddSingleton(Cheap);
            services.AddSingleton(new SetUpFile(Path.Combine(records.Directory, "set-up-code")));
            services.AddSingleton<ICallers>(provider => provider.GetRequiredService<SignedInCallers>());
            if (demo is not null)
            {
                services.AddSingleton(demo);
            }

            change?.Invoke(services);
        });
        return new PeopleHost(api, records, records.Directory);
    }

    /// <summary>Adds an account with the usual password.</summary>
    public async Task AddAsync(string name, params Role[] roles)
    {
        using PasswordHasher hasher = new(Cheap);
        PasswordHash? hash = await hasher.HashAsync(Password, Token);
        Account account = new(name, 1, name, [.. roles], false, false, hash, Api.Now, null, 0);
        Assert.Equal(AccountOutcome.Done, await Accounts.AddAsync(Site, account, "labwatch", Api.Now, isFirst: false, Token));
    }

    /// <summary>Adds a token of an account, which begins now.</summary>
    public async Task<string> AddTokenAsync(string account, IReadOnlyList<Role> roles, TimeSpan? life = null)
    {
        string value = Secret.DrawToken();
        ApiToken token = new(Guid.CreateVersion7(), account, "test", [.. roles], Api.Now, Api.Now + (life ?? TimeSpan.FromDays(1)), null, null);
        await Sessions.AddTokenAsync(Site, token, Secret.DigestOf(value), Token);
        return value;
    }

    public Task<Answer> SignInAsync(string name, string password = Password) =>
        Api.SendAsync(HttpMethod.Post, "/api/v1/sign-in", JsonSerializer.Serialize(new { name, password }));

    /// <summary>Signs in and gives the cookie to be sent back.</summary>
    public async Task<string> CookieAsync(string name, string password = Password)
    {
        Answer answer = await SignInAsync(name, password);
        Assert.Equal(HttpStatusCode.OK, answer.Status);
        return CookieOf(answer);
    }

    public static string CookieOf(Answer answer) => answer.Headers["Set-Cookie"].Split(';')[0];

    public Task<Answer> GetAsync(string path, string cookie) => Api.GetAsync(path, ("Cookie", cookie));

    public Task<Answer> PostAsync(string path, object body, string cookie) =>
        Api.SendAsync(HttpMethod.Post, path, JsonSerializer.Serialize(body), ("Cookie", cookie), ("Sec-Fetch-Site", "same-origin"));

    public async Task<IReadOnlyList<AuditEntry>> EntriesAsync(string? action = null) =>
        (await Trail.ListAsync(new AuditQuery(Site, 500) { Action = action }, Token)).Items;

    public async ValueTask DisposeAsync()
    {
        foreach (IHostedService part in Api.Services.GetServices<IHostedService>().Where(part => part is SetUpDesk or LastUses or RefusalKeeper))
        {
            await part.StopAsync(CancellationToken.None);
        }

        await Api.DisposeAsync();
        await _records.DisposeAsync();
    }

    private static CancellationToken Token => TestContext.Current.CancellationToken;
}
