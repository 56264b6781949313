using System.Text.Json;
using Microsoft.Playwright;

namespace LabWatch.SystemTests.Service;

/// <summary>
/// The demo in a browser, as its people use it: the technician starts a run, sees a fault come up as a hazard, acknowledges it and ends the
/// run; the auditor finds all of it in the trail and can change nothing.
/// </summary>
public sealed class DemoBrowserTests
{
    private const string Rowan = "hollin-vale.rowan";

    [Theory]
    [InlineData(1280, 900)]
    [InlineData(390, 844)]
    public async Task What_the_technician_does_is_on_record_and_the_auditor_sees_it_and_changes_nothing(int width, int height)
    {
        Browser.SkipWhereMissing();
        CancellationToken token = TestContext.Current.CancellationToken;
        using TemporaryDirectory data = new();
        await using LabWatchProcess service = LabWatchProcess.Start(
            ["demo", "--data", data.At("demo"), "--days", "0", "--speed", "10", "--mqtt-port", $"{LabWatchProcess.FreePort()}"]);
        await service.WaitUntilReadyAsync(token);
        await using Browser browser = await Browser.StartAsync();

        Person technician = new(await browser.OpenAsync(new Uri(service.Address, $"sources/{Rowan}"), width, height), width);
        await technician.SignInAsync("technician", service.DemoCodes()["technician"]);
        Assert.EndsWith($"/sources/{Rowan}", technician.Page.Url, StringComparison.Ordinal);
        await StartRunAsync(technician);
        ILocator hazard = await BreakInsulationAsync(technician);
        await AcknowledgeAsync(technician, hazard);
        await EndRunAsync(technician);
        await technician.SignOutAsync();

        Person auditor = new(await browser.OpenAsync(service.Address, width, height), width);
        await auditor.SignInAsync("auditor", service.DemoCodes()["auditor"]);
        await SeesItAllAsync(auditor);
        await ChangesNothingAsync(auditor);
    }

    private static async Task StartRunAsync(Person technician)
    {
        ILocator dialog = technician.Page.GetByRole(AriaRole.Dialog);
        await technician.SeeAsync(technician.Button("Start a run"));
        await technician.Button("Start a run").ClickAsync();
        await dialog.GetByLabel("Job number").FillAsync("J-104");
        await dialog.GetByLabel("Item", new() { Exact = false }).FillAsync("Radiation thermometer, 8 um to 14 um");
        await dialog.GetByLabel("Set point", new() { Exact = false }).FillAsync("300");
        await dialog.GetByLabel("Why it is used", new() { Exact = false }).FillAsync("trial of the set-up");
        await dialog.Locator("button.act").ClickAsync();
        await technician.SeeAsync(technician.Page.Locator("#open-run").GetByText("Job J-104"));
    }

    private static async Task EndRunAsync(Person technician)
    {
        ILocator dialog = technician.Page.GetByRole(AriaRole.Dialog);
        await technician.OpenAsync($"/sources/{Rowan}", technician.Button("End the run"));
        await technician.Button("End the run").ClickAsync();
        await dialog.GetByRole(AriaRole.Button, new() { Name = "End the run" }).ClickAsync();
        await technician.SeeAsync(technician.Button("Start a run"));
    }

