using System.Net;
using System.Text.Json;
using LabWatch.Lab.Readings;
using LabWatch.Service.Api.Live;
using LabWatch.Tests.Api.Fakes;
using Microsoft.Extensions.DependencyInjection;

namespace LabWatch.Tests.Api;

public sealed class SourceEndpointsTests
{
    [Fact]
    public async Task Sources_are_listed_with_words_for_kind_route_and_shape()
    {
        await using ApiHost host = await ApiHost.StartAsync();

        Answer answer = await host.GetAsync("/api/v1/sources");

        JsonElement fir = answer.Json.GetProperty("sources")[0];
        Assert.Equal("hollin-vale.fir", fir.GetProperty("id").GetString());
        Assert.Equal("stirred-bath", fir.GetProperty("kind").GetString());
        Assert.Equal("contact", fir.GetProperty("route").GetString());
        Assert.Equal("cylinder-inward-cone", fir.GetProperty("cavity").GetProperty("shape").GetString());
        Assert.Equal("Europe/Dublin", answer.Json.GetProperty("site").GetProperty("timeZone").GetString());
    }

    [Fact]
    public async Task A_cavity_is_told_with_the_optics_of_its_wall_in_each_band()
    {
        await using ApiHost host = await ApiHost.StartAsync();

        JsonElement source = (await host.GetAsync("/api/v1/sources/hollin-vale.fir")).Json.GetProperty("source");
        JsonElement coating = source.GetProperty("cavity").GetProperty("coating")[0];

        Assert.Equal("lwir", coating.GetProperty("band").GetString());
        Assert.InRange(coating.GetProperty("emissivity").GetDouble(), 0.5, 1);
        Assert.True(coating.GetProperty("emissivityStandardUncertainty").GetDouble() > 0);
        Assert.InRange(coating.GetProperty("diffuseFraction").GetDouble(), 0, 1);
        Assert.Equal(JsonValueKind.Null, coating.GetProperty("secondEmissivity").ValueKind);
        Assert.Equal("none", source.GetProperty("cavity").GetProperty("secondMaterial").GetString());
    }

    [Fact]
    public async Task Where_no_view_is_stated_the_usual_one_is_told_and_said_to_be_it()
    {
        await using ApiHost host = await ApiHost.StartAsync();

        JsonElement view = (await host.GetAsync("/api/v1/sources/hollin-vale.fir")).Json.GetProperty("source").GetProperty("view");

        Assert.Equal("cone", view.GetProperty("kind").GetString());
        Assert.Equal(12.5, view.GetProperty("spotRadiusMillimetre").GetDouble());
        Assert.Equal(700, view.GetProperty("distanceMillimetre").GetDouble());
        Assert.False(view.GetProperty("isStated").GetBoolean());
    }

    [Fact]
    public async Task Without_readings_a_source_is_unknown_and_says_why()
    {
        await using ApiHost host = await ApiHost.StartAsync();

        JsonElement status = (await host.GetAsync("/api/v1/sources")).Json.GetProperty("sources")[0].GetProperty("status");

        Assert.Equal("unknown", status.GetProperty("readiness").GetProperty("state").GetString());
        Assert.Equal("no-data", status.GetProperty("readiness").GetProperty("reasons")[0].GetProperty("code").GetString());
        Assert.True(status.GetProperty("isSilent").GetBoolean());
        Assert.Equal(JsonValueKind.Null, status.GetProperty("temperature").ValueKind);
    }

    // IEC 60751:2022, table of a Pt100: 60.26 ohm at -100 degC, 138.51 ohm at 100 degC, 280.98 ohm at 500 degC (rounded to 0.01 ohm,
    // about 0.03 K); values from memory.
    [Theory]
    [InlineData(138.51, 100)]
    [InlineData(280.98, 500)]
    [InlineData(60.26, -100)]
    public async Task The_temperature_comes_through_the_certificate_in_force(double ohm, double celsius)
    {
        await using ApiHost host = await ApiHost.StartAsync();
        host.Rooms.Store.Add(SampleLab.Rowan, new Reading("well-a", host.Now, ohm));

        JsonElement temperature = (await host.GetAsync("/api/v1/sources/hollin-vale.rowan")).Json
            .GetProperty("source").GetProperty("status").GetProperty("temperature");

        Assert.Equal(celsius, temperature.GetProperty("celsius").GetDouble(), 0.04);
        Assert.Equal("cert-rowan-well-a@2", temperature.GetProperty("certificate").GetString());
        Assert.Equal(celsius > -40, temperature.GetProperty("insideCertificateRange").GetBoolean());
    }

