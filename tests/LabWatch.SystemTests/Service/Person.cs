using System.Text.Json;
using Microsoft.Playwright;

namespace LabWatch.SystemTests.Service;

/// <summary>Somebody at a browser, and what everybody does there.</summary>
/// <param name="page">The page.</param>
/// <param name="width">Width of the window.</param>
internal sealed class Person(IPage page, int width)
{
    /// <summary>The page.</summary>
    public IPage Page => page;

    /// <summary>The button or link of a name.</summary>
    public ILocator Button(string name) => page.GetByRole(AriaRole.Button, new() { Name = name, Exact = true });

    /// <summary>Types name and password into the form that is shown, and sends it.</summary>
    public async Task SignInAsync(string name, string password)
    {
        await page.GetByLabel("Name", new() { Exact = true }).FillAsync(name);
        await page.GetByLabel("Password", new() { Exact = true }).FillAsync(password);
        await Button("Sign in").ClickAsync();
        await SeeAsync(page.Locator(".person-name"));
    }

    /// <summary>Signs out by the person's menu, and is back at the sign-in.</summary>
    public async Task SignOutAsync()
    {
        await page.Locator(".person > button").ClickAsync();
        await Button("Sign out").ClickAsync();
        await SeeAsync(Heading("Sign in"));
    }

    /// <summary>Goes to a page by its link in the header.</summary>
    public async Task GoToAsync(string link, string heading)
    {
        await page.GetByRole(AriaRole.Navigation, new() { Name = "Pages" }).GetByRole(AriaRole.Link, new() { Name = link }).ClickAsync();
        await SeeAsync(Heading(heading));
    }

    /// <summary>The heading of a page.</summary>
    public ILocator Heading(string text) => page.GetByRole(AriaRole.Heading, new() { Name = text, Level = 1, Exact = true });

    /// <summary>Waits until something is seen; nothing is ever wider than the window.</summary>
    public async Task SeeAsync(ILocator what, float seconds = 60)
    {
        await Assertions.Expect(what.First).ToBeVisibleAsync(new() { Timeout = seconds * 1000 });
        Assert.Equal(width, await page.EvaluateAsync<int>("document.documentElement.scrollWidth"));
    }

    /// <summary>Opens a page by its address.</summary>
    public async Task OpenAsync(string path, ILocator expected)
    {
        await page.GotoAsync(AddressOf(path));
        await SeeAsync(expected);
    }

    /// <summary>What the service answers to a change that the page itself asks for: the status, and the codes of the findings.</summary>
    public async Task<string> AnswerToAsync(string path, object body) => await page.EvaluateAsync<string>(
        """
        async ([path, body]) => {
          const answer = await fetch(path, { method: "POST", headers: { "Content-Type": "application/json" }, body });
          const problem = await answer.json().catch(() => ({}));
          return [answer.status, ...(problem.findings ?? []).map((finding) => finding.code)].join(" ");
        }
        """,
        new[] { path, JsonSerializer.Serialize(body) });

    /// <summary>What the page's own session reads.</summary>
    public async Task<JsonElement> ReadAsync(string path)
    {
        IAPIResponse answer = await page.APIRequest.GetAsync(AddressOf(path));
        return (await answer.JsonAsync())!.Value;
    }

    private string AddressOf(string path) => new Uri(new Uri(page.Url), path).ToString();
}
