using System.Net;
using System.Text;
using System.Text.Json;
using LabWatch.Records.Accounts;
using Microsoft.AspNetCore.Routing;
using Microsoft.Extensions.DependencyInjection;

namespace LabWatch.Tests.Access;

/// <summary>
/// Who reaches what. The table is written by hand from the laboratory's division of work, not taken from the code; an endpoint without a
/// row fails. Reached means: neither "sign in first" nor "your roles do not allow this"; what comes then is the endpoint's own business.
/// </summary>
public sealed class EndpointAccessTests
{
    private const string Anybody = "anybody";
    private const string SignedIn = "signed-in";

    private static readonly Dictionary<string, Role[]> RolesThatMay = new()
    {
        ["read"] = [Role.Technician, Role.QualityManager, Role.Auditor, Role.Administrator],
        ["acknowledge"] = [Role.Technician, Role.QualityManager],
        ["record-runs"] = [Role.Technician, Role.QualityManager],
        ["revise-records"] = [Role.QualityManager],
        ["read-trail"] = [Role.QualityManager, Role.Auditor, Role.Administrator],
        ["manage-accounts"] = [Role.Administrator],
        ["inject-faults"] = [Role.Technician, Role.QualityManager, Role.Administrator],
        [SignedIn] = [Role.Technician, Role.QualityManager, Role.Auditor, Role.Administrator],
    };

    private static readonly Dictionary<string, string> Described = new()
    {
        ["get /api/v1/sign-in"] = Anybody,
        ["post /api/v1/sign-in"] = Anybody,
        ["post /api/v1/set-up"] = Anybody,
        ["post /api/v1/sign-out"] = SignedIn,
        ["get /api/v1/me"] = SignedIn,
        ["post /api/v1/me/password"] = SignedIn,
        ["post /api/v1/me/confirm"] = SignedIn,
        ["get /api/v1/me/sessions"] = SignedIn,
        ["delete /api/v1/me/sessions/{id}"] = SignedIn,
        ["get /api/v1/tokens"] = SignedIn,
        ["post /api/v1/tokens"] = SignedIn,
        ["delete /api/v1/tokens/{id}"] = SignedIn,
        ["get /api/v1/accounts"] = "manage-accounts",
        ["post /api/v1/accounts"] = "manage-accounts",
        ["post /api/v1/accounts/{name}"] = "manage-accounts",
        ["get /api/v1/clocks"] = "read",
        ["get /api/v1/devices"] = "manage-accounts",
        ["post /api/v1/devices"] = "manage-accounts",
        ["delete /api/v1/devices/{name}"] = "manage-accounts",
        ["get /api/v1/sources"] = "read",
        ["get /api/v1/sources/{id}"] = "read",
        ["get /api/v1/sources/{id}/balance"] = "read",
        ["get /api/v1/sources/{id}/profile"] = "read",
        ["get /api/v1/sources/{id}/readings"] = "read",
        ["get /api/v1/assessments"] = "read",
        ["get /api/v1/assessments/outcomes"] = "read",
        ["get /api/v1/assessments/{id}"] = "read",
        ["get /api/v1/assessments/{id}/revisions"] = "read",
        ["get /api/v1/sources/{id}/forecasts"] = "read",
        ["get /api/v1/assessments/{id}/forecasts"] = "read",
        ["get /api/v1/sources/{id}/attribution"] = "read",
        ["get /api/v1/attributions"] = "read",
        ["get /api/v1/budgets"] = "read",
        ["get /api/v1/power"] = "read",
        ["get /api/v1/alerts"] = "read",
        ["get /api/v1/alerts/{id}"] = "read",
        ["get /api/v1/alerts/{id}/messages"] = "read",
        ["get /api/v1/alerts/links/{token}"] = "read",
        ["post /api/v1/alerts/{id}/acknowledge"] = "acknowledge",
        ["post /api/v1/alerts/{id}/shelve"] = "acknowledge",
        ["post /api/v1/alerts/{id}/unshelve"] = "acknowledge",
        ["post /api/v1/alerts/{id}/out-of-service"] = "revise-records",
        ["post /api/v1/alerts/{id}/return-to-service"] = "revise-records",
        ["get /api/v1/notifiers"] = "read",
        ["post /api/v1/notifiers/{id}/test"] = "acknowledge",
        ["get /api/v1/me/devices"] = "read",
        ["post /api/v1/me/devices"] = "read",
        ["delete /api/v1/me/devices/{id}"] = "read",
        ["post /api/v1/me/devices/{id}/test"] = "read",
        ["get /api/v1/audit"] = "read-trail",
        ["get /api/v1/runs"] = "read",
        ["get /api/v1/runs/{id}"] = "read",
        ["post /api/v1/runs"] = "record-runs",
        ["post /api/v1/runs/{id}/end"] = "record-runs",
        ["post /api/v1/runs/{id}/correct"] = "record-runs",
        ["get /api/v1/limits"] = "read",
        ["post /api/v1/limits"] = "revise-records",
        ["get /api/v1/certificates"] = "read",
        ["post /api/v1/certificates"] = "revise-records",
        ["get /api/v1/instruments"] = "read",
        ["get /api/v1/stream"] = "read",
        ["get /api/v1/demo/faults"] = "read",
        ["post /api/v1/demo/faults"] = "inject-faults",
        ["delete /api/v1/demo/faults/{id}"] = "inject-faults",
        ["get /health/live"] = Anybody,
        ["get /health/ready"] = Anybody,
    };

