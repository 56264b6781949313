using System.Net.Http.Json;

namespace LabWatch.SystemTests.Service;

/// <summary>TLS by one setting, over a real connection.</summary>
public sealed class TlsTests
{
    [Fact]
    public async Task One_setting_serves_pages_over_tls_with_a_certificate_that_is_printed_and_cookies_that_stay_on_it()
    {
        CancellationToken token = TestContext.Current.CancellationToken;
        using TemporaryDirectory directory = new();
        string lab = directory.At("lab.json");
        await File.WriteAllTextAsync(lab, LabWatch.Tests.Lab.LabFileSample.Text, token);
        Dictionary<string, string> settings = new()
        {
            ["LABWATCH__Web__Certificate"] = "own",
            ["LABWATCH__Intake__EmbeddedBroker__Port"] = $"{LabWatchProcess.FreePort()}",
        };
        await using LabWatchProcess service = LabWatchProcess.Start(["serve", "--lab", lab, "--data", directory.At("data")], settings, scheme: "https");
        await service.WaitUntilReadyAsync(token);

        string code = (await File.ReadAllTextAsync(directory.At("data", "set-up-code"), token)).Trim();
        using HttpResponseMessage answer = await service.Client.PostAsJsonAsync(
            "api/v1/set-up", new { code, name = "ada-ash", displayName = "Ada Ash", password = "seven quiet herons wade at dusk" }, token);

        answer.EnsureSuccessStatusCode();
        string cookie = Assert.Single(answer.Headers.GetValues("Set-Cookie"));
        Assert.StartsWith("__Host-", cookie, StringComparison.Ordinal);
        Assert.Contains("secure", cookie, StringComparison.OrdinalIgnoreCase);
        Assert.Contains("httponly", cookie, StringComparison.OrdinalIgnoreCase);
        Assert.Contains("samesite=strict", cookie, StringComparison.OrdinalIgnoreCase);
        Assert.Equal(0, await service.StopAsync(token));
    }
}
