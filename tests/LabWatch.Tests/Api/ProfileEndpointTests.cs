using System.Net;
using System.Text.Json;
using LabWatch.Lab.Readings;
using LabWatch.Tests.Api.Fakes;

namespace LabWatch.Tests.Api;

public sealed class ProfileEndpointTests
{
    // 114.38 ohm is 37 degC (Callendar-Van Dusen with the coefficients of IEC 60751:2022, clause 5).
    private const double OhmAt37 = 114.38;

    // Diffuse sphere: e_eff = e / (e + (1 - e) f) with f the part of the sphere's surface that the aperture takes (integrating sphere, Gouffe 1945).
    [Fact]
    public async Task A_band_is_told_with_uncertainty_and_coverage_factor_with_and_without_the_profile()
    {
        await using ApiHost host = await ApiHost.StartAsync();
        host.Rooms.Store.Add(SampleLab.Hazel, new Reading("well-a", host.Now, OhmAt37));
        host.Rooms.Store.Add(SampleLab.Hazel, new Reading("well-b", host.Now, OhmAt37));

        JsonElement band = (await host.GetAsync("/api/v1/sources/hollin-vale.hazel/profile")).Json.GetProperty("bands")[0];

        double part = (1 - Math.Sqrt(1 - (10.0 / 30 * (10.0 / 30)))) / 2;
        Assert.Equal(0.95 / (0.95 + (0.05 * part)), band.GetProperty("isothermalEffectiveEmissivity").GetProperty("value").GetDouble(), 2e-5);
        foreach (string name in (string[])["effectiveEmissivity", "isothermalEffectiveEmissivity", "radianceTemperature", "offsetMillikelvin"])
        {
            Assert.True(band.GetProperty(name).GetProperty("expandedUncertainty").GetDouble() > 0, name);
            Assert.InRange(band.GetProperty(name).GetProperty("coverageFactor").GetDouble(), 1.9, 14);
        }
    }

    [Fact]
    public async Task The_uncertainty_of_the_radiance_temperature_holds_that_of_the_reference()
    {
        await using ApiHost host = await ApiHost.StartAsync();
        host.Rooms.Store.Add(SampleLab.Hazel, new Reading("well-a", host.Now, OhmAt37));
        host.Rooms.Store.Add(SampleLab.Hazel, new Reading("well-b", host.Now, OhmAt37));

        JsonElement profile = (await host.GetAsync("/api/v1/sources/hollin-vale.hazel/profile")).Json;

        double reference = profile.GetProperty("reference").GetProperty("expandedUncertaintyKelvin").GetDouble();
        Assert.True(profile.GetProperty("bands")[0].GetProperty("radianceTemperature").GetProperty("expandedUncertainty").GetDouble() >= reference * 0.99);
    }

    [Fact]
    public async Task A_well_is_told_with_the_coverage_factor_of_its_uncertainty()
    {
        await using ApiHost host = await ApiHost.StartAsync();
        host.Rooms.Store.Add(SampleLab.Hazel, new Reading("well-a", host.Now, OhmAt37));

        JsonElement[] points = [.. (await host.GetAsync("/api/v1/sources/hollin-vale.hazel/profile")).Json.GetProperty("points").EnumerateArray()];

        JsonElement well = points.Single(point => point.GetProperty("channel").GetString() == "well-a");
        Assert.Equal(37, well.GetProperty("celsius").GetDouble(), 0.04);
        Assert.Equal(2, well.GetProperty("coverageFactor").GetDouble());
        Assert.All(points.Where(point => point.GetProperty("kind").GetString() != "well"), point => Assert.Equal(JsonValueKind.Null, point.GetProperty("coverageFactor").ValueKind));
    }

    [Fact]
    public async Task A_source_that_there_is_not_is_not_found()
    {
        await using ApiHost host = await ApiHost.StartAsync();

        Assert.Equal(HttpStatusCode.NotFound, (await host.GetAsync("/api/v1/sources/hollin-vale.oak/profile")).Status);
    }
}
