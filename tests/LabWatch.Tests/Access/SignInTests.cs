using System.Net;
using System.Text.Json;
using LabWatch.Records.Accounts;
using LabWatch.Records.Audit;
using LabWatch.Service.Api.Accounts;
using LabWatch.Tests.Api;
using Microsoft.Data.Sqlite;
using Microsoft.Extensions.DependencyInjection;

namespace LabWatch.Tests.Access;

public sealed class SignInTests
{
    private static CancellationToken Cancel => TestContext.Current.CancellationToken;

    [Fact]
    public async Task A_person_signs_in_is_known_and_signs_out()
    {
        await using PeopleHost host = await PeopleHost.StartAsync();
        await host.AddAsync("kim", Role.Technician, Role.Auditor);

        Answer answer = await host.SignInAsync("kim");
        string cookie = PeopleHost.CookieOf(answer);
        Answer me = await host.GetAsync("/api/v1/me", cookie);
        Answer left = await host.PostAsync("/api/v1/sign-out", new { }, cookie);

        Assert.Contains("httponly", answer.Headers["Set-Cookie"], StringComparison.OrdinalIgnoreCase);
        Assert.Contains("samesite=strict", answer.Headers["Set-Cookie"], StringComparison.OrdinalIgnoreCase);
        Assert.Contains("path=/", answer.Headers["Set-Cookie"], StringComparison.OrdinalIgnoreCase);
        Assert.Equal("no-store", answer.Headers["Cache-Control"]);
        Assert.Equal(["read", "acknowledge", "record-runs", "read-trail", "inject-faults"], me.Json.GetProperty("permissions").EnumerateArray().Select(permission => permission.GetString()));
        Assert.Equal(HttpStatusCode.NoContent, left.Status);
        Assert.Equal(HttpStatusCode.Unauthorized, (await host.GetAsync("/api/v1/me", cookie)).Status);
        Assert.Equal(["signed-out", "signed-in", "account-created"], (await host.EntriesAsync()).Select(entry => entry.Action));
    }

    [Theory]
    [InlineData("kim", "not the password of kim")]
    [InlineData("nobody-of-that-name", PeopleHost.Password)]
    [InlineData("closed", PeopleHost.Password)]
    [InlineData("", "")]
    public async Task Wrong_password_unknown_and_closed_account_get_the_same_answer(string name, string password)
    {
        await using PeopleHost host = await PeopleHost.StartAsync();
        await host.AddAsync("kim", Role.Administrator);
        await host.AddAsync("closed", Role.Auditor);
        await host.Accounts.ChangeAsync(PeopleHost.Site, "closed", new AccountChange { IsDisabled = true }, "kim", host.Api.Now, Cancel);

        Answer answer = await host.SignInAsync(name, password);

        Assert.Equal(HttpStatusCode.Unauthorized, answer.Status);
        Assert.Equal("Name or password is wrong.", answer.Json.GetProperty("title").GetString());
        Assert.Equal(["wrong-credentials"], answer.FindingCodes);
        Assert.DoesNotContain("Set-Cookie", answer.Headers.Keys);
    }

    [Fact]
    public async Task Neither_password_nor_secret_nor_token_stands_in_the_records()
    {
        await using PeopleHost host = await PeopleHost.StartAsync();
        await host.AddAsync("kim", Role.Technician);
        string cookie = await host.CookieAsync("kim");
        Answer made = await host.PostAsync("/api/v1/tokens", new { name = "a script", roles = (string[])["technician"], expiresInDays = 7 }, cookie);

        string secret = Uri.UnescapeDataString(cookie.Split('=', 2)[1]);
        string token = made.Json.GetProperty("value").GetString()!;
        byte[] file = await File.ReadAllBytesAsync(host.RecordsFile, Cancel);
        byte[] log = File.Exists(host.RecordsFile + "-wal") ? await File.ReadAllBytesAsync(host.RecordsFile + "-wal", Cancel) : [];

        Assert.Equal(HttpStatusCode.Created, made.Status);
        foreach (string kept in (string[])[secret, token, token[3..], PeopleHost.Password])
        {
            Assert.Equal(-1, file.AsSpan().IndexOf(System.Text.Encoding.UTF8.GetBytes(kept)));
            Assert.Equal(-1, log.AsSpan().IndexOf(System.Text.Encoding.UTF8.GetBytes(kept)));
        }

        // The hash is in the accounts, and in no entry of the trail.
        Assert.DoesNotContain(await host.EntriesAsync(), entry => entry.Content.ToJsonString().Contains("argon2", StringComparison.Ordinal));
    }

