using System.Net;
using System.Text.Json;
using LabWatch.Lab.Assessments;
using LabWatch.Tests.Assessments.Forecasts;

namespace LabWatch.Tests.Api;

public sealed class ForecastEndpointsTests
{
    [Fact]
    public async Task A_source_tells_its_drifts_with_days_slope_crossing_and_charts()
    {
        await using ApiHost host = await ApiHost.StartAsync();
        Fill(host, 30);

        JsonElement item = (await host.GetAsync("/api/v1/sources/hollin-vale.hazel/forecasts")).Json.GetProperty("items")[0];

        Assert.Equal("value", item.GetProperty("quantity").GetString());
        Assert.Equal(30, item.GetProperty("days").GetArrayLength());
        Assert.Equal(0.05 * 365.25, item.GetProperty("slopePerYear").GetProperty("value").GetDouble(), 1e-6);
        Assert.Equal(2, item.GetProperty("line")[0].GetDouble(), 1e-6);
        Assert.Equal(10, item.GetProperty("chart").GetProperty("referenceDays").GetInt32());
        Assert.Equal(1000, item.GetProperty("chart").GetProperty("ewmaRunLength").GetDouble());
        Assert.Contains("about", item.GetProperty("explanation").GetString(), StringComparison.Ordinal);
    }

    [Fact]
    public async Task An_assessment_has_the_drift_as_it_stood_at_its_window()
    {
        await using ApiHost host = await ApiHost.StartAsync();
        List<Assessment> made = Fill(host, 30);

        JsonElement answer = (await host.GetAsync($"/api/v1/assessments/{made[11].Id}/forecasts")).Json;

        Assert.Equal(12, Assert.Single(answer.GetProperty("items").EnumerateArray()).GetProperty("days").GetArrayLength());
        Assert.Equal(made[11].Window.End.ToString(), answer.GetProperty("at").GetString());
    }

    [Fact]
    public async Task A_source_without_assessments_has_none_and_one_that_is_not_there_is_not_found()
    {
        await using ApiHost host = await ApiHost.StartAsync();

        Assert.Equal(0, (await host.GetAsync("/api/v1/sources/hollin-vale.fir/forecasts")).Json.GetProperty("items").GetArrayLength());
        Assert.Equal(HttpStatusCode.NotFound, (await host.GetAsync("/api/v1/sources/hollin-vale.oak/forecasts")).Status);
        Assert.Equal(HttpStatusCode.NotFound, (await host.GetAsync("/api/v1/assessments/none/forecasts")).Status);
    }

    private static List<Assessment> Fill(ApiHost host, int days)
    {
        List<Assessment> made = [.. Enumerable.Range(0, days).Select(day => MadeAssessments.Stability(day, 2 + (0.05 * day)))];
        made.ForEach(host.Rooms.Assessments.Add);
        return made;
    }
}