    [Fact]
    public async Task A_channel_is_silent_once_three_intervals_and_ten_seconds_have_passed()
    {
        await using ApiHost host = await ApiHost.StartAsync();
        host.Rooms.Store.Add(SampleLab.Fir, new Reading("well-a", host.Now, 100));

        Assert.False((await StatusAsync(host)).GetProperty("isSilent").GetBoolean());
        host.Clock.Advance(TimeSpan.FromSeconds(11));
        Assert.True((await StatusAsync(host)).GetProperty("isSilent").GetBoolean());
    }

    [Fact]
    public async Task A_reading_is_shown_as_soon_as_the_intake_has_seen_it()
    {
        await using ApiHost host = await ApiHost.StartAsync();
        LiveReadings live = host.Services.GetRequiredService<LiveReadings>();

        live.OnPack(new ReadingPack(SampleLab.Fir, host.Now, [new Reading("set-point", host.Now, -10)]));
        live.OnPack(new ReadingPack(SampleLab.Fir, host.Now, [new Reading("set-point", host.Now - TimeSpan.FromDays(1), 50)]));

        Assert.Equal(-10, (await StatusAsync(host)).GetProperty("setPointCelsius").GetDouble());
    }

    [Fact]
    public async Task A_store_that_does_not_answer_leaves_what_is_known_on_show()
    {
        await using ApiHost host = await ApiHost.StartAsync();
        host.Rooms.Store.Add(SampleLab.Fir, new Reading("set-point", host.Now, -10));
        await host.GetAsync("/api/v1/sources");
        host.Rooms.Store.IsDown = true;
        host.Clock.Advance(TimeSpan.FromMinutes(1));

        JsonElement status = await StatusAsync(host);

        Assert.Equal(-10, status.GetProperty("setPointCelsius").GetDouble());
        Assert.True(status.GetProperty("isSilent").GetBoolean());
    }

    // ISO 13732-1:2006 by way of BurnThreshold (its values are from memory): 48 degC where material and contact are not known.
    [Theory]
    [InlineData("lip", null)]
    [InlineData("case", 48.0)]
    [InlineData("ambient", null)]
    public async Task A_surface_tells_the_temperature_that_raises_its_alert(string channel, double? limit)
    {
        await using ApiHost host = await ApiHost.StartAsync();

        JsonElement channels = (await host.GetAsync("/api/v1/sources/hollin-vale.fir")).Json.GetProperty("source").GetProperty("channels");

        JsonElement found = channels.EnumerateArray().Single(candidate => candidate.GetProperty("id").GetString() == channel).GetProperty("hotLimitCelsius");
        Assert.Equal(limit, found.ValueKind == JsonValueKind.Null ? null : found.GetDouble());
    }

    [Fact]
    public async Task A_source_is_told_with_its_instruments_and_limits()
    {
        await using ApiHost host = await ApiHost.StartAsync();

        Answer answer = await host.GetAsync("/api/v1/sources/hollin-vale.fir");

        Assert.Equal("HV-fir-well-a", answer.Json.GetProperty("instruments")[0].GetProperty("serialNumber").GetString());
        Assert.Equal("fir-stability@1", answer.Json.GetProperty("limits")[0].GetProperty("id").GetString());
    }

    [Theory]
    [InlineData("hollin-vale.nope")]
    [InlineData("NOT A KEY")]
    [InlineData("..%2f..%2fetc")]
    public async Task An_unknown_source_is_not_found(string id)
    {
        await using ApiHost host = await ApiHost.StartAsync();

        Answer answer = await host.GetAsync("/api/v1/sources/" + id);

        Assert.Equal(HttpStatusCode.NotFound, answer.Status);
        Assert.Equal("application/problem+json", answer.MediaType);
        Assert.Equal(["not-found"], answer.FindingCodes);
    }

    private static async Task<JsonElement> StatusAsync(ApiHost host) =>
        (await host.GetAsync("/api/v1/sources/hollin-vale.fir")).Json.GetProperty("source").GetProperty("status");
}
