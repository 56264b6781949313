using System.Net;

namespace LabWatch.Tests.Api;

public sealed class PagesTests : IDisposable
{
    private readonly string _folder = Directory.CreateTempSubdirectory("labwatch-pages-").FullName;

    public void Dispose() => Directory.Delete(_folder, recursive: true);

    [Fact]
    public async Task Without_built_pages_the_first_page_says_how_to_build_them()
    {
        await using ApiHost host = await ApiHost.StartAsync();

        Answer answer = await host.GetAsync("/");

        Assert.Contains("Node.js 20.19", answer.Text, StringComparison.Ordinal);
        Assert.Contains("dotnet build src/LabWatch.Service", answer.Text, StringComparison.Ordinal);
    }

    [Fact]
    public async Task Hashed_files_are_kept_for_ever_and_the_page_itself_is_asked_for_again()
    {
        await using ApiHost host = await WithPagesAsync();

        Answer page = await host.GetAsync("/");
        Answer asset = await host.GetAsync("/assets/index-abc.js");
        Answer unchanged = await host.GetAsync("/index.html", ("If-None-Match", page.Headers["ETag"]));

        Assert.Equal("<p>page</p>", page.Text);
        Assert.Equal("no-cache", page.Headers["Cache-Control"]);
        Assert.Contains("immutable", asset.Headers["Cache-Control"], StringComparison.Ordinal);
        Assert.Equal(HttpStatusCode.NotModified, unchanged.Status);
    }

    [Theory]
    [InlineData("br")]
    [InlineData("gzip")]
    public async Task Pages_are_compressed_for_who_can_read_that(string encoding)
    {
        await using ApiHost host = await WithPagesAsync();

        Answer asset = await host.GetAsync("/assets/index-abc.js", ("Accept-Encoding", encoding));

        Assert.Equal(encoding, asset.Headers["Content-Encoding"]);
    }

    [Theory]
    [InlineData("/../LabWatch.Tests.dll")]
    [InlineData("/assets/..%2f..%2fsecret.txt")]
    [InlineData("/nothing.js")]
    public async Task Nothing_outside_the_pages_is_served(string path)
    {
        await using ApiHost host = await WithPagesAsync();
        await File.WriteAllTextAsync(_folder + "-secret.txt", "secret", TestContext.Current.CancellationToken);

        Answer answer = await host.GetAsync(path);
        File.Delete(_folder + "-secret.txt");

        Assert.Equal(HttpStatusCode.NotFound, answer.Status);
    }

    [Theory]
    [InlineData("/sources/hollin-vale.fir", HttpStatusCode.OK)]
    [InlineData("/sign-in", HttpStatusCode.OK)]
    [InlineData("/set-up", HttpStatusCode.OK)]
    [InlineData("/trail?actor=labwatch", HttpStatusCode.OK)]
    [InlineData("/people", HttpStatusCode.OK)]
    [InlineData("/me", HttpStatusCode.OK)]
    [InlineData("/nowhere", HttpStatusCode.NotFound)]
    [InlineData("/sources/a/b", HttpStatusCode.NotFound)]
    public async Task Every_address_opens_the_pages_and_one_that_leads_nowhere_says_so_with_its_status(string address, HttpStatusCode status)
    {
        await using ApiHost host = await WithPagesAsync();

        Answer answer = await host.GetAsync(address, ("Accept", "text/html,application/xhtml+xml"));

        Assert.Equal((status, "<p>page</p>", "no-cache"), (answer.Status, answer.Text, answer.Headers["Cache-Control"]));
    }

    [Fact]
    public async Task A_program_at_an_address_that_leads_nowhere_gets_the_plain_status()
    {
        await using ApiHost host = await WithPagesAsync();

        Answer answer = await host.GetAsync("/nowhere", ("Accept", "application/json"));

        Assert.Equal((HttpStatusCode.NotFound, string.Empty), (answer.Status, answer.Text));
    }

    private Task<ApiHost> WithPagesAsync()
    {
        Directory.CreateDirectory(Path.Combine(_folder, "assets"));
        File.WriteAllText(Path.Combine(_folder, "index.html"), "<p>page</p>");
        File.WriteAllText(Path.Combine(_folder, "assets", "index-abc.js"), "// " + new string('a', 4000));
        return ApiHost.StartAsync(pages: _folder);
    }
}
