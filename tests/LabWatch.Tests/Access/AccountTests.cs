using System.Net;
using System.Text.Json;
using LabWatch.Records.Accounts;
using LabWatch.Service.Api.Accounts;
using LabWatch.Tests.Api;

namespace LabWatch.Tests.Access;

public sealed class AccountTests
{
    [Fact]
    public async Task An_administrator_makes_changes_closes_and_opens_an_account()
    {
        await using PeopleHost host = await PeopleHost.StartAsync();
        await host.AddAsync("boss", Role.Administrator);
        string boss = await host.CookieAsync("boss");

        Answer made = await host.PostAsync("/api/v1/accounts", new { name = "kim", displayName = " Kim Lee ", roles = (string[])["technician"] }, boss);
        string password = made.Json.GetProperty("oneTimePassword").GetString()!;
        string first = await host.CookieAsync("kim", password);
        Answer chosen = await host.PostAsync("/api/v1/me/password", new { current = password, @new = "nine loud crows under thatch" }, first);
        Answer changed = await host.PostAsync("/api/v1/accounts/kim", new { displayName = "K. Lee", roles = (string[])["quality-manager", "technician"] }, boss);
        Answer closed = await host.PostAsync("/api/v1/accounts/kim", new { disabled = true }, boss);

        Assert.Equal(HttpStatusCode.Created, made.Status);
        Assert.Equal("Kim Lee", made.Json.GetProperty("account").GetProperty("displayName").GetString());
        Assert.Equal(HttpStatusCode.NoContent, chosen.Status);
        Assert.Equal(JsonValueKind.Null, changed.Json.GetProperty("oneTimePassword").ValueKind);
        Assert.Equal(HttpStatusCode.OK, closed.Status);
        Assert.Equal(HttpStatusCode.Unauthorized, (await host.GetAsync("/api/v1/me", PeopleHost.CookieOf(chosen))).Status);
        Assert.Equal(HttpStatusCode.Unauthorized, (await host.SignInAsync("kim", "nine loud crows under thatch")).Status);
        await host.PostAsync("/api/v1/accounts/kim", new { disabled = false }, boss);
        Assert.Equal(HttpStatusCode.OK, (await host.SignInAsync("kim", "nine loud crows under thatch")).Status);
        Assert.Equal(
            ["signed-in", "account-changed", "account-changed", "account-changed", "password-changed", "signed-in", "account-created"],
            (await host.EntriesAsync()).Where(entry => entry.Subject.StartsWith("account/kim", StringComparison.Ordinal) || entry.Actor == "kim").Select(entry => entry.Action));
        string list = (await host.GetAsync("/api/v1/accounts", boss)).Text;
        Assert.DoesNotContain("argon2", list, StringComparison.Ordinal);
    }

    [Fact]
    public async Task A_reset_gives_a_password_for_once_and_ends_the_sessions()
    {
        await using PeopleHost host = await PeopleHost.StartAsync();
        await host.AddAsync("boss", Role.Administrator);
        await host.AddAsync("kim", Role.Auditor);
        string kim = await host.CookieAsync("kim");

        Answer reset = await host.PostAsync("/api/v1/accounts/kim", new { resetPassword = true }, await host.CookieAsync("boss"));

        Assert.Equal(HttpStatusCode.Unauthorized, (await host.GetAsync("/api/v1/me", kim)).Status);
        Assert.Equal(HttpStatusCode.Unauthorized, (await host.SignInAsync("kim")).Status);
        Assert.True((await host.SignInAsync("kim", reset.Json.GetProperty("oneTimePassword").GetString()!)).Json.GetProperty("mustChangePassword").GetBoolean());
    }

