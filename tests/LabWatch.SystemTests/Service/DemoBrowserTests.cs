using System.Net.Http.Json;
using System.Text.Json;
using Microsoft.Playwright;

namespace LabWatch.SystemTests.Service;

/// <summary>A person opens the demo in a browser, sees a fault come up as a hazard, and acknowledges it.</summary>
public sealed class DemoBrowserTests
{
    [Theory]
    [InlineData(1280, 900)]
    [InlineData(390, 844)]
    public async Task A_person_sees_an_injected_fault_as_a_hot_surface_and_acknowledges_it(int width, int height)
    {
        Browser.SkipWhereMissing();
        CancellationToken token = TestContext.Current.CancellationToken;
        using TemporaryDirectory data = new();
        await using LabWatchProcess service = LabWatchProcess.Start(
            ["demo", "--data", data.At("demo"), "--days", "0", "--speed", "10", "--mqtt-port", $"{LabWatchProcess.FreePort()}"]);
        await service.WaitUntilReadyAsync(token);
        await service.SignInAsync("technician", token);
        await using Browser browser = await Browser.StartAsync();
        IPage page = await browser.OpenAsync(new Uri(service.Address, $"sign-in#name=technician&code={service.DemoCodes()["technician"]}"), width, height);
        await Assertions.Expect(page.GetByText("Rowan").First).ToBeVisibleAsync(Browser.Patient);
        // A temperature is shown once the simulated laboratory runs; before that it takes no fault.
        await Assertions.Expect(page.Locator("#panel-rowan .measured .number")).ToBeVisibleAsync(new() { Timeout = 120_000 });

        await Poll.UntilAsync(
            "the fault is injected",
            async () =>
            {
                using HttpResponseMessage injected = await service.Client.PostAsJsonAsync("api/v1/demo/faults", new { kind = "insulation-damage", source = "hollin-vale.rowan", size = 20 }, token);
                return injected.IsSuccessStatusCode;
            },
            TimeSpan.FromSeconds(30), token, () => service.Output);
        ILocator hazard = page.Locator("#hazards li").Filter(new() { HasText = "Outer case" }).Filter(new() { HasText = "surface sensor reads" });
        await Assertions.Expect(hazard).ToBeVisibleAsync(new() { Timeout = 180_000 });
        Assert.DoesNotContain("safe to touch", await page.ContentAsync(), StringComparison.OrdinalIgnoreCase);
        Assert.Contains("no protective device", await page.Locator("#hazards .caution").InnerTextAsync(), StringComparison.OrdinalIgnoreCase);

        await hazard.GetByRole(AriaRole.Button, new() { Name = "Acknowledge" }).ClickAsync();
        await page.GetByLabel("Note", new() { Exact = false }).FillAsync("barrier set up");
        await page.GetByRole(AriaRole.Dialog).GetByRole(AriaRole.Button, new() { Name = "Acknowledge" }).ClickAsync();
        await Assertions.Expect(hazard.GetByText("Acknowledged by technician")).ToBeVisibleAsync(Browser.Patient);

        JsonElement alerts = await service.Client.GetFromJsonAsync<JsonElement>("api/v1/alerts?open=true", token);
        Assert.Contains(alerts.GetProperty("items").EnumerateArray(), alert => alert.GetProperty("code").GetString() == "hot-surface" && alert.GetProperty("acknowledgedBy").GetString() == "technician");
        Assert.Equal(width, await page.EvaluateAsync<int>("document.documentElement.scrollWidth"));
    }
}
