using System.Net;
using System.Text.Json;
using LabWatch.Lab.Assessments;
using LabWatch.Lab.Time;
using LabWatch.Metrology.Uncertainty;
using LabWatch.Tests.Api.Fakes;

namespace LabWatch.Tests.Api;

public sealed class AssessmentEndpointsTests
{
    [Fact]
    public async Task An_assessment_is_told_with_value_uncertainty_decision_and_provenance()
    {
        await using ApiHost host = await ApiHost.StartAsync();
        Assessment made = Stability(host, new Estimate(6.1, 0.6));
        host.Rooms.Assessments.Add(made);

        JsonElement json = (await host.GetAsync("/api/v1/assessments/" + made.Id)).Json;

        Assert.Equal(6.1, json.GetProperty("value").GetDouble());
        Assert.Equal(1.2, json.GetProperty("expandedUncertainty").GetDouble(), 1e-12);
        Assert.Equal(JsonValueKind.Null, json.GetProperty("degreesOfFreedom").ValueKind);
        Assert.Equal("conditional-pass", json.GetProperty("decision").GetString());
        Assert.Equal("cert-rowan-well-a@2", json.GetProperty("provenance").GetProperty("certificates")[0].GetString());
    }

    [Fact]
    public async Task An_assessment_without_a_value_has_null_and_not_an_invalid_number()
    {
        await using ApiHost host = await ApiHost.StartAsync();
        host.Rooms.Assessments.Add(Stability(host, Estimate.None));

        JsonElement json = (await host.GetAsync("/api/v1/assessments")).Json.GetProperty("items")[0];

        Assert.Equal(JsonValueKind.Null, json.GetProperty("value").ValueKind);
    }

    [Fact]
    public async Task The_filters_reach_the_ledger()
    {
        await using ApiHost host = await ApiHost.StartAsync();

        await host.GetAsync("/api/v1/assessments?source=hollin-vale.fir&criterion=stability&from=2026-12-01T00:00:00Z&to=2026-12-02T00:00:00%2B01:00&after=c&count=7");

        Assert.Equal(SampleLab.Fir, host.Rooms.Assessments.LastQuery!.Source);
        Assert.Equal("stability", host.Rooms.Assessments.LastQuery.Criterion);
        Assert.Equal("2026-12-01T23:00:00Z", host.Rooms.Assessments.LastQuery.Window!.Value.End.ToString());
        Assert.Equal("c", host.Rooms.Assessments.LastQuery.After);
        Assert.Equal(7, host.Rooms.Assessments.LastQuery.Count);
    }

    [Fact]
    public async Task Every_mistake_in_the_filters_is_said()
    {
        await using ApiHost host = await ApiHost.StartAsync();

        Answer answer = await host.GetAsync("/api/v1/assessments?source=x.y.z&criterion=shininess&from=now&count=-1&after=" + new string('a', 501));

        Assert.Equal(HttpStatusCode.BadRequest, answer.Status);
        Assert.Equal(["not-a-source", "unknown-criterion", "not-a-time", "not-a-cursor", "out-of-range"], answer.FindingCodes);
    }

    [Fact]
    public async Task An_unknown_assessment_is_not_found()
    {
        await using ApiHost host = await ApiHost.StartAsync();

        Assert.Equal(HttpStatusCode.NotFound, (await host.GetAsync("/api/v1/assessments/0")).Status);
    }

    [Fact]
    public async Task Superseded_revisions_are_reached_from_any_of_them()
    {
        await using ApiHost host = await ApiHost.StartAsync();
        Assessment first = Stability(host, new Estimate(6.1, 0.6));
        Assessment second = first with { Revision = 2, Value = new Estimate(6.3, 0.6), SupersedeReason = "Late readings." };
        host.Rooms.Assessments.Add(second);
        host.Rooms.Assessments.Add(first);

        foreach (string id in (string[])[first.Id, second.Id])
        {
            JsonElement[] revisions = [.. (await host.GetAsync($"/api/v1/assessments/{id}/revisions")).Json.EnumerateArray()];

            Assert.Equal([1, 2], revisions.Select(revision => revision.GetProperty("revision").GetInt32()));
            Assert.Equal("Late readings.", revisions[1].GetProperty("supersedeReason").GetString());
        }

        Assert.Equal(HttpStatusCode.NotFound, (await host.GetAsync("/api/v1/assessments/0/revisions")).Status);
    }

    [Fact]
    public async Task Outcomes_are_the_same_list_without_what_they_were_made_from()
    {
        await using ApiHost host = await ApiHost.StartAsync();
        Assessment made = Stability(host, new Estimate(6.1, 0.6));
        host.Rooms.Assessments.Add(made);

        JsonElement outcome = (await host.GetAsync("/api/v1/assessments/outcomes?source=hollin-vale.rowan&count=2000")).Json.GetProperty("items")[0];

        Assert.Equal(made.Id, outcome.GetProperty("id").GetString());
        Assert.Equal(1.2, outcome.GetProperty("expandedUncertainty").GetDouble(), 1e-12);
        Assert.Equal("conditional-pass", outcome.GetProperty("decision").GetString());
        Assert.False(outcome.TryGetProperty("provenance", out _));
        Assert.Equal(2000, host.Rooms.Assessments.LastQuery!.Count);
        Assert.Equal(["out-of-range"], (await host.GetAsync("/api/v1/assessments/outcomes?count=2001")).FindingCodes);
    }

    private static Assessment Stability(ApiHost host, Estimate value) => new(
        SampleLab.Rowan, "stability", "well-a", new TimeWindow(host.Now - TimeSpan.FromMinutes(30), host.Now), 1, value, "mK", 7, 2,
        Decision.ConditionalPass, 0.9, [], "Half-range 6.1 mK.", new Provenance("00", [], ["cert-rowan-well-a@2"], null, "0.1.0"), host.Now, null);
}