    [Fact]
    public async Task The_last_administrator_stays_and_a_name_is_never_given_again()
    {
        await using PeopleHost host = await PeopleHost.StartAsync();
        await host.AddAsync("boss", Role.Administrator);
        await host.AddAsync("kim", Role.Auditor);
        string boss = await host.CookieAsync("boss");

        await host.PostAsync("/api/v1/accounts/kim", new { disabled = true }, boss);

        Assert.Equal(["last-administrator"], (await host.PostAsync("/api/v1/accounts/boss", new { disabled = true }, boss)).FindingCodes);
        Assert.Equal(["last-administrator"], (await host.PostAsync("/api/v1/accounts/boss", new { roles = (string[])["auditor"] }, boss)).FindingCodes);
        Assert.Equal(["name-taken"], (await host.PostAsync("/api/v1/accounts", new { name = "kim", displayName = "Another Kim", roles = (string[])["auditor"] }, boss)).FindingCodes);
        Assert.Equal(["not-found"], (await host.PostAsync("/api/v1/accounts/nobody-here", new { disabled = true }, boss)).FindingCodes);
        Assert.Equal(
            ["not-a-slug", "not-a-name", "unknown-role"],
            (await host.PostAsync("/api/v1/accounts", new { name = "Kim Lee", displayName = " ", roles = (string[])["owner"] }, boss)).FindingCodes);
        Assert.Equal(["name-reserved"], (await host.PostAsync("/api/v1/accounts", new { name = "labwatch", displayName = "L", roles = (string[])["auditor"] }, boss)).FindingCodes);
    }

    [Fact]
    public async Task A_lost_role_counts_at_once_for_sessions_and_for_tokens()
    {
        await using PeopleHost host = await PeopleHost.StartAsync();
        await host.AddAsync("boss", Role.Administrator);
        await host.AddAsync("kim", Role.Auditor, Role.Administrator);
        string kim = await host.CookieAsync("kim");
        string token = await host.AddTokenAsync("kim", [Role.Administrator]);
        Assert.Equal(HttpStatusCode.OK, (await host.Api.GetAsync("/api/v1/accounts", ("Authorization", "Bearer " + token))).Status);

        await host.PostAsync("/api/v1/accounts/kim", new { roles = (string[])["auditor"] }, await host.CookieAsync("boss"));

        Assert.Equal(["not-permitted"], (await host.GetAsync("/api/v1/accounts", kim)).FindingCodes);
        Assert.Equal(["not-permitted"], (await host.Api.GetAsync("/api/v1/accounts", ("Authorization", "Bearer " + token))).FindingCodes);
    }

    [Fact]
    public async Task A_token_has_no_more_than_its_owner_and_makes_no_tokens()
    {
        await using PeopleHost host = await PeopleHost.StartAsync();
        await host.AddAsync("kim", Role.Technician);
        string cookie = await host.CookieAsync("kim");

        Answer above = await host.PostAsync("/api/v1/tokens", new { name = "script", roles = (string[])["administrator"], expiresInDays = 400 }, cookie);
        Answer made = await host.PostAsync("/api/v1/tokens", new { name = "script", roles = (string[])["technician"], expiresInDays = 30 }, cookie);
        string value = made.Json.GetProperty("value").GetString()!;
        Answer more = await host.Api.SendAsync(
            HttpMethod.Post, "/api/v1/tokens", """{"name":"more","roles":["technician"],"expiresInDays":30}""", ("Authorization", "Bearer " + value));
        JsonElement listed = (await host.GetAsync("/api/v1/tokens", cookie)).Json.GetProperty("items")[0];

        Assert.Equal(["role-not-held", "out-of-range"], above.FindingCodes);
        Assert.StartsWith("lw_", value, StringComparison.Ordinal);
        Assert.True(Secret.IsToken(value));
        Assert.Equal(["session-needed"], more.FindingCodes);
        Assert.Equal("script", listed.GetProperty("name").GetString());
        Assert.DoesNotContain(value[3..], (await host.GetAsync("/api/v1/tokens", cookie)).Text, StringComparison.Ordinal);
        Assert.Equal(["not-permitted"], (await host.GetAsync("/api/v1/tokens?all=true", cookie)).FindingCodes);
    }

    [Fact]
    public async Task A_token_is_taken_back_by_its_owner_or_an_administrator()
    {
        await using PeopleHost host = await PeopleHost.StartAsync();
        await host.AddAsync("boss", Role.Administrator);
        await host.AddAsync("kim", Role.Technician);
        await host.AddAsync("lee", Role.Technician);
        string token = await host.AddTokenAsync("kim", [Role.Technician]);
        string boss = await host.CookieAsync("boss");
        string id = (await host.GetAsync("/api/v1/tokens?all=true", boss)).Json.GetProperty("items")[0].GetProperty("id").GetString()!;

        Answer notTheirs = await DeleteAsync(host, id, await host.CookieAsync("lee"));
        Answer done = await DeleteAsync(host, id, boss);

        Assert.Equal(HttpStatusCode.NotFound, notTheirs.Status);
        Assert.Equal(HttpStatusCode.NoContent, done.Status);
        Assert.Equal(HttpStatusCode.Unauthorized, (await host.Api.GetAsync("/api/v1/sources", ("Authorization", "Bearer " + token))).Status);
        Assert.Equal("boss", Assert.Single(await host.EntriesAsync("token-revoked")).Actor);
    }

