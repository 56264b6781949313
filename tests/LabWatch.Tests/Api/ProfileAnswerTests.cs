using System.Net;
using System.Text.Json;
using LabWatch.Lab.Readings;
using LabWatch.Tests.Api.Fakes;

namespace LabWatch.Tests.Api;

public sealed class ProfileAnswerTests
{
    // IEC 60751:2022: R(0 degC) = 100 ohm exactly; about 0.385 ohm a kelvin around it.
    [Fact]
    public async Task The_newest_readings_give_wells_curve_and_radiance_in_each_band()
    {
        await using ApiHost host = await ApiHost.StartAsync();
        Add(host, host.Now);

        JsonElement profile = (await host.GetAsync("/api/v1/sources/hollin-vale.fir/profile")).Json;

        Assert.Equal("hollin-vale.fir", profile.GetProperty("source").GetString());
        Assert.Equal(0, profile.GetProperty("reference").GetProperty("celsius").GetDouble(), 1e-6);
        Assert.Equal(0.02, profile.GetProperty("reference").GetProperty("expandedUncertaintyKelvin").GetDouble(), 1e-9);
        Assert.Equal(0, profile.GetProperty("setPointCelsius").GetDouble());
        JsonElement[] points = [.. profile.GetProperty("points").EnumerateArray()];
        Assert.Equal(["well", "well", "well", "case", "lip"], points.Select(point => point.GetProperty("kind").GetString()));
        Assert.True(points[0].GetProperty("isReference").GetBoolean());
        Assert.False(points[0].GetProperty("isSilent").GetBoolean());
        Assert.True(points[3].GetProperty("isSilent").GetBoolean());
        JsonElement[] curve = [.. profile.GetProperty("curve").EnumerateArray()];
        Assert.Equal((0, 230), (curve[0].GetProperty("positionMillimetre").GetDouble(), curve[^1].GetProperty("positionMillimetre").GetDouble()));
        Assert.Equal(12, curve[0].GetProperty("celsius").GetDouble(), 1e-9);
        JsonElement band = Assert.Single(profile.GetProperty("bands").EnumerateArray());
        Assert.Equal("monte-carlo", band.GetProperty("method").GetString());
        Assert.InRange(band.GetProperty("effectiveEmissivity").GetProperty("value").GetDouble(), 0.998, 1.001);
        Assert.Equal(2, band.GetProperty("effectiveEmissivity").GetProperty("coverageFactor").GetDouble(), 1e-9);
        Assert.True(band.GetProperty("offsetMillikelvin").GetProperty("value").GetDouble() > 0);
        Assert.Equal(22, band.GetProperty("surroundingsCelsius").GetDouble(), 1e-9);
        Assert.Equal(0, band.GetProperty("comparators").GetArrayLength());
        Assert.Equal(JsonValueKind.Null, band.GetProperty("baseline").ValueKind);
        Assert.Contains(profile.GetProperty("notes").EnumerateArray(), note => note.GetString()!.Contains("No certificate is in force for lip", StringComparison.Ordinal));
    }

    [Fact]
    public async Task The_profile_of_an_earlier_instant_comes_from_the_store()
    {
        await using ApiHost host = await ApiHost.StartAsync();
        Add(host, host.Now);
        string at = host.Now.ToString();
        host.Clock.Advance(TimeSpan.FromHours(5));

        JsonElement then = (await host.GetAsync("/api/v1/sources/hollin-vale.fir/profile?at=" + at)).Json, now = (await host.GetAsync("/api/v1/sources/hollin-vale.fir/profile")).Json;

        Assert.Equal(0, then.GetProperty("reference").GetProperty("celsius").GetDouble(), 1e-6);
        Assert.Equal(JsonValueKind.Null, now.GetProperty("reference").ValueKind);
        Assert.Empty(now.GetProperty("bands").EnumerateArray());
        Assert.Contains(now.GetProperty("notes").EnumerateArray(), note => note.GetString()!.StartsWith("Well-a gave 0 of", StringComparison.Ordinal));
    }

    [Fact]
    public async Task A_band_without_optics_is_a_note_and_no_failure()
    {
        await using ApiHost host = await ApiHost.StartAsync();
        host.Rooms.Store.Add(SampleLab.Rowan, new Reading("well-a", host.Now, 138.51));

        JsonElement profile = (await host.GetAsync("/api/v1/sources/hollin-vale.rowan/profile")).Json;

        Assert.Empty(profile.GetProperty("bands").EnumerateArray());
        Assert.Contains(profile.GetProperty("notes").EnumerateArray(), note => note.GetString() == "No coating emissivity is stated for the band lwir.");
    }

    [Fact]
    public async Task Mistakes_are_told()
    {
        await using ApiHost host = await ApiHost.StartAsync();
        Assert.Equal(HttpStatusCode.NotFound, (await host.GetAsync("/api/v1/sources/hollin-vale.nope/profile")).Status);
        Answer answer = await host.GetAsync("/api/v1/sources/hollin-vale.fir/profile?at=noon&depth=3");
        Assert.Equal(HttpStatusCode.BadRequest, answer.Status);
        Assert.Equal(["unknown-parameter", "not-a-time"], answer.Json.GetProperty("findings").EnumerateArray().Select(finding => finding.GetProperty("code").GetString()));
    }

    private static void Add(ApiHost host, LabWatch.Lab.Time.Instant at)
    {
        foreach ((string channel, double value) in new[] { ("well-a", 100), ("well-b", 100.02), ("well-c", 100.1), ("set-point", 0), ("lip", 12), ("ambient", 22.0) })
        {
            host.Rooms.Store.Add(SampleLab.Fir, new Reading(channel, at, value));
        }
    }
}
