using System.Net;
using LabWatch.Intake.Diagnostics;
using LabWatch.Lab.Identity;
using LabWatch.Records.Accounts;
using LabWatch.Service.Api.Access;
using LabWatch.Tests.Api.Fakes;
using Microsoft.Extensions.DependencyInjection;

namespace LabWatch.Tests.Api;

/// <summary>Accounts of devices, and their clocks.</summary>
public class DeviceEndpointsTests
{
    private const string Path = "/api/v1/devices";

    [Fact]
    public async Task An_account_is_made_listed_and_taken_back_and_the_trail_tells()
    {
        await using ApiHost host = await StartAsync();
        Answer made = await host.SendAsync(HttpMethod.Post, Path, """{ "name": "fir-logger", "source": "hollin-vale.fir" }""");
        Assert.Equal(HttpStatusCode.Created, made.Status);
        Assert.Equal(43, made.Json.GetProperty("password").GetString()!.Length);
        Assert.Equal(HttpStatusCode.Conflict, (await host.SendAsync(HttpMethod.Post, Path, """{ "name": "fir-logger", "source": "hollin-vale.fir" }""")).Status);
        Answer list = await host.GetAsync(Path);
        Assert.DoesNotContain("password", list.Text, StringComparison.OrdinalIgnoreCase);
        Assert.Equal("fir-logger", Assert.Single(list.Json.GetProperty("items").EnumerateArray()).GetProperty("name").GetString());
        Assert.Equal(HttpStatusCode.NoContent, (await host.SendAsync(HttpMethod.Delete, Path + "/fir-logger", null)).Status);
        Assert.Equal(HttpStatusCode.NotFound, (await host.SendAsync(HttpMethod.Delete, Path + "/fir-logger", null)).Status);
        Assert.Equal(["device-account-created", "device-account-revoked"], host.Rooms.Trail.Entries.Select(entry => entry.Action).Where(action => action.StartsWith("device", StringComparison.Ordinal)));
    }

    [Theory]
    [InlineData("""{ "name": "Fir Logger", "source": "hollin-vale.fir" }""", "not-a-slug")]
    [InlineData("""{ "name": "fir-logger", "source": "hollin-vale.ash" }""", "unknown-source")]
    [InlineData("""{ "name": "fir-logger", "source": null }""", "unknown-source")]
    public async Task A_bad_account_is_refused_with_findings(string body, string code)
    {
        await using ApiHost host = await StartAsync();
        Answer answer = await host.SendAsync(HttpMethod.Post, Path, body);
        Assert.Equal(HttpStatusCode.BadRequest, answer.Status);
        Assert.Equal([code], answer.FindingCodes);
    }

    [Fact]
    public async Task Clocks_are_listed_with_offset_and_uncertainty()
    {
        await using ApiHost host = await StartAsync();
        host.Rooms.Intake.DeviceClocks[new SourceKey("hollin-vale", "fir")] = new DeviceClock(DeviceClockState.LeaptAhead, -0.25, 0.01, -0.1, 64, 301, host.Now);
        host.Rooms.Intake.DeviceClocks[new SourceKey("hollin-vale", "ash")] = new DeviceClock(DeviceClockState.Learning, double.NaN, double.NaN, double.NaN, 0, 0, default);
        System.Text.Json.JsonElement[] clocks = [.. (await host.GetAsync("/api/v1/clocks")).Json.GetProperty("items").EnumerateArray()];
        Assert.Equal(["hollin-vale.ash", "hollin-vale.fir"], clocks.Select(clock => clock.GetProperty("source").GetString()));
        Assert.Equal("leapt-ahead", clocks[1].GetProperty("state").GetString());
        Assert.Equal(301, clocks[1].GetProperty("leapSeconds").GetDouble());
        Assert.Equal(System.Text.Json.JsonValueKind.Null, clocks[0].GetProperty("offsetSeconds").ValueKind);
    }

    private static Task<ApiHost> StartAsync() =>
        ApiHost.StartAsync(change: services => services.AddSingleton<ICallers>(new FixedCaller("ann", Role.Administrator)));
}