    [Fact]
    public async Task The_first_administrator_comes_by_the_code_that_was_printed_and_the_code_is_good_once()
    {
        await using PeopleHost host = await PeopleHost.StartAsync();
        await WaitForAsync(host.CodeFile);
        Assert.True((await host.Api.GetAsync("/api/v1/sign-in")).Json.GetProperty("setUpNeeded").GetBoolean());
        string code = (await File.ReadAllTextAsync(host.CodeFile, TestContext.Current.CancellationToken)).Trim();
        if (!OperatingSystem.IsWindows())
        {
            Assert.Equal(UnixFileMode.UserRead | UnixFileMode.UserWrite, File.GetUnixFileMode(host.CodeFile));
        }

        Answer wrong = await SetUpAsync(host, "00000-00000-00000-00000", "kim", PeopleHost.Password);
        Answer weak = await SetUpAsync(host, code, "kim", "kim kim kim kim kim");
        Answer done = await SetUpAsync(host, code, "kim", PeopleHost.Password);
        Answer again = await SetUpAsync(host, code, "lee", PeopleHost.Password);

        Assert.Equal(["wrong-code"], wrong.FindingCodes);
        Assert.Equal(["password-expected"], weak.FindingCodes);
        Assert.Equal(HttpStatusCode.OK, done.Status);
        Assert.Equal(HttpStatusCode.OK, (await host.GetAsync("/api/v1/accounts", PeopleHost.CookieOf(done))).Status);
        Assert.Equal(["set-up-done"], again.FindingCodes);
        Assert.False(File.Exists(host.CodeFile));
        Assert.False((await host.Api.GetAsync("/api/v1/sign-in")).Json.GetProperty("setUpNeeded").GetBoolean());
        Assert.Equal(["signed-in", "set-up-done", "account-created"], (await host.EntriesAsync()).Select(entry => entry.Action));
    }

    [Fact]
    public async Task The_codes_of_a_demo_open_its_accounts_and_no_others()
    {
        DemoCredentials codes = DemoCredentials.For(["technician", "auditor"]);
        await using PeopleHost host = await PeopleHost.StartAsync(isDemo: true, codes);
        await host.AddAsync("technician", Role.Technician);
        await host.AddAsync("auditor", Role.Auditor);
        string code = codes.Codes.Single(person => person.Name == "technician").Code;

        Assert.Equal(HttpStatusCode.OK, (await host.SignInAsync("technician", code)).Status);
        Assert.Equal(HttpStatusCode.OK, (await host.SignInAsync("technician", code)).Status);
        Assert.Equal(HttpStatusCode.Unauthorized, (await host.SignInAsync("auditor", code)).Status);
        Assert.True((await host.Api.GetAsync("/api/v1/sign-in")).Json.GetProperty("isDemo").GetBoolean());
        Assert.False(File.Exists(host.CodeFile));
    }

    private static Task<Answer> SetUpAsync(PeopleHost host, string code, string name, string password) =>
        host.Api.SendAsync(HttpMethod.Post, "/api/v1/set-up", JsonSerializer.Serialize(new { code, name, displayName = "Some Body", password }));

    private static Task<Answer> DeleteAsync(PeopleHost host, string id, string cookie) =>
        host.Api.SendAsync(HttpMethod.Delete, "/api/v1/tokens/" + id, null, ("Cookie", cookie), ("Sec-Fetch-Site", "same-origin"));

    private static async Task WaitForAsync(string file)
    {
        for (int i = 0; i < 2_000 && !File.Exists(file); i++)
        {
            await Task.Delay(TimeSpan.FromMilliseconds(10), TimeProvider.System, TestContext.Current.CancellationToken);
        }
    }
}
