using System.Net;
using System.Text.Json;
using LabWatch.Lab.Alerts;
using LabWatch.Tests.Api.Fakes;

namespace LabWatch.Tests.Api;

public sealed class AlertEndpointsTests
{
    [Fact]
    public async Task An_acknowledgement_names_the_person_and_is_on_record()
    {
        await using ApiHost host = await ApiHost.StartAsync();
        Alert alert = host.Rooms.Alerts.Raise(HotCase(host));

        Answer answer = await AcknowledgeAsync(host, alert.Id, """{"note":"Fan was off"}""");

        Assert.Equal(HttpStatusCode.OK, answer.Status);
        Assert.Equal("kim", answer.Json.GetProperty("acknowledgedBy").GetString());
        Assert.Equal("raised-acknowledged", answer.Json.GetProperty("state").GetString());
        JsonElement steps = (await host.GetAsync($"/api/v1/alerts/{alert.Id}")).Json.GetProperty("transitions");
        Assert.Equal(["raised", "acknowledged"], steps.EnumerateArray().Select(step => step.GetProperty("event").GetString()));
    }

    [Fact]
    public async Task The_person_is_the_one_who_is_signed_in_whatever_the_request_says()
    {
        await using ApiHost host = await ApiHost.StartAsync();
        Alert alert = host.Rooms.Alerts.Raise(HotCase(host));

        Answer answer = await AcknowledgeAsync(host, alert.Id, """{"by":"somebody-else","note":null}""");

        Assert.Equal("kim", answer.Json.GetProperty("acknowledgedBy").GetString());
    }

    [Fact]
    public async Task A_shelf_names_who_until_when_and_why_and_can_be_ended()
    {
        await using ApiHost host = await ApiHost.StartAsync();
        Alert alert = host.Rooms.Alerts.Raise(HotCase(host));

        Answer shelved = await host.SendAsync(HttpMethod.Post, $"/api/v1/alerts/{alert.Id}/shelve", """{"reason":"compressor is serviced","minutes":60}""");
        Answer wrong = await host.SendAsync(HttpMethod.Post, $"/api/v1/alerts/{alert.Id}/return-to-service", "{}");
        Answer ended = await host.SendAsync(HttpMethod.Post, $"/api/v1/alerts/{alert.Id}/unshelve", """{"note":"done"}""");

        Assert.Equal(("kim", "compressor is serviced"), (shelved.Json.GetProperty("shelf").GetProperty("by").GetString(), shelved.Json.GetProperty("shelf").GetProperty("reason").GetString()));
        Assert.Equal(HttpStatusCode.NotFound, wrong.Status);
        Assert.Equal(JsonValueKind.Null, ended.Json.GetProperty("shelf").ValueKind);
    }

    [Fact]
    public async Task Acknowledging_again_changes_nothing_and_another_person_comes_too_late()
    {
        await using ApiHost host = await ApiHost.StartAsync();
        Alert alert = host.Rooms.Alerts.Raise(HotCase(host));
        await AcknowledgeAsync(host, alert.Id, "{}");

        Assert.Equal(HttpStatusCode.OK, (await AcknowledgeAsync(host, alert.Id, "{}")).Status);
        host.Rooms.Callers.Be("lee");
        Answer late = await AcknowledgeAsync(host, alert.Id, "{}");

        Assert.Equal(HttpStatusCode.Conflict, late.Status);
        Assert.Equal(["acknowledged-already"], late.FindingCodes);
    }

    [Theory]
    [InlineData("""{"note":"\u0000"}""", "not-a-note")]
    [InlineData("[1]", "malformed")]
    [InlineData("{", "malformed")]
    public async Task A_bad_acknowledgement_is_refused_with_findings(string body, string code)
    {
        await using ApiHost host = await ApiHost.StartAsync();
        Alert alert = host.Rooms.Alerts.Raise(HotCase(host));

        Answer answer = await AcknowledgeAsync(host, alert.Id, body);

        Assert.Equal(HttpStatusCode.BadRequest, answer.Status);
        Assert.Equal([code], answer.FindingCodes);
        Assert.Null(host.Rooms.Alerts.Open()[0].AcknowledgedBy);
    }

    [Theory]
    [InlineData("0193a5f0-0000-7000-8000-000000000000")]
    [InlineData("not-an-id")]
    public async Task An_unknown_alert_is_not_found(string id)
    {
        await using ApiHost host = await ApiHost.StartAsync();

        Assert.Equal(HttpStatusCode.NotFound, (await host.GetAsync("/api/v1/alerts/" + id)).Status);
        Assert.Equal(HttpStatusCode.NotFound, (await host.SendAsync(HttpMethod.Post, $"/api/v1/alerts/{id}/acknowledge", "{}")).Status);
    }

    [Fact]
    public async Task Alerts_are_paged_and_filtered()
    {
        await using ApiHost host = await ApiHost.StartAsync();
        for (int i = 0; i < 3; i++)
        {
            host.Rooms.Alerts.Raise(HotCase(host) with { RaisedAt = host.Now + TimeSpan.FromSeconds(i) });
        }

        JsonElement first = (await host.GetAsync("/api/v1/alerts?count=2&source=hollin-vale.rowan&open=true")).Json;
        JsonElement second = (await host.GetAsync("/api/v1/alerts?count=2&open=true&after=" + first.GetProperty("next").GetString())).Json;

        Assert.Equal(2, first.GetProperty("items").GetArrayLength());
        Assert.Equal(1, second.GetProperty("items").GetArrayLength());
        Assert.Equal(JsonValueKind.Null, second.GetProperty("next").ValueKind);
    }

    [Fact]
    public async Task Every_mistake_in_the_filters_of_a_list_is_said()
    {
        await using ApiHost host = await ApiHost.StartAsync();

        Answer answer = await host.GetAsync("/api/v1/alerts?count=501&source=x&open=yes&colour=red");

        Assert.Equal(["unknown-parameter", "not-a-source", "not-a-flag", "out-of-range"], answer.FindingCodes);
    }

    [Fact]
    public async Task A_hazard_stands_first_among_the_open_alerts_of_its_source()
    {
        await using ApiHost host = await ApiHost.StartAsync();
        host.Rooms.Alerts.Raise(HotCase(host) with { Id = Guid.CreateVersion7(), Code = "stability", Subject = "well-a", Priority = AlertPriority.High });
        host.Rooms.Alerts.Raise(HotCase(host) with { Priority = AlertPriority.Low });

        JsonElement open = (await host.GetAsync("/api/v1/sources/hollin-vale.rowan")).Json.GetProperty("source").GetProperty("status").GetProperty("openAlerts");

        Assert.Equal(["hot-surface", "stability"], open.EnumerateArray().Select(alert => alert.GetProperty("code").GetString()));
        Assert.Equal("Outer case", open[0].GetProperty("subjectName").GetString());
    }

    internal static Alert HotCase(ApiHost host) => new(
        Guid.CreateVersion7(), SampleLab.Rowan, HazardCode.HotSurface, "case", AlertPriority.High, AlertState.RaisedUnacknowledged, host.Now,
        "Rowan, outer case: this surface sensor reads 61 degC, limit 48 degC", "Treat as hot until measured.", 61, 48, "Cel");

    private static Task<Answer> AcknowledgeAsync(ApiHost host, Guid id, string body) =>
        host.SendAsync(HttpMethod.Post, $"/api/v1/alerts/{id}/acknowledge", body);
}