    /// <summary>A temperature is shown once the simulated laboratory runs; before that it takes no fault.</summary>
    private static async Task<ILocator> BreakInsulationAsync(Person technician)
    {
        await technician.GoToAsync("Sources", "All sources");
        await technician.SeeAsync(technician.Page.Locator("#panel-rowan .measured .number"), seconds: 120);
        ILocator faults = technician.Page.Locator("#faults");
        await faults.GetByLabel("Source").SelectOptionAsync(Rowan);
        await faults.GetByLabel("Fault").SelectOptionAsync("insulation-damage");
        await faults.GetByLabel("Size", new() { Exact = false }).FillAsync("20");
        await faults.GetByRole(AriaRole.Button, new() { Name = "Inject" }).ClickAsync();
        await technician.SeeAsync(faults.Locator("li").Filter(new() { HasText = "Insulation damage" }));
        ILocator hazard = technician.Page.Locator("#hazards li").Filter(new() { HasText = "Outer case" }).Filter(new() { HasText = "surface sensor reads" });
        await technician.SeeAsync(hazard, seconds: 180);
        Assert.DoesNotContain("safe to touch", await technician.Page.ContentAsync(), StringComparison.OrdinalIgnoreCase);
        Assert.Contains("no protective device", await technician.Page.Locator("#hazards .caution").InnerTextAsync(), StringComparison.OrdinalIgnoreCase);
        return hazard;
    }

    private static async Task AcknowledgeAsync(Person technician, ILocator hazard)
    {
        await hazard.GetByRole(AriaRole.Button, new() { Name = "Acknowledge" }).ClickAsync();
        ILocator dialog = technician.Page.GetByRole(AriaRole.Dialog);
        await technician.SeeAsync(dialog.GetByText("Wren Tolliver"));
        await dialog.GetByLabel("Note", new() { Exact = false }).FillAsync("barrier set up");
        await dialog.GetByRole(AriaRole.Button, new() { Name = "Acknowledge" }).ClickAsync();
        await technician.SeeAsync(hazard.GetByText("Acknowledged by technician"));
    }

    private static async Task SeesItAllAsync(Person auditor)
    {
        await auditor.SeeAsync(auditor.Page.Locator("#hazards"));
        await Assertions.Expect(auditor.Page.GetByRole(AriaRole.Button, new() { Name = "Acknowledge" })).ToHaveCountAsync(0);
        await Assertions.Expect(auditor.Page.Locator("#faults")).ToHaveCountAsync(0);
        await auditor.GoToAsync("Trail", "Trail");
        ILocator entries = auditor.Page.Locator(".entry");
        await auditor.OpenAsync("/trail?actor=technician", entries);
        foreach (string action in (string[])["Signed in", "Run started", "Alert acknowledged", "Run ended", "Signed out"])
        {
            await auditor.SeeAsync(entries.Filter(new() { HasText = action }));
        }

        await entries.Filter(new() { HasText = "Alert acknowledged" }).First.Locator("summary").ClickAsync();
        await auditor.SeeAsync(auditor.Page.Locator(".content").GetByText("raised-acknowledged"));
        await Assertions.Expect(auditor.Page.GetByText("labwatch verify --data DIR")).ToBeAttachedAsync();
    }

    private static async Task ChangesNothingAsync(Person auditor)
    {
        await auditor.OpenAsync($"/sources/{Rowan}", auditor.Page.Locator("#page-title"));
        await Assertions.Expect(auditor.Page.GetByRole(AriaRole.Button, new() { Name = "Start a run" })).ToHaveCountAsync(0);
        JsonElement alerts = await auditor.ReadAsync("/api/v1/alerts");
        string alert = alerts.GetProperty("items").EnumerateArray().First().GetProperty("id").GetString()!;
        Assert.Equal("403 not-permitted", await auditor.AnswerToAsync($"/api/v1/alerts/{alert}/acknowledge", new { note = "seen" }));
        Assert.Equal("403 not-permitted", await auditor.AnswerToAsync("/api/v1/runs", new { source = Rowan, jobNumber = "J-2", item = "thermometer", setPointCelsius = 300 }));
        Assert.Equal("403 not-permitted", await auditor.AnswerToAsync("/api/v1/limits", new { reason = "wider" }));
        Assert.Equal("403 not-permitted", await auditor.AnswerToAsync("/api/v1/demo/faults", new { kind = "insulation-damage", source = Rowan, size = 20 }));
        Assert.Equal("403 not-permitted", await auditor.AnswerToAsync("/api/v1/accounts", new { name = "another", displayName = "Another", roles = new[] { "administrator" } }));
    }
}
