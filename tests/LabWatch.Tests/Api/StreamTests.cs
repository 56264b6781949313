using System.Text;
using LabWatch.Service.Api.Streaming;
using Microsoft.Extensions.DependencyInjection;
using Microsoft.Extensions.Hosting;

namespace LabWatch.Tests.Api;

public sealed class StreamTests
{
    private static CancellationToken Cancel => TestContext.Current.CancellationToken;

    [Theory]
    [InlineData(null)]
    [InlineData("41")]
    public async Task A_listener_starts_with_a_snapshot_also_when_it_comes_back(string? lastId)
    {
        await using ApiHost host = await StartAsync();
        using Listener listener = await Listener.OpenAsync(host, lastId);

        (string name, string data) = await listener.NextAsync();

        Assert.Equal("snapshot", name);
        Assert.Contains("\"hollin-vale.fir\"", data, StringComparison.Ordinal);
    }

    [Fact]
    public async Task A_new_hazard_reaches_the_listener_at_the_next_look()
    {
        await using ApiHost host = await StartAsync();
        using Listener listener = await Listener.OpenAsync(host, null);
        await listener.NextAsync();
        host.Rooms.Alerts.Raise(AlertEndpointsTests.HotCase(host));

        (string name, string data) = await listener.NextAsync(() => host.Clock.Advance(TimeSpan.FromSeconds(1)));

        Assert.Equal("alert", name);
        Assert.Contains("raised-unacknowledged", data, StringComparison.Ordinal);
    }

    [Fact]
    public async Task Where_nothing_changes_the_clock_is_a_sign_of_life()
    {
        await using ApiHost host = await ApiHost.StartAsync(change: services => services.AddSingleton(provider => new StreamOptions
        {
            Clock = provider.GetRequiredService<TimeProvider>(),
            LookEvery = TimeSpan.FromDays(1),
        }));
        using Listener listener = await Listener.OpenAsync(host, null);
        await listener.NextAsync();

        (string name, _) = await listener.NextAsync(() => host.Clock.Advance(TimeSpan.FromSeconds(5)));

        Assert.Equal("clock", name);
    }

    [Fact]
    public void A_listener_that_does_not_keep_up_is_cut_and_costs_the_others_nothing()
    {
        ServiceCollection services = new();
        services.AddMetrics();
        services.AddSingleton<StreamMetrics>();
        services.AddSingleton<StreamHub>();
        using ServiceProvider provider = services.BuildServiceProvider();
        StreamHub hub = provider.GetRequiredService<StreamHub>();
        using StreamClient slow = hub.Join()!;
        using StreamClient quick = hub.Join()!;

        for (int i = 0; i <= StreamClient.Buffered; i++)
        {
            hub.Publish("source", "{}"u8.ToArray());
            Assert.True(quick.Waiting.TryRead(out _));
        }

        Assert.True(slow.Cut.IsCancellationRequested);
        Assert.False(quick.Cut.IsCancellationRequested);
    }

    [Fact]
    public void Beyond_the_bound_nobody_may_join_until_somebody_leaves()
    {
        ServiceCollection services = new();
        services.AddMetrics();
        services.AddSingleton<StreamMetrics>();
        services.AddSingleton<StreamHub>();
        using ServiceProvider provider = services.BuildServiceProvider();
        StreamHub hub = provider.GetRequiredService<StreamHub>();
        StreamClient[] joined = [.. Enumerable.Range(0, StreamHub.MaximumClients).Select(_ => hub.Join()!)];

        Assert.Null(hub.Join());
        hub.Leave(joined[0]);
        Assert.NotNull(hub.Join());
        Array.ForEach(joined, client => client.Dispose());
    }

    [Fact]
    public async Task When_the_service_stops_every_stream_ends()
    {
        await using ApiHost host = await StartAsync();
        using Listener listener = await Listener.OpenAsync(host, null);
        await listener.NextAsync();

        host.Services.GetRequiredService<IHostApplicationLifetime>().StopApplication();

        Assert.True(await listener.IsOverAsync());
        Assert.Null(host.Services.GetRequiredService<StreamHub>().Join());
    }

    private static Task<ApiHost> StartAsync() => ApiHost.StartAsync(change: services =>
        services.AddSingleton(provider => new StreamOptions { Clock = provider.GetRequiredService<TimeProvider>() }));

    private sealed class Listener(HttpResponseMessage response, StreamReader lines) : IDisposable
    {
        public static async Task<Listener> OpenAsync(ApiHost host, string? lastId)
        {
            using HttpRequestMessage request = new(HttpMethod.Get, "/api/v1/stream");
            if (lastId is not null)
            {
                request.Headers.Add("Last-Event-ID", lastId);
            }

            HttpResponseMessage response = await host.Client.SendAsync(request, HttpCompletionOption.ResponseHeadersRead, Cancel);
            Assert.Equal("text/event-stream", response.Content.Headers.ContentType!.MediaType);
            return new Listener(response, new StreamReader(await response.Content.ReadAsStreamAsync(Cancel), Encoding.UTF8));
        }

        /// <summary>The next event; while it does not come, something is done again and again (time goes on).</summary>
        public async Task<(string Name, string Data)> NextAsync(Action? meanwhile = null)
        {
            string name = string.Empty;
            while (true)
            {
                Task<string?> next = lines.ReadLineAsync(Cancel).AsTask();
                while (!next.IsCompleted && meanwhile is not null)
                {
                    meanwhile();
                    await Task.WhenAny(next, Task.Delay(TimeSpan.FromMilliseconds(10), TimeProvider.System, Cancel));
                }

                string line = await next.WaitAsync(TimeSpan.FromSeconds(30), Cancel) ?? throw new EndOfStreamException();
                if (line.StartsWith("event: ", StringComparison.Ordinal))
                {
                    name = line[7..];
                }

                if (line.StartsWith("data: ", StringComparison.Ordinal))
                {
                    return (name, line[6..]);
                }
            }
        }

        public async Task<bool> IsOverAsync()
        {
            while (await lines.ReadLineAsync(Cancel).AsTask().WaitAsync(TimeSpan.FromSeconds(30), Cancel) is not null)
            {
            }

            return true;
        }

        public void Dispose()
        {
            lines.Dispose();
            response.Dispose();
        }
    }
}
