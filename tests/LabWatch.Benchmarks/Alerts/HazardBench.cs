using System.Globalization;
using System.Net;
using System.Text.Json;
using LabWatch.Alerts;
using LabWatch.Alerts.Outbox;
using LabWatch.Lab;
using LabWatch.Lab.Alerts;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;
using LabWatch.Records.Alerts;
using LabWatch.Records.Assessments;
using Microsoft.Extensions.DependencyInjection;
using Microsoft.Extensions.Hosting;

namespace LabWatch.Benchmarks.Alerts;

/// <summary>The alerts room as the service registers it, with one source for each hazard and a webhook whose client is cut off at its handler.</summary>
internal sealed class HazardBench : HttpMessageHandler, ILabSnapshotSource, IAsyncDisposable
{
    /// <summary>Number of the source that streams harmless packs.</summary>
    public const int Streaming = -1;

    public static readonly string[] Wells = [.. Enumerable.Range(0, 12).Select(i => string.Create(CultureInfo.InvariantCulture, $"well-{i}"))];

    private readonly string _folder = Directory.CreateTempSubdirectory("labwatch-hazard-").FullName;
    private readonly TaskCompletionSource<long>[] _handed;
    private ServiceProvider? _services;

    private HazardBench(int count)
    {
        _handed = [.. Enumerable.Range(0, count).Select(_ => new TaskCompletionSource<long>(TaskCreationOptions.RunContinuationsAsynchronously))];
        Current = new LabSnapshot(
            new LabSite("hollin-vale", "Hollin Vale", "UTC"), [.. Enumerable.Range(Streaming, count + 1).Select(SourceOf)], [], [], [], [],
            [new Notifier("hook", NotifierKind.Webhook, new Uri("https://messages.example/"), null)]);
    }

    public event EventHandler? Changed
    {
        add { }
        remove { }
    }

    public LabSnapshot Current { get; }

    public IReadingTap Tap => _services!.GetRequiredService<IReadingTap>();

    public static SourceKey Source(int number) => new("hollin-vale", string.Create(CultureInfo.InvariantCulture, $"source-{number + 1}"));

    public static async Task<HazardBench> StartAsync(int count, LedgerBehaviour behaviour)
    {
        HazardBench bench = new(count);
        ServiceCollection services = new();
        services.AddLogging();
        services.AddSingleton<ILabSnapshotSource>(bench);
        services.AddSingleton<IAlertLedger>(new BenchLedger(behaviour));
        services.AddSingleton<IAssessmentLedger>(new BenchLedger(behaviour));
        services.AddLabWatchAlerts(new AlertsOptions { DataDirectory = bench._folder, StartGrace = TimeSpan.FromMinutes(10), GroupWindow = TimeSpan.Zero });
        services.AddHttpClient(WebhookChannel.ClientName).ConfigurePrimaryHttpMessageHandler(() => bench);
        bench._services = services.BuildServiceProvider();
        foreach (IHostedService service in bench._services.GetServices<IHostedService>())
        {
            await service.StartAsync(CancellationToken.None);
        }

        return bench;
    }

    /// <summary>Sends the hot reading of a source.</summary>
    public void Send(int number)
    {
        Instant now = Instant.Now(TimeProvider.System);
        Tap.OnPack(new ReadingPack(Source(number), now, [new Reading("case", now, 186)]));
    }

    /// <summary>The time stamp at which the message about a source was handed over.</summary>
    public Task<long> Handed(int number) => _handed[number].Task;

    async ValueTask IAsyncDisposable.DisposeAsync()
    {
        foreach (IHostedService service in _services!.GetServices<IHostedService>())
        {
            await service.StopAsync(CancellationToken.None);
        }

        await _services!.DisposeAsync();
        Directory.Delete(_folder, recursive: true);
        Dispose();
    }

    protected override async Task<HttpResponseMessage> SendAsync(HttpRequestMessage request, CancellationToken cancellationToken)
    {
        long now = TimeProvider.System.GetTimestamp();
        byte[] body = await request.Content!.ReadAsByteArrayAsync(cancellationToken);
        using JsonDocument json = JsonDocument.Parse(body);
        string source = json.RootElement.GetProperty("source").GetString()!;
        int number = int.Parse(source.AsSpan(source.LastIndexOf('-') + 1), CultureInfo.InvariantCulture) - 1;
        _handed[number].TrySetResult(now);
        return new HttpResponseMessage(HttpStatusCode.NoContent);
    }

    private static ReferenceSource SourceOf(int number)
    {
        SourceKey key = Source(number);
        return new ReferenceSource(
            key, key.Source, SourceKind.BlockFurnace, TraceabilityRoute.Contact, 100, 500, new Cavity(CavityShape.Cylinder, 25, 150, null, 25, []), [],
            [new Channel(new ChannelKey(key, "case"), "Outer case", ChannelQuantity.OuterSurface, "Cel", TimeSpan.FromSeconds(1))]);
    }
}
