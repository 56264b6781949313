using Microsoft.Playwright;

namespace LabWatch.SystemTests;

/// <summary>Headless Chromium from the system's packages.</summary>
internal sealed class Browser : IAsyncDisposable
{
    private static readonly string[] Places = ["/usr/bin/chromium", "/usr/bin/chromium-browser", "/usr/bin/google-chrome"];

    /// <summary>How long an assertion waits on a loaded machine.</summary>
    public static readonly LocatorAssertionsToBeVisibleOptions Patient = new() { Timeout = 60_000 };

    private readonly IPlaywright _playwright;
    private readonly IBrowser _browser;

    private Browser(IPlaywright playwright, IBrowser browser)
    {
        _playwright = playwright;
        _browser = browser;
    }

    private static string? Executable => Environment.GetEnvironmentVariable("LABWATCH_TEST_CHROMIUM") ?? Places.FirstOrDefault(File.Exists);

    /// <summary>Skips the test with the reason where there is no browser.</summary>
    public static void SkipWhereMissing() =>
        Assert.SkipWhen(Executable is null, "Chromium is not installed (Debian package chromium); LABWATCH_TEST_CHROMIUM may name another.");

    /// <summary>Starts the browser; it speaks to nothing but what a test opens.</summary>
    public static async Task<Browser> StartAsync()
    {
        IPlaywright playwright = await Playwright.CreateAsync();
        IBrowser browser = await playwright.Chromium.LaunchAsync(new()
        {
            ExecutablePath = Executable,
            Headless = true,
            Args = ["--no-sandbox", "--disable-gpu", "--disable-quic", "--no-first-run", "--disable-background-networking", "--disable-component-update", "--disable-sync", "--disable-dev-shm-usage"],
        });
        return new Browser(playwright, browser);
    }

    /// <summary>Opens a page in a window of a size.</summary>
    public async Task<IPage> OpenAsync(Uri address, int width, int height)
    {
        IBrowserContext context = await _browser.NewContextAsync(new() { ViewportSize = new() { Width = width, Height = height }, IsMobile = width < 600, HasTouch = width < 600 });
        IPage page = await context.NewPageAsync();
        await page.GotoAsync(address.ToString());
        return page;
    }

    /// <inheritdoc/>
    public async ValueTask DisposeAsync()
    {
        await _browser.DisposeAsync();
        _playwright.Dispose();
    }
}
