using System.Net;
using System.Text.Json;
using LabWatch.Records.Accounts;
using LabWatch.Service.Api.Access;
using LabWatch.Tests.Api.Fakes;
using LabWatch.Tests.Records;
using Microsoft.Extensions.DependencyInjection;

namespace LabWatch.Tests.Api;

public sealed class RunEndpointsTests
{
    private const string Path = "/api/v1/runs";

    // No reading has come in: the source is not ready, so that a reason is needed.
    private const string Start = """{ "source": "hollin-vale.fir", "jobNumber": " J-100 ", "item": "Thermometer 7", "setPointCelsius": 30, "band": "lwir", "overrideReason": "Check before the day" }""";

    [Fact]
    public async Task A_run_is_started_seen_at_the_source_ended_and_listed()
    {
        await using SqliteRecords records = await SqliteRecords.CopyAsync();
        await using ApiHost host = await StartAsync(records);
        Answer started = await PostAsync(host, Path, Start);
        Assert.Equal(HttpStatusCode.Created, started.Status);
        string id = started.Json.GetProperty("id").GetString()!;
        Assert.Equal(("J-100", "kim", "unknown"), (started.Member("jobNumber"), started.Member("startedBy"), started.Member("readinessAtStart")));
        Assert.Equal(id, (await host.GetAsync("/api/v1/sources/hollin-vale.fir")).Json.GetProperty("source").GetProperty("status").GetProperty("run").GetProperty("id").GetString());
        Assert.Single((await host.GetAsync(Path + "?open=true&source=hollin-vale.fir")).Json.GetProperty("items").EnumerateArray());

        Answer corrected = await PostAsync(host, $"{Path}/{id}/correct", """{ "item": "Thermometer 8", "reason": "Read the label again" }""");
        Assert.Equal("Thermometer 8", corrected.Member("item"));
        JsonElement change = corrected.Json.GetProperty("steps")[1].GetProperty("changes")[0];
        Assert.Equal(("item", "Thermometer 7", "Thermometer 8"), (change.GetProperty("member").GetString(), change.GetProperty("from").GetString(), change.GetProperty("to").GetString()));

        Answer ended = await PostAsync(host, $"{Path}/{id}/end", """{ "note": "All points" }""");
        Assert.Equal(("kim", "All points"), (ended.Member("endedBy"), ended.Member("note")));
        Assert.Equal(HttpStatusCode.OK, (await PostAsync(host, $"{Path}/{id}/end", "{}")).Status);
        Assert.Equal(HttpStatusCode.Conflict, (await PostAsync(host, $"{Path}/{id}/end", "{}", ("X-Test-Caller", "lee Technician"))).Status);
        Assert.Equal(JsonValueKind.Null, (await host.GetAsync("/api/v1/sources/hollin-vale.fir")).Json.GetProperty("source").GetProperty("status").GetProperty("run").ValueKind);
        Assert.Empty((await host.GetAsync(Path + "?open=true")).Json.GetProperty("items").EnumerateArray());
    }

    [Fact]
    public async Task A_phone_that_sends_its_start_again_gets_the_same_run()
    {
        await using SqliteRecords records = await SqliteRecords.CopyAsync();
        await using ApiHost host = await StartAsync(records);
        Answer first = await PostAsync(host, Path, Start, ("Idempotency-Key", "7f9c"));
        Answer again = await PostAsync(host, Path, Start, ("Idempotency-Key", "7f9c"));
        Assert.Equal((HttpStatusCode.Created, HttpStatusCode.OK), (first.Status, again.Status));
        Assert.Equal(first.Member("id"), again.Member("id"));
        Assert.Equal(["key-reused"], (await PostAsync(host, Path, Start.Replace("J-100", "J-101", StringComparison.Ordinal), ("Idempotency-Key", "7f9c"))).FindingCodes);
        Answer other = await PostAsync(host, Path, Start, ("Idempotency-Key", "other"));
        Assert.Equal(["source-in-use"], other.FindingCodes);
        Assert.Contains("J-100 of kim", other.Text, StringComparison.Ordinal);
    }