    // Not in the description of the API.
    private static readonly Dictionary<string, string> Besides = new()
    {
        ["get /"] = Anybody,
        ["get /openapi/v1.json"] = Anybody,
        ["get /metrics"] = "read",
        ["get /api/v1/{**rest}"] = SignedIn,
    };

    private static CancellationToken Cancel => TestContext.Current.CancellationToken;

    [Fact]
    public async Task Every_described_operation_has_a_row_and_says_its_permission()
    {
        await using PeopleHost host = await PeopleHost.StartAsync(isDemo: true);

        JsonElement document = (await host.Api.GetAsync("/openapi/v1.json")).Json;

        Dictionary<string, string> found = [];
        foreach (JsonProperty path in document.GetProperty("paths").EnumerateObject())
        {
            foreach (JsonProperty operation in path.Value.EnumerateObject())
            {
                string needed = operation.Value.GetProperty("x-permission").GetString()!;
                found[$"{operation.Name} {path.Name}"] = needed;
                Assert.Equal(needed == Anybody ? 0 : 2, operation.Value.TryGetProperty("security", out JsonElement security) ? security.GetArrayLength() : 0);
            }
        }

        Assert.Equal(Sorted(Described), Sorted(found));
        JsonElement schemes = document.GetProperty("components").GetProperty("securitySchemes");
        Assert.Equal("cookie", schemes.GetProperty("session").GetProperty("in").GetString());
        Assert.Equal("bearer", schemes.GetProperty("token").GetProperty("scheme").GetString());
    }