    [Fact]
    public async Task A_session_ends_after_half_a_day_without_use_and_after_thirty_days_in_any_case()
    {
        await using PeopleHost host = await PeopleHost.StartAsync();
        await host.AddAsync("kim", Role.Technician);
        string idle = await host.CookieAsync("kim");
        string used = await host.CookieAsync("kim");

        host.Api.Clock.Advance(TimeSpan.FromHours(11));
        Assert.Equal(HttpStatusCode.OK, (await host.GetAsync("/api/v1/sources", used)).Status);
        host.Api.Clock.Advance(TimeSpan.FromHours(1));
        Assert.Equal(HttpStatusCode.Unauthorized, (await host.GetAsync("/api/v1/sources", idle)).Status);
        for (int i = 0; i < 64; i++)
        {
            Assert.Equal(HttpStatusCode.OK, (await host.GetAsync("/api/v1/sources", used)).Status);
            host.Api.Clock.Advance(TimeSpan.FromHours(11));
        }

        host.Api.Clock.Advance(TimeSpan.FromHours(4));
        Assert.Equal(HttpStatusCode.Unauthorized, (await host.GetAsync("/api/v1/sources", used)).Status);
    }

    [Fact]
    public async Task A_change_wants_the_password_of_the_last_hours_and_reading_does_not()
    {
        await using PeopleHost host = await PeopleHost.StartAsync(isDemo: true);
        await host.AddAsync("kim", Role.Technician, Role.Administrator);
        string cookie = await host.CookieAsync("kim");
        object fault = new { kind = "frost", source = "hollin-vale.fir" };

        host.Api.Clock.Advance(TimeSpan.FromHours(1));
        Assert.Equal(["confirm-password"], (await host.GetAsync("/api/v1/accounts", cookie)).FindingCodes);
        Assert.NotEqual(HttpStatusCode.Forbidden, (await host.PostAsync("/api/v1/demo/faults", fault, cookie)).Status);
        host.Api.Clock.Advance(TimeSpan.FromHours(6));
        await host.GetAsync("/api/v1/sources", cookie);
        host.Api.Clock.Advance(TimeSpan.FromHours(6));
        Assert.Equal(["confirm-password"], (await host.PostAsync("/api/v1/demo/faults", fault, cookie)).FindingCodes);
        Assert.Equal(HttpStatusCode.OK, (await host.GetAsync("/api/v1/sources", cookie)).Status);

        Assert.Equal(["wrong-password"], (await host.PostAsync("/api/v1/me/confirm", new { password = "another" }, cookie)).FindingCodes);
        Assert.Equal(HttpStatusCode.OK, (await host.PostAsync("/api/v1/me/confirm", new { password = PeopleHost.Password }, cookie)).Status);
        Assert.Equal(HttpStatusCode.OK, (await host.GetAsync("/api/v1/accounts", cookie)).Status);
        Assert.NotEqual(HttpStatusCode.Forbidden, (await host.PostAsync("/api/v1/demo/faults", fault, cookie)).Status);
    }

    [Fact]
    public async Task Another_password_ends_all_other_sessions_and_this_one_goes_on_under_a_new_secret()
    {
        await using PeopleHost host = await PeopleHost.StartAsync();
        await host.AddAsync("kim", Role.Technician);
        string elsewhere = await host.CookieAsync("kim");
        string here = await host.CookieAsync("kim");

        Answer wrong = await host.PostAsync("/api/v1/me/password", new { current = "guess", @new = "nine loud crows under thatch" }, here);
        Answer weak = await host.PostAsync("/api/v1/me/password", new { current = PeopleHost.Password, @new = "short" }, here);
        Answer done = await host.PostAsync("/api/v1/me/password", new { current = PeopleHost.Password, @new = "nine loud crows under thatch" }, here);

        Assert.Equal(["wrong-password"], wrong.FindingCodes);
        Assert.Equal(["password-too-short"], weak.FindingCodes);
        Assert.Equal(HttpStatusCode.NoContent, done.Status);
        Assert.Equal(HttpStatusCode.Unauthorized, (await host.GetAsync("/api/v1/me", elsewhere)).Status);
        Assert.Equal(HttpStatusCode.Unauthorized, (await host.GetAsync("/api/v1/me", here)).Status);
        Assert.Equal(HttpStatusCode.OK, (await host.GetAsync("/api/v1/me", PeopleHost.CookieOf(done))).Status);
        Assert.Equal(HttpStatusCode.Unauthorized, (await host.SignInAsync("kim")).Status);
        Assert.Single(await host.EntriesAsync("password-changed"));
    }