    [Fact]
    public async Task A_source_that_is_not_ready_needs_a_reason()
    {
        await using SqliteRecords records = await SqliteRecords.CopyAsync();
        await using ApiHost host = await StartAsync(records);
        Answer answer = await PostAsync(host, Path, """{ "source": "hollin-vale.fir", "jobNumber": "J", "item": "T", "setPointCelsius": 30 }""");
        Assert.Equal(HttpStatusCode.Conflict, answer.Status);
        Assert.All(answer.FindingCodes, code => Assert.Equal("not-ready", code));
        Assert.Contains("overrideReason", answer.Text, StringComparison.Ordinal);
    }

    [Theory]
    [InlineData("""{ "source": "hollin-vale.ash", "jobNumber": "J", "item": "T", "setPointCelsius": 30 }""", "/source")]
    [InlineData("""{ "source": "hollin-vale.fir", "jobNumber": "J", "item": "T", "setPointCelsius": 91 }""", "/setPointCelsius")]
    [InlineData("""{ "source": "hollin-vale.fir", "jobNumber": "J", "item": "T" }""", "/setPointCelsius")]
    [InlineData("""{ "source": "hollin-vale.fir", "jobNumber": "J", "item": "T", "setPointCelsius": 30, "band": "uv" }""", "/band")]
    [InlineData("""{ "source": "hollin-vale.fir", "jobNumber": " ", "item": "T\n", "setPointCelsius": 30, "note": "a\u0007b" }""", "/jobNumber /note")]
    [InlineData("""{ "source": "hollin-vale.fir", "jobNumber": "1234567890123456789012345678901234567890123456789012345678901", "item": "a\u0007b", "setPointCelsius": 30 }""", "/jobNumber /item")]
    public async Task A_bad_start_is_refused_with_findings_at_its_members(string body, string where)
    {
        await using ApiHost host = await ApiHost.StartAsync(change: services => services.AddSingleton<ICallers>(new FixedCaller("kim", Role.Technician)));
        Answer answer = await PostAsync(host, Path, body);
        Assert.Equal(HttpStatusCode.BadRequest, answer.Status);
        Assert.Equal(where, string.Join(' ', answer.Json.GetProperty("findings").EnumerateArray().Select(finding => finding.GetProperty("where").GetString())));
    }

    [Fact]
    public async Task A_correction_needs_a_reason_and_something_to_correct_and_a_cancelled_run_stays_so()
    {
        await using SqliteRecords records = await SqliteRecords.CopyAsync();
        await using ApiHost host = await StartAsync(records);
        string path = $"{Path}/{(await PostAsync(host, Path, Start)).Member("id")}/correct";
        Assert.Equal(["missing"], (await PostAsync(host, path, """{ "item": "x" }""")).FindingCodes);
        Assert.Equal(["nothing-to-correct"], (await PostAsync(host, path, """{ "reason": "x" }""")).FindingCodes);
        Assert.Equal(["out-of-range"], (await PostAsync(host, path, """{ "setPointCelsius": 500, "reason": "x" }""")).FindingCodes);
        Assert.True((await PostAsync(host, path, """{ "cancelled": true, "reason": "Wrong source" }""")).Json.GetProperty("cancelled").GetBoolean());
        Assert.Equal(["run-cancelled"], (await PostAsync(host, path, """{ "item": "x", "reason": "x" }""")).FindingCodes);
        Assert.Equal(HttpStatusCode.NotFound, (await PostAsync(host, $"{Path}/{Guid.CreateVersion7()}/correct", """{ "item": "x", "reason": "x" }""")).Status);
    }

    [Theory]
    [InlineData("Auditor")]
    [InlineData("Administrator")]
    public async Task Who_records_no_runs_cannot_start_one(string role)
    {
        await using ApiHost host = await ApiHost.StartAsync(change: services => services.AddSingleton<ICallers>(new FixedCaller("ann", Enum.Parse<Role>(role))));
        Assert.Equal(HttpStatusCode.Forbidden, (await PostAsync(host, Path, Start)).Status);
        Assert.Equal(HttpStatusCode.OK, (await host.GetAsync(Path)).Status);
    }

    private static Task<ApiHost> StartAsync(SqliteRecords records) => ApiHost.StartAsync(change: services =>
    {
        services.AddSingleton(records.Runs);
        services.AddSingleton<ICallers>(new FixedCaller("kim", Role.Technician));
    });

    private static Task<Answer> PostAsync(ApiHost host, string path, string? body, params (string Name, string Value)[] headers) =>
        host.SendAsync(HttpMethod.Post, path, body, headers);
}
