using System.Net;
using System.Text.Json;
using System.Text.Json.Nodes;
using LabWatch.Records.Audit;

namespace LabWatch.Tests.Api;

public sealed class AuditEndpointsTests
{
    private static CancellationToken Token => TestContext.Current.CancellationToken;

    [Fact]
    public async Task An_entry_is_told_whole_with_its_content_as_an_object()
    {
        await using ApiHost host = await ApiHost.StartAsync();
        IAuditLedger trail = host.Rooms.Trail;
        await trail.AppendAsync(new AuditNote("hollin-vale", host.Now, "kim", "signed-in", "account/kim", new JsonObject { ["from"] = "127.0.0.1" }, null), Token);
        host.Rooms.Trail.Next = 17;

        JsonElement json = (await host.GetAsync("/api/v1/audit")).Json;

        JsonElement entry = json.GetProperty("items")[0];
        Assert.Equal(
            ["site", "sequence", "at", "actor", "action", "subject", "content", "recordDigest", "previous", "digest"],
            entry.EnumerateObject().Select(member => member.Name));
        Assert.Equal("127.0.0.1", entry.GetProperty("content").GetProperty("from").GetString());
        Assert.Equal("2026-12-01T09:00:00Z", entry.GetProperty("at").GetString());
        Assert.Equal("17", json.GetProperty("next").GetString());
        Assert.Equal(1, json.GetProperty("head").GetProperty("sequence").GetInt64());
    }

    [Fact]
    public async Task The_filters_reach_the_trail_of_the_site()
    {
        await using ApiHost host = await ApiHost.StartAsync();

        JsonElement json = (await host.GetAsync("/api/v1/audit?action=alert-step&actor=kim&subject=alert/&from=2026-12-01T00:00:00Z&after=12&count=7")).Json;

        AuditQuery asked = host.Rooms.Trail.LastQuery!;
        Assert.Equal(
            ("hollin-vale", 7, "alert-step", "kim", "alert/", "2026-12-01T00:00:00Z", 12L),
            (asked.Site, asked.Count, asked.Action, asked.Actor, asked.Subject, asked.From.ToString(), asked.Before));
        Assert.Equal(JsonValueKind.Null, json.GetProperty("head").ValueKind);
    }

    [Theory]
    [InlineData("after=x")]
    [InlineData("after=-1")]
    [InlineData("after=99999999999999999999")]
    [InlineData("from=yesterday")]
    [InlineData("color=red")]
    public async Task A_mistake_in_a_filter_is_said(string query)
    {
        await using ApiHost host = await ApiHost.StartAsync();

        Assert.Equal(HttpStatusCode.BadRequest, (await host.GetAsync("/api/v1/audit?" + query)).Status);
    }
}
