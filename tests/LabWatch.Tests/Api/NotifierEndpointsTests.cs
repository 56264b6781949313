using System.Net;

namespace LabWatch.Tests.Api;

public sealed class NotifierEndpointsTests
{
    private const string Device = """{"name":" Kim's phone ","endpoint":"https://push.example/p/1","keys":{"p256dh":"BKey","auth":"secret-of-the-browser"}}""";

    [Fact]
    public async Task Notifiers_are_listed_without_addresses_or_secrets_and_can_be_tried()
    {
        await using ApiHost host = await ApiHost.StartAsync();

        Answer list = await host.GetAsync("/api/v1/notifiers");
        Answer tried = await host.SendAsync(HttpMethod.Post, "/api/v1/notifiers/duty/test", "{}");

        Assert.Equal(["log", "mail"], list.Json.GetProperty("items").EnumerateArray().Select(item => item.GetProperty("kind").GetString()));
        Assert.DoesNotContain("duty@", list.Text, StringComparison.Ordinal);
        Assert.False(tried.Json.GetProperty("isTaken").GetBoolean());
        Assert.Equal("No answer within 10 s.", tried.Json.GetProperty("error").GetString());
        Assert.Equal(["duty by kim"], host.Rooms.Notifying.Tested);
        Assert.Equal(HttpStatusCode.NotFound, (await host.SendAsync(HttpMethod.Post, "/api/v1/notifiers/none/test", "{}")).Status);
    }

    [Fact]
    public async Task A_device_belongs_to_who_subscribed_it_and_its_secret_is_never_shown()
    {
        await using ApiHost host = await ApiHost.StartAsync();

        Answer made = await host.SendAsync(HttpMethod.Post, "/api/v1/me/devices", Device);
        Answer list = await host.GetAsync("/api/v1/me/devices");

        Assert.Equal(HttpStatusCode.Created, made.Status);
        Assert.Equal("Kim's phone", made.Json.GetProperty("name").GetString());
        Assert.Equal("push.example", list.Json.GetProperty("items")[0].GetProperty("host").GetString());
        Assert.DoesNotContain("secret-of-the-browser", list.Text + made.Text, StringComparison.Ordinal);
        host.Rooms.Callers.Be("lee");
        Assert.Equal(0, (await host.GetAsync("/api/v1/me/devices")).Json.GetProperty("items").GetArrayLength());
        Assert.Equal(HttpStatusCode.NotFound, (await host.SendAsync(HttpMethod.Delete, "/api/v1/me/devices/d1", null)).Status);
        Assert.Equal(HttpStatusCode.NotFound, (await host.SendAsync(HttpMethod.Post, "/api/v1/me/devices/d1/test", "{}")).Status);
        host.Rooms.Callers.Be("kim");
        Assert.Equal(HttpStatusCode.OK, (await host.SendAsync(HttpMethod.Post, "/api/v1/me/devices/d1/test", "{}")).Status);
        Assert.Equal(HttpStatusCode.NoContent, (await host.SendAsync(HttpMethod.Delete, "/api/v1/me/devices/d1", null)).Status);
    }

    [Theory]
    [InlineData("""{"name":"phone","endpoint":"http://10.0.0.1/","keys":{"p256dh":"x","auth":"y"}}""", "bad-endpoint")]
    [InlineData("""{"name":"","endpoint":"https://push.example/1","keys":null}""", null)]
    public async Task What_is_no_subscription_is_refused(string json, string? code)
    {
        await using ApiHost host = await ApiHost.StartAsync();
        Answer answer = await host.SendAsync(HttpMethod.Post, "/api/v1/me/devices", json);
        Assert.Equal(HttpStatusCode.BadRequest, answer.Status);
        Assert.True(code is null || answer.FindingCodes.Contains(code));
    }

    [Fact]
    public async Task A_link_of_a_message_leads_to_its_alert_until_it_ends()
    {
        await using ApiHost host = await ApiHost.StartAsync();
        Guid alert = Guid.NewGuid();
        host.Rooms.Notifying.Links["good"] = alert;
        Assert.Equal(alert, (await host.GetAsync("/api/v1/alerts/links/good")).Json.GetProperty("alert").GetGuid());
        Assert.Equal(HttpStatusCode.NotFound, (await host.GetAsync("/api/v1/alerts/links/bad")).Status);
    }
}
