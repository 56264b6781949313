using System.Net;
using System.Text.Json;
using LabWatch.Assessments.Planning;
using LabWatch.Intake.Diagnostics;

namespace LabWatch.Tests.Api;

public sealed class ServiceEndpointsTests
{
    [Fact]
    public async Task The_document_describes_every_endpoint_with_summary_and_parameters()
    {
        await using ApiHost host = await ApiHost.StartAsync(isDemo: true);

        JsonElement paths = (await host.GetAsync("/openapi/v1.json")).Json.GetProperty("paths");

        foreach (JsonProperty path in paths.EnumerateObject())
        {
            foreach (JsonProperty operation in path.Value.EnumerateObject())
            {
                Assert.NotEmpty(operation.Value.GetProperty("summary").GetString()!);
                Assert.NotEmpty(operation.Value.GetProperty("operationId").GetString()!);
            }
        }

        JsonElement parameters = paths.GetProperty("/api/v1/sources/{id}/readings").GetProperty("get").GetProperty("parameters");
        Assert.Contains(parameters.EnumerateArray(), parameter => parameter.GetProperty("name").GetString() == "bucket");
    }

    [Fact]
    public async Task Times_are_described_as_date_and_time_and_numbers_as_numbers()
    {
        await using ApiHost host = await ApiHost.StartAsync();

        JsonElement schemas = (await host.GetAsync("/openapi/v1.json")).Json.GetProperty("components").GetProperty("schemas");

        JsonElement properties = schemas.GetProperty("TemperatureView").GetProperty("properties");
        Assert.Equal("number", properties.GetProperty("celsius").GetProperty("type").GetString());
        Assert.Contains("degree Celsius", properties.GetProperty("celsius").GetProperty("description").GetString(), StringComparison.Ordinal);
        Assert.Contains("date-time", schemas.GetRawText(), StringComparison.Ordinal);
    }

    [Fact]
    public async Task The_faults_of_the_demo_are_there_in_the_demo_only()
    {
        await using ApiHost demo = await ApiHost.StartAsync(isDemo: true);
        await using ApiHost service = await ApiHost.StartAsync();

        Assert.Equal(HttpStatusCode.OK, (await demo.GetAsync("/api/v1/demo/faults")).Status);
        Assert.Equal(HttpStatusCode.NotFound, (await service.GetAsync("/api/v1/demo/faults")).Status);
    }

    [Fact]
    public async Task A_fault_is_injected_and_repaired()
    {
        await using ApiHost host = await ApiHost.StartAsync(isDemo: true);

        Answer broken = await host.SendAsync(HttpMethod.Post, "/api/v1/demo/faults", """{"kind":"insulation-damage","source":"hollin-vale.rowan","size":4}""");
        Answer mended = await host.SendAsync(HttpMethod.Delete, "/api/v1/demo/faults/f-1", null);
        Answer again = await host.SendAsync(HttpMethod.Delete, "/api/v1/demo/faults/f-1", null);

        JsonElement active = broken.Json.GetProperty("active")[0];
        Assert.Equal("insulation-damage", active.GetProperty("kind").GetString());
        Assert.Equal("hollin-vale.rowan", active.GetProperty("source").GetString());
        Assert.Equal(0, mended.Json.GetProperty("active").GetArrayLength());
        Assert.Equal(["unknown-fault"], again.FindingCodes);
    }

    [Fact]
    public async Task Every_mistake_in_a_fault_is_said()
    {
        await using ApiHost host = await ApiHost.StartAsync(isDemo: true);

        Answer answer = await host.SendAsync(HttpMethod.Post, "/api/v1/demo/faults", """{"kind":"earthquake","source":"rowan","durationSeconds":0,"onsetSeconds":-1}""");

        Assert.Equal(["unknown-kind", "not-a-source", "out-of-range", "out-of-range"], answer.FindingCodes);
    }