    [Fact]
    public async Task The_own_sessions_are_listed_and_ended_and_nobody_elses()
    {
        await using PeopleHost host = await PeopleHost.StartAsync();
        await host.AddAsync("kim", Role.Technician);
        await host.AddAsync("lee", Role.Technician);
        string first = await host.CookieAsync("kim");
        string second = await host.CookieAsync("kim");
        string foreign = await host.CookieAsync("lee");

        JsonElement[] sessions = [.. (await host.GetAsync("/api/v1/me/sessions", second)).Json.GetProperty("items").EnumerateArray()];
        string other = sessions.Single(session => !session.GetProperty("isCurrent").GetBoolean()).GetProperty("id").GetString()!;
        Answer notTheirs = await host.Api.SendAsync(HttpMethod.Delete, "/api/v1/me/sessions/" + other, null, ("Cookie", foreign), ("Sec-Fetch-Site", "same-origin"));
        Answer ended = await host.Api.SendAsync(HttpMethod.Delete, "/api/v1/me/sessions/" + other, null, ("Cookie", second), ("Sec-Fetch-Site", "same-origin"));

        Assert.Equal(2, sessions.Length);
        Assert.Equal(HttpStatusCode.NotFound, notTheirs.Status);
        Assert.Equal(HttpStatusCode.NoContent, ended.Status);
        Assert.Equal(HttpStatusCode.Unauthorized, (await host.GetAsync("/api/v1/me", first)).Status);
        Assert.Equal(HttpStatusCode.OK, (await host.GetAsync("/api/v1/me", second)).Status);
    }

    [Fact]
    public async Task While_the_records_do_not_answer_who_was_signed_in_stays_so()
    {
        await using PeopleHost host = await PeopleHost.StartAsync();
        await host.AddAsync("kim", Role.Technician);
        string cookie = await host.CookieAsync("kim");
        await host.GetAsync("/api/v1/sources", cookie);
        host.Api.Clock.Advance(TimeSpan.FromMinutes(1));
        SqliteConnection.ClearAllPools();
        File.Move(host.RecordsFile, host.RecordsFile + ".away");
        Directory.CreateDirectory(host.RecordsFile);

        Answer seen = await host.GetAsync("/api/v1/alerts?open=true", cookie);
        Answer stranger = await host.SignInAsync("kim");
        Answer live = await host.GetAsync("/health/live", "labwatch=unknown");

        Directory.Delete(host.RecordsFile);
        File.Move(host.RecordsFile + ".away", host.RecordsFile);
        Assert.Equal(HttpStatusCode.OK, seen.Status);
        Assert.Equal(HttpStatusCode.ServiceUnavailable, stranger.Status);
        Assert.Equal(HttpStatusCode.OK, live.Status);
    }

    [Fact]
    public async Task Guesses_are_slowed_counted_and_summed_up_in_the_trail()
    {
        await using PeopleHost host = await PeopleHost.StartAsync();
        await host.AddAsync("kim", Role.Technician);
        for (int i = 0; i < SignInThrottle.Free; i++)
        {
            Assert.Equal(HttpStatusCode.Unauthorized, (await host.SignInAsync("kim", "guess")).Status);
            Assert.Equal(HttpStatusCode.Unauthorized, (await host.SignInAsync("nobody", "guess")).Status);
        }

        Answer slowed = await host.SignInAsync("kim");
        Answer slowedToo = await host.SignInAsync("nobody");
        await host.Api.Services.GetRequiredService<RefusalKeeper>().KeepAsync(isAll: false, Cancel);
        IReadOnlyList<AuditEntry> entries = await host.EntriesAsync("sign-in-refused");
        host.Api.Clock.Advance(TimeSpan.FromSeconds(1));
        Answer right = await host.SignInAsync("kim");

        Assert.Equal(HttpStatusCode.TooManyRequests, slowed.Status);
        Assert.Equal("1", slowed.Headers["Retry-After"]);
        Assert.Equal(slowed.Json.GetProperty("findings").GetRawText(), slowedToo.Json.GetProperty("findings").GetRawText());
        Assert.Equal(["sign-in", "sign-in/kim"], entries.Select(entry => entry.Subject).Order(StringComparer.Ordinal));
        Assert.All(entries, entry => Assert.Equal(6, entry.Content["count"]!.GetValue<int>()));
        Assert.DoesNotContain(entries, entry => entry.Content.ToJsonString().Contains("nobody", StringComparison.Ordinal));
        Assert.Equal(HttpStatusCode.OK, right.Status);
        Assert.Equal(0, (await host.Accounts.FindAsync(PeopleHost.Site, "kim", Cancel))!.Failures);
    }
}
