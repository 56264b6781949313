using System.Net;
using LabWatch.Records.Accounts;
using LabWatch.Service.Api.Access;
using LabWatch.Service.Web;
using LabWatch.Tests.Api;
using Microsoft.Extensions.DependencyInjection;

namespace LabWatch.Tests.Access;

public sealed class CrossSiteTests
{
    [Theory]
    [InlineData("Sec-Fetch-Site", "same-origin", true)]
    [InlineData("Sec-Fetch-Site", "none", true)]
    [InlineData("Sec-Fetch-Site", "same-site", false)]
    [InlineData("Sec-Fetch-Site", "cross-site", false)]
    [InlineData("Origin", "http://localhost", true)]
    [InlineData("Origin", "http://localhost:81", false)]
    [InlineData("Origin", "https://localhost", false)]
    [InlineData("Origin", "https://elsewhere.example", false)]
    [InlineData("Origin", "null", false)]
    [InlineData("X-Nothing", "", false)]
    public async Task With_a_cookie_a_change_must_come_from_the_services_own_page(string header, string value, bool isTaken)
    {
        await using PeopleHost host = await PeopleHost.StartAsync();
        await host.AddAsync("kim", Role.Technician);
        string cookie = await host.CookieAsync("kim");

        Answer answer = await host.Api.SendAsync(HttpMethod.Post, "/api/v1/sign-out", "{}", ("Cookie", cookie), (header, value));

        Assert.Equal(isTaken ? HttpStatusCode.NoContent : HttpStatusCode.Forbidden, answer.Status);
        Assert.Equal(isTaken ? HttpStatusCode.Unauthorized : HttpStatusCode.OK, (await host.GetAsync("/api/v1/me", cookie)).Status);
    }

    [Fact]
    public async Task A_form_cannot_sign_anybody_in()
    {
        await using PeopleHost host = await PeopleHost.StartAsync();
        using StringContent form = new("""{"name":"kim","password":"x="}""", System.Text.Encoding.UTF8, "text/plain");

        using HttpResponseMessage response = await host.Api.Client.PostAsync("/api/v1/sign-in", form, TestContext.Current.CancellationToken);

        Assert.Equal(HttpStatusCode.UnsupportedMediaType, response.StatusCode);
    }

    [Fact]
    public async Task A_token_needs_none_of_a_browsers_headers()
    {
        await using PeopleHost host = await PeopleHost.StartAsync();
        await host.AddAsync("kim", Role.Technician);
        string token = await host.AddTokenAsync("kim", [Role.Technician]);

        Assert.Equal(HttpStatusCode.NoContent, (await host.Api.SendAsync(HttpMethod.Post, "/api/v1/sign-out", "{}", ("Authorization", "Bearer " + token))).Status);
    }

    [Fact]
    public async Task A_page_whose_name_was_made_to_lead_here_is_refused()
    {
        await using PeopleHost host = await PeopleHost.StartAsync(change: services => services.AddSingleton(new HostNames(["localhost", "127.0.0.1"])));

        Assert.Equal(["wrong-host"], (await host.Api.GetAsync("/api/v1/sign-in", ("Host", "elsewhere.example"))).FindingCodes);
        Assert.Equal(HttpStatusCode.OK, (await host.Api.GetAsync("/api/v1/sign-in", ("Host", "127.0.0.1:5080"))).Status);
    }

    [Fact]
    public async Task Strangers_learn_of_the_health_whether_and_not_what()
    {
        await using PeopleHost host = await PeopleHost.StartAsync();
        await host.AddAsync("kim", Role.Auditor);
        string token = await host.AddTokenAsync("kim", [Role.Auditor]);

        Answer stranger = await host.Api.GetAsync("/health/ready");
        Answer known = await host.Api.GetAsync("/health/ready", ("Authorization", "Bearer " + token));

        Assert.Equal(0, stranger.Json.GetProperty("parts").GetArrayLength());
        Assert.NotEqual(0, known.Json.GetProperty("parts").GetArrayLength());
    }

    [Fact]
    public async Task Too_many_sign_ins_from_one_address_are_told_to_wait()
    {
        await using PeopleHost host = await PeopleHost.StartAsync();
        for (int i = 0; i < 20; i++)
        {
            Assert.Equal(HttpStatusCode.Unauthorized, (await host.SignInAsync("name-" + i, "guess")).Status);
        }

        Answer answer = await host.SignInAsync("another-name", "guess");

        Assert.Equal(HttpStatusCode.TooManyRequests, answer.Status);
        Assert.Equal(["too-many-requests"], answer.FindingCodes);
        Assert.True(answer.Headers.ContainsKey("Retry-After"));
    }

    [Fact]
    public async Task The_stream_ends_with_its_session()
    {
        await using PeopleHost host = await PeopleHost.StartAsync(change: services => services.AddSingleton(provider => new LabWatch.Service.Api.Streaming.StreamOptions
        {
            Clock = provider.GetRequiredService<TimeProvider>(),
        }));
        await host.AddAsync("kim", Role.Technician);
        string cookie = await host.CookieAsync("kim");
        using HttpRequestMessage request = new(HttpMethod.Get, "/api/v1/stream");
        request.Headers.TryAddWithoutValidation("Cookie", cookie);
        using HttpResponseMessage response = await host.Api.Client.SendAsync(request, HttpCompletionOption.ResponseHeadersRead, TestContext.Current.CancellationToken);
        await using Stream body = await response.Content.ReadAsStreamAsync(TestContext.Current.CancellationToken);

        Task<string> all = ReadToItsEndAsync(body);
        await host.PostAsync("/api/v1/sign-out", new { }, cookie);
        for (int i = 0; i < 1_000 && !all.IsCompleted; i++)
        {
            host.Api.Clock.Advance(SignedInCallers.Fresh);
            await Task.WhenAny(all, Task.Delay(TimeSpan.FromMilliseconds(20), TimeProvider.System, TestContext.Current.CancellationToken));
        }

        Assert.True(all.IsCompleted);
        Assert.Contains("event: snapshot", await all, StringComparison.Ordinal);
    }

    /// <summary>What a stream held when it ended, in whichever way: the service may close it or cut it.</summary>
    private static async Task<string> ReadToItsEndAsync(Stream body)
    {
        using StreamReader reader = new(body);
        System.Text.StringBuilder text = new();
        try
        {
            while (await reader.ReadLineAsync(TestContext.Current.CancellationToken) is { } line)
            {
                text.AppendLine(line);
            }
        }
        catch (IOException)
        {
            // Cut: that is an end too.
        }

        return text.ToString();
    }
}