    [Fact]
    public async Task Every_mapped_route_has_a_row()
    {
        await using PeopleHost host = await PeopleHost.StartAsync(isDemo: true);

        IEnumerable<string> routes = host.Api.Services.GetRequiredService<IEnumerable<EndpointDataSource>>()
            .SelectMany(source => source.Endpoints).OfType<RouteEndpoint>()
            .SelectMany(endpoint => (endpoint.Metadata.GetMetadata<IHttpMethodMetadata>()?.HttpMethods ?? ["get"])
                .Select(method => $"{method.ToLowerInvariant()} /{endpoint.RoutePattern.RawText!.Trim('/').Replace("{documentName}", "v1", StringComparison.Ordinal).Replace(":guid}", "}", StringComparison.Ordinal)}"));

        Assert.Empty(routes.Except(Described.Keys).Except(Besides.Keys).Except(["get /metrics"]));
    }

    [Theory]
    [InlineData(null)]
    [InlineData(Role.Technician)]
    [InlineData(Role.QualityManager)]
    [InlineData(Role.Auditor)]
    [InlineData(Role.Administrator)]
    public async Task A_role_reaches_what_its_work_needs_and_no_more(Role? role)
    {
        await using PeopleHost host = await PeopleHost.StartAsync(isDemo: true);
        string? token = null;
        if (role is { } one)
        {
            await host.AddAsync("person", one);
            token = await host.AddTokenAsync("person", [one]);
        }

        foreach ((string operation, string needed) in Described.Concat(Besides))
        {
            (HttpStatusCode status, string code) = await CallAsync(host, operation, token);

            bool isLetIn = needed == Anybody || (role is { } held && RolesThatMay[needed].Contains(held));
            if (isLetIn)
            {
                Assert.False(code is "not-signed-in" or "not-permitted" or "password-change-needed" or "confirm-password", $"{operation} as {role}: {status} {code}");
            }
            else
            {
                Assert.True((role is null ? (HttpStatusCode.Unauthorized, "not-signed-in") : (HttpStatusCode.Forbidden, "not-permitted")) == (status, code), $"{operation} as {role}: {status} {code}");
            }
        }
    }

    [Theory]
    [InlineData("revoked")]
    [InlineData("ended")]
    [InlineData("disabled")]
    [InlineData("mistyped")]
    public async Task Who_is_shut_out_reaches_nothing_but_what_strangers_do(string why)
    {
        await using PeopleHost host = await PeopleHost.StartAsync(isDemo: true);
        Role[] all = Enum.GetValues<Role>();
        await host.AddAsync("person", all);
        await host.AddAsync("other", Role.Administrator);
        string token = await host.AddTokenAsync("person", all, TimeSpan.FromHours(1));
        Assert.Equal(HttpStatusCode.OK, (await CallAsync(host, "get /api/v1/sources", token)).Status);
        switch (why)
        {
            case "revoked":
                ApiToken known = Assert.Single(await host.Sessions.ListTokensAsync(PeopleHost.Site, "person", Cancel));
                Assert.Equal(HttpStatusCode.NoContent, (await CallAsync(host, $"delete /api/v1/tokens/{known.Id}", token)).Status);
                break;
            case "ended":
                host.Api.Clock.Advance(TimeSpan.FromHours(1));
                break;
            case "disabled":
                Assert.Equal(HttpStatusCode.OK, (await host.PostAsync("/api/v1/accounts/person", new { disabled = true }, await host.CookieAsync("other"))).Status);
                break;
            default:
                token = token[..^1] + (token[^1] == 'A' ? 'E' : 'A');
                break;
        }

        foreach ((string operation, string needed) in Described.Concat(Besides).Where(row => row.Value != Anybody))
        {
            Assert.True((HttpStatusCode.Unauthorized, "not-signed-in") == await CallAsync(host, operation, token), operation);
        }
    }

    [Fact]
    public async Task Before_the_one_time_password_is_changed_nothing_else_can_be_done()
    {
        await using PeopleHost host = await PeopleHost.StartAsync(isDemo: true);
        await host.AddAsync("boss", Role.Administrator);
        string boss = await host.CookieAsync("boss");
        JsonElement made = (await host.PostAsync("/api/v1/accounts", new { name = "newcomer", displayName = "N. Comer", roles = (string[])["quality-manager", "administrator"] }, boss)).Json;
        string cookie = await host.CookieAsync("newcomer", made.GetProperty("oneTimePassword").GetString()!);

        foreach ((string operation, string needed) in Described.Where(row => row.Value is not (Anybody or SignedIn)))
        {
            Assert.True((HttpStatusCode.Forbidden, "password-change-needed") == await CallAsync(host, operation, null, cookie), operation);
        }

        Assert.True((await host.GetAsync("/api/v1/me", cookie)).Json.GetProperty("mustChangePassword").GetBoolean());
    }

    private static async Task<(HttpStatusCode Status, string Code)> CallAsync(PeopleHost host, string operation, string? token, string? cookie = null)
    {
        string[] parts = operation.Split(' ');
        string path = parts[1].Replace("{id}", "0193a5f0-0000-7000-8000-000000000000", StringComparison.Ordinal).Replace("{name}", "nobody", StringComparison.Ordinal).Replace("{**rest}", "nothing", StringComparison.Ordinal);
        using HttpRequestMessage request = new(new HttpMethod(parts[0].ToUpperInvariant()), path);
        if (token is not null)
        {
            request.Headers.TryAddWithoutValidation("Authorization", "Bearer " + token);
        }

        if (cookie is not null)
        {
            request.Headers.TryAddWithoutValidation("Cookie", cookie);
            request.Headers.TryAddWithoutValidation("Sec-Fetch-Site", "same-origin");
        }

        if (parts[0] == "post")
        {
            request.Content = new StringContent("{}", Encoding.UTF8, "application/json");
        }

        // The stream never ends by itself: its head is enough.
        using HttpResponseMessage response = await host.Api.Client.SendAsync(request, HttpCompletionOption.ResponseHeadersRead, Cancel);
        if (response.Content.Headers.ContentType?.MediaType != "application/problem+json")
        {
            return (response.StatusCode, string.Empty);
        }

        JsonElement problem = JsonSerializer.Deserialize<JsonElement>(await response.Content.ReadAsStringAsync(Cancel));
        return (response.StatusCode, problem.GetProperty("findings")[0].GetProperty("code").GetString()!);
    }

    private static IEnumerable<string> Sorted(Dictionary<string, string> rows) => rows.Select(row => $"{row.Key} -> {row.Value}").Order(StringComparer.Ordinal);
}