    [Fact]
    public async Task The_service_is_ready_when_every_part_is()
    {
        await using ApiHost host = await ApiHost.StartAsync();

        Answer answer = await host.GetAsync("/health/ready");

        Assert.Equal(HttpStatusCode.OK, answer.Status);
        Assert.Equal(
            ["alerts", "broker", "planner", "reading-store", "records"],
            answer.Json.GetProperty("parts").EnumerateArray().Select(part => part.GetProperty("name").GetString()).Order());
    }

    [Theory]
    [InlineData("reading-store")]
    [InlineData("broker")]
    [InlineData("planner")]
    [InlineData("alerts")]
    public async Task The_service_is_not_ready_when_a_part_is_not_and_says_which(string part)
    {
        await using ApiHost host = await ApiHost.StartAsync();
        host.Rooms.Store.IsDown = part == "reading-store";
        host.Rooms.Intake.CommitsStopped = part == "broker";
        host.Rooms.Intake.Link = part == "broker" ? BrokerLinkState.Connected : BrokerLinkState.None;
        host.Rooms.Planner.Current = PlannerStatus.None with { LastError = part == "planner" ? "It broke." : null };
        host.Rooms.Alerts.JournalFailing = part == "alerts";

        Answer answer = await host.GetAsync("/health/ready");

        Assert.Equal(HttpStatusCode.ServiceUnavailable, answer.Status);
        Assert.Equal(
            [part],
            answer.Json.GetProperty("parts").EnumerateArray().Where(found => !found.GetProperty("isReady").GetBoolean()).Select(found => found.GetProperty("name").GetString()));
        Assert.DoesNotContain("secret path", answer.Text, StringComparison.Ordinal);
    }

    [Fact]
    public async Task Metrics_are_there_for_prometheus()
    {
        await using ApiHost host = await ApiHost.StartAsync();
        await host.GetAsync("/api/v1/sources");

        Answer answer = await host.GetAsync("/metrics");

        Assert.Equal(HttpStatusCode.OK, answer.Status);
        Assert.Contains("# TYPE ", answer.Text, StringComparison.Ordinal);
    }

    [Theory]
    [InlineData("/api/v1/sources")]
    [InlineData("/api/v1/nothing")]
    [InlineData("/health/live")]
    [InlineData("/")]
    public async Task Every_answer_tells_browsers_to_do_no_more_than_needed(string path)
    {
        await using ApiHost host = await ApiHost.StartAsync();

        Answer answer = await host.GetAsync(path, ("Origin", "https://elsewhere.example"));

        Assert.Contains("default-src 'none'", answer.Headers["Content-Security-Policy"], StringComparison.Ordinal);
        Assert.DoesNotContain("unsafe", answer.Headers["Content-Security-Policy"], StringComparison.Ordinal);
        Assert.Equal("nosniff", answer.Headers["X-Content-Type-Options"]);
        Assert.DoesNotContain(answer.Headers.Keys, name => name.StartsWith("Access-Control", StringComparison.OrdinalIgnoreCase));
    }

    [Theory]
    [InlineData("cross-site")]
    [InlineData("same-site")]
    public async Task Another_sites_page_cannot_change_anything(string site)
    {
        await using ApiHost host = await ApiHost.StartAsync(isDemo: true);

        Answer answer = await host.SendAsync(HttpMethod.Post, "/api/v1/demo/faults", """{"kind":"frost","source":"hollin-vale.fir"}""", ("Sec-Fetch-Site", site));

        Assert.Equal(HttpStatusCode.Forbidden, answer.Status);
        Assert.Empty(host.Rooms.Demo.ActiveFaults);
    }

    [Fact]
    public async Task An_unknown_endpoint_of_the_api_is_a_problem_and_no_page()
    {
        await using ApiHost host = await ApiHost.StartAsync();

        Answer answer = await host.GetAsync("/api/v1/nothing/here");

        Assert.Equal(HttpStatusCode.NotFound, answer.Status);
        Assert.Equal("application/problem+json", answer.MediaType);
    }
}
