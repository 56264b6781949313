using LabWatch.Lab.Time;
using LabWatch.Service.Api;
using LabWatch.Service.Api.Hosting;
using LabWatch.Tests.Api.Fakes;
using Microsoft.AspNetCore.Builder;
using Microsoft.AspNetCore.TestHost;
using Microsoft.Extensions.DependencyInjection;
using Microsoft.Extensions.Logging;
using Microsoft.Extensions.Time.Testing;

namespace LabWatch.Tests.Api;

/// <summary>The API in this process, over rooms in memory, with a clock that stands still.</summary>
internal sealed class ApiHost : IAsyncDisposable
{
    private readonly WebApplication _app;

    private ApiHost(WebApplication app, ApiServices rooms, FakeTimeProvider clock)
    {
        _app = app;
        Rooms = rooms;
        Clock = clock;
        Client = app.GetTestClient();
    }

    public static DateTimeOffset Start { get; } = new(2026, 12, 1, 9, 0, 0, TimeSpan.Zero);

    public FakeTimeProvider Clock { get; }

    public Instant Now => Instant.Now(Clock);

    public ApiServices Rooms { get; }

    public HttpClient Client { get; }

    public IServiceProvider Services => _app.Services;

    public static async Task<ApiHost> StartAsync(bool isDemo = false, string? pages = null, Action<IServiceCollection>? change = null)
    {
        FakeTimeProvider clock = new(Start);
        ApiServices rooms = new(clock);
        WebApplicationBuilder builder = WebApplication.CreateSlimBuilder();
        builder.Logging.ClearProviders();
        builder.WebHost.UseTestServer();
        builder.Services.AddSingleton(new PagesFolder(pages ?? Path.Combine(Path.GetTempPath(), "no-pages-here")));
        change?.Invoke(builder.Services);
        rooms.AddTo(builder.Services, isDemo);
        WebApplication app = builder.Build();
        app.MapLabWatchApi();
        app.MapLabWatchPages();
        await app.StartAsync(TestContext.Current.CancellationToken);
        return new ApiHost(app, rooms, clock);
    }

    public async Task<Answer> GetAsync(string path, params (string Name, string Value)[] headers) => await SendAsync(HttpMethod.Get, path, null, headers);

    public async Task<Answer> SendAsync(HttpMethod method, string path, string? json, params (string Name, string Value)[] headers)
    {
        using HttpRequestMessage request = new(method, path);
        foreach ((string name, string value) in headers)
        {
            request.Headers.TryAddWithoutValidation(name, value);
        }

        if (json is not null)
        {
            request.Content = new StringContent(json, System.Text.Encoding.UTF8, "application/json");
        }

        using HttpResponseMessage response = await Client.SendAsync(request, TestContext.Current.CancellationToken);
        string text = await response.Content.ReadAsStringAsync(TestContext.Current.CancellationToken);
        return new Answer(
            response.StatusCode,
            text,
            response.Content.Headers.ContentType?.MediaType ?? string.Empty,
            response.Headers.Concat(response.Content.Headers).ToDictionary(header => header.Key, header => string.Join(", ", header.Value), StringComparer.OrdinalIgnoreCase));
    }

    public async ValueTask DisposeAsync()
    {
        Client.Dispose();
        await _app.DisposeAsync();
    }
}
