using Microsoft.Playwright;

namespace LabWatch.SystemTests.Service;

/// <summary>A new service is set up in a browser: the code makes the first administrator, who adds the others.</summary>
public sealed class FirstStartBrowserTests
{
    private const string OwnPassword = "seven quiet herons wade at dusk";
    private const string ThornsPassword = "copper lanterns over the weir";

    [Theory]
    [InlineData(1280, 900)]
    [InlineData(390, 844)]
    public async Task The_printed_code_makes_the_first_administrator_who_adds_the_others(int width, int height)
    {
        Browser.SkipWhereMissing();
        CancellationToken token = TestContext.Current.CancellationToken;
        await using ServiceFixture fixture = new();
        await fixture.StartAsync(token, setsUp: false);
        string code = (await File.ReadAllTextAsync(Path.Combine(fixture.Data, "set-up-code"), token)).Trim();
        await Poll.UntilAsync(
            "the code is printed", () => Task.FromResult(fixture.Service.Output.Contains(code, StringComparison.Ordinal)), TimeSpan.FromSeconds(120), token);
        await using Browser browser = await Browser.StartAsync();
        Person administrator = new(await browser.OpenAsync(new Uri(fixture.Service.Address, "trail"), width, height), width);

        await administrator.SeeAsync(administrator.Heading("Set up: the first administrator"));
        await SetUpAsync(administrator, "wrong-code", "short");
        await administrator.SeeAsync(administrator.Page.GetByRole(AriaRole.Alert).GetByText("code", new() { Exact = false }));
        await SetUpAsync(administrator, code, OwnPassword);
        await administrator.SeeAsync(administrator.Heading("People"));
        Assert.False(File.Exists(Path.Combine(fixture.Data, "set-up-code")), "The code of the set-up is still there.");

        string given = await AddAsync(administrator, "Tess Thorn", "Technician");
        await AddAsync(administrator, "Uli Elm", "Auditor");
        await administrator.SeeAsync(administrator.Page.Locator(".row").Filter(new() { HasText = "uli-elm" }));
        await administrator.SignOutAsync();

        Person technician = new(await browser.OpenAsync(new Uri(fixture.Service.Address, $"sign-in#name=tess-thorn&code={given}"), width, height), width);
        await technician.SeeAsync(technician.Heading("Choose your password"));
        Assert.DoesNotContain(given, technician.Page.Url, StringComparison.Ordinal);
        await technician.Page.GetByLabel("New password", new() { Exact = true }).FillAsync(ThornsPassword);
        await technician.Button("Change the password").ClickAsync();
        await technician.SeeAsync(technician.Page.Locator("#hazards"));
        await technician.SignOutAsync();
        await technician.SignInAsync("tess-thorn", ThornsPassword);
        await Assertions.Expect(technician.Page.GetByRole(AriaRole.Link, new() { Name = "People" })).ToHaveCountAsync(0);
    }

    private static async Task SetUpAsync(Person administrator, string code, string password)
    {
        await administrator.Page.GetByLabel("Set-up code", new() { Exact = false }).FillAsync(code);
        await administrator.Page.GetByLabel("Your name", new() { Exact = false }).FillAsync("Ada Ash");
        await Assertions.Expect(administrator.Page.GetByLabel("Name to sign in with", new() { Exact = false })).ToHaveValueAsync("ada-ash");
        await administrator.Page.GetByLabel("Password", new() { Exact = true }).FillAsync(password);
        await administrator.Button("Make me the first administrator").ClickAsync();
    }

    /// <summary>Adds a person and gives the one-time password that is shown.</summary>
    private static async Task<string> AddAsync(Person administrator, string name, string role)
    {
        await administrator.Button("Add a person").ClickAsync();
        ILocator dialog = administrator.Page.GetByRole(AriaRole.Dialog);
        await dialog.GetByLabel("Name", new() { Exact = false }).First.FillAsync(name);
        await dialog.GetByLabel(role, new() { Exact = false }).CheckAsync();
        await dialog.GetByRole(AriaRole.Button, new() { Name = "Add", Exact = true }).ClickAsync();
        await administrator.SeeAsync(dialog.GetByText("shown this once"));
        string password = await dialog.Locator(".copy.block code").First.InnerTextAsync();
        await administrator.Button("Handed over").ClickAsync();
        return password;
    }
}
