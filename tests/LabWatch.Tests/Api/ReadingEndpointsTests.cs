using System.Net;
using System.Text.Json;
using FsCheck;
using FsCheck.Fluent;
using FsCheck.Xunit;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Time;
using LabWatch.Service.Api.Sources;
using LabWatch.Tests.Api.Fakes;

namespace LabWatch.Tests.Api;

public sealed class ReadingEndpointsTests
{
    private const string Path = "/api/v1/sources/hollin-vale.rowan/readings";

    [Fact]
    public async Task All_that_is_wrong_with_a_request_is_said_at_once()
    {
        await using ApiHost host = await ApiHost.StartAsync();

        Answer answer = await host.GetAsync(Path + "?channel=nope&from=yesterday&to=2026-12-01&bucket=0&format=xml&chanel=well-a");

        Assert.Equal(HttpStatusCode.BadRequest, answer.Status);
        Assert.Equal(["unknown-parameter", "unknown-channel", "not-a-time", "not-a-time", "unknown-format", "not-a-bucket"], answer.FindingCodes);
        Assert.All(answer.Json.GetProperty("findings").EnumerateArray(), finding => Assert.NotEmpty(finding.GetProperty("cure").GetString()!));
    }

    [Theory]
    [InlineData("?channel=well-a&from=2026-12-01T09:00:00Z&to=2026-12-01T08:00:00Z", "window-empty")]
    [InlineData("?channel=well-a&channel=well-b", "given-twice")]
    [InlineData("?channel=well-a&from=1970-01-01T00:00:00Z&bucket=raw", "too-many-rows")]
    [InlineData("?channel=well-a&from=1970-01-01T00:00:00Z&bucket=60", "too-many-rows")]
    [InlineData("", "missing")]
    public async Task A_mistake_is_named(string query, string code)
    {
        await using ApiHost host = await ApiHost.StartAsync();

        Assert.Contains(code, (await host.GetAsync(Path + query)).FindingCodes);
    }

    [Fact]
    public async Task Raw_readings_come_with_their_temperature_and_quality()
    {
        await using ApiHost host = await ApiHost.StartAsync();
        host.Rooms.Store.Add(
            SampleLab.Rowan,
            new Reading("well-a", host.Now - TimeSpan.FromSeconds(2), 100),
            new Reading("well-a", host.Now - TimeSpan.FromSeconds(1), double.NaN, ReadingQuality.NoValue));

        JsonElement json = (await host.GetAsync(Path + "?channel=well-a&bucket=raw")).Json;

        Assert.Equal(JsonValueKind.Null, json.GetProperty("bucketSeconds").ValueKind);
        Assert.Equal(0, json.GetProperty("celsius")[0].GetDouble(), 1e-9);
        Assert.Equal(JsonValueKind.Null, json.GetProperty("raw")[1].ValueKind);
        Assert.Equal(JsonValueKind.Null, json.GetProperty("celsius")[1].ValueKind);
        Assert.Equal(1, json.GetProperty("quality")[1].GetInt32());
        Assert.Equal("2026-12-01T08:59:58Z", json.GetProperty("time")[0].GetString());
    }

    [Fact]
    public async Task A_long_window_is_reduced_with_the_extremes_kept()
    {
        await using ApiHost host = await ApiHost.StartAsync();
        Instant start = host.Now - TimeSpan.FromHours(2);
        host.Rooms.Store.Add(SampleLab.Rowan, [.. Enumerable.Range(0, 7200).Select(second => new Reading("well-a", start + TimeSpan.FromSeconds(second), second == 100 ? 150 : 140))]);

        JsonElement json = (await host.GetAsync(Path + "?channel=well-a&from=2026-12-01T07:00:00Z")).Json;

        Assert.Equal(5, json.GetProperty("bucketSeconds").GetDouble());
        Assert.Equal(1440, json.GetProperty("time").GetArrayLength());
        Assert.Equal(150, json.GetProperty("rawMaximum")[20].GetDouble());
        Assert.True(json.GetProperty("celsiusMaximum")[20].GetDouble() > json.GetProperty("celsius")[20].GetDouble());
        Assert.Equal(5, json.GetProperty("count")[0].GetInt32());
    }

    [Theory]
    [InlineData("&format=csv", null)]
    [InlineData("", "text/csv")]
    public async Task Readings_come_as_csv_where_asked_for(string query, string? accept)
    {
        await using ApiHost host = await ApiHost.StartAsync();
        host.Rooms.Store.Add(SampleLab.Rowan, new Reading("well-a", host.Now - TimeSpan.FromSeconds(2), 100.5));

        Answer answer = await host.GetAsync(Path + "?channel=well-a&bucket=raw" + query, accept is null ? [] : [("Accept", accept)]);

        Assert.Equal("text/csv", answer.MediaType);
        string[] lines = answer.Text.Split("\r\n");
        Assert.Equal("time,raw (Ohm),t90 (degC),quality", lines[0]);
        Assert.StartsWith("2026-12-01T08:59:58Z,100.5,1.27", lines[1], StringComparison.Ordinal);
    }

    [Fact]
    public async Task A_store_that_does_not_answer_gives_a_passing_refusal_that_tells_nothing_of_the_inside()
    {
        await using ApiHost host = await ApiHost.StartAsync();
        host.Rooms.Store.IsDown = true;

        Answer answer = await host.GetAsync(Path + "?channel=well-a");

        Assert.Equal(HttpStatusCode.ServiceUnavailable, answer.Status);
        Assert.Equal("5", answer.Headers["Retry-After"]);
        Assert.DoesNotContain("secret path", answer.Text, StringComparison.Ordinal);
    }

    [Property]
    public Property The_automatic_bucket_keeps_a_chart_small_and_never_wastes_detail() =>
        Prop.ForAll(
            Gen.Choose(1, 400_000_000).ToArbitrary(),
            Gen.Elements(0.1, 1.0, 10.0, 60.0).ToArbitrary(),
            (windowSeconds, intervalSeconds) =>
            {
                TimeWindow window = new(new Instant(0), new Instant(windowSeconds * Instant.MicrosecondsPerSecond));
                TimeSpan? bucket = ReadingRequest.Automatic(window, TimeSpan.FromSeconds(intervalSeconds));
                double rows = windowSeconds / (bucket?.TotalSeconds ?? intervalSeconds);
                return rows <= ReadingRequest.ChartRows && (bucket is null || bucket.Value.TotalSeconds >= intervalSeconds);
            });
}
