using System.Collections.Concurrent;
using LabWatch.Intake;
using LabWatch.Intake.Diagnostics;
using LabWatch.Intake.Options;
using LabWatch.Lab;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Time;
using LabWatch.Readings;
using Microsoft.Extensions.DependencyInjection;
using Microsoft.Extensions.Hosting;
using Microsoft.Extensions.Logging;

namespace LabWatch.SystemTests.Intake;

/// <summary>The intake with the real store, as the service composes them, on a data directory that outlives it.</summary>
internal sealed class IntakeHost : IAsyncDisposable, ILabSnapshotSource, IReadingTap
{
    public static readonly SourceKey Fir = new("hollin-vale", "fir");
    public const string Topic = "lab/hollin-vale/fir";
    private readonly IHost _host;
    private readonly ConcurrentDictionary<double, int> _seen = new();

    public IntakeHost(string dataDirectory, ExternalBrokerOptions broker, Func<IntakeOptions, IntakeOptions>? change = null)
    {
        var options = new IntakeOptions
        {
            InstallationId = "test",
            SpoolDirectory = Path.Combine(dataDirectory, "spool"),
            ExternalBroker = broker,
            StopBudget = TimeSpan.FromSeconds(2),
        };
        HostApplicationBuilder builder = Host.CreateEmptyApplicationBuilder(new HostApplicationBuilderSettings());
        builder.Services.AddLabWatchReadings(new ReadingsOptions { DataDirectory = dataDirectory });
        builder.Services.AddSingleton(provider => new SwitchableStore(provider.GetRequiredService<SqliteReadingStore>()));
        builder.Services.AddSingleton<IReadingStore>(provider => provider.GetRequiredService<SwitchableStore>());
        builder.Services.AddSingleton<ILabSnapshotSource>(this);
        builder.Services.AddSingleton<IReadingTap>(this);
        builder.Services.AddLabWatchIntake(change?.Invoke(options) ?? options);
        builder.Services.AddLogging(logging => logging.SetMinimumLevel(LogLevel.None));
        _host = builder.Build();
        Store = _host.Services.GetRequiredService<SwitchableStore>();
        State = _host.Services.GetRequiredService<IIntakeState>();
    }

    public SwitchableStore Store { get; }

    public IIntakeState State { get; }

    /// <summary>How often the tap has seen each value.</summary>
    public IReadOnlyDictionary<double, int> Seen => _seen;

    public LabSnapshot Current { get; } = FixedLab.Snapshot();

#pragma warning disable CS0067 // The snapshot of these tests never changes.
    public event EventHandler? Changed;
#pragma warning restore CS0067

    public void OnPack(ReadingPack pack)
    {
        foreach (Reading reading in pack.Readings)
        {
            _seen.AddOrUpdate(reading.Value, 1, static (_, count) => count + 1);
        }
    }

    public async Task StartAsync(CancellationToken cancellationToken) => await _host.StartAsync(cancellationToken);

    public async Task StopAsync(CancellationToken cancellationToken) => await _host.StopAsync(cancellationToken);

    /// <summary>All values stored, in order of device time.</summary>
    public async Task<double[]> StoredAsync(CancellationToken cancellationToken)
    {
        Instant now = Instant.Now(TimeProvider.System);
        ReadingWindow window = await Store.ReadAsync(Fir, ["power"], new TimeWindow(now - TimeSpan.FromDays(1), now + TimeSpan.FromDays(1)), cancellationToken);
        return window.Find("power")?.Values.ToArray() ?? [];
    }

    /// <summary>Device times of all readings stored, microseconds.</summary>
    public async Task<long[]> StoredTimesAsync(CancellationToken cancellationToken)
    {
        Instant now = Instant.Now(TimeProvider.System);
        ReadingWindow window = await Store.ReadAsync(Fir, ["power"], new TimeWindow(now - TimeSpan.FromDays(1), now + TimeSpan.FromDays(1)), cancellationToken);
        return window.Find("power")?.TimeMicroseconds.ToArray() ?? [];
    }

    public Task UntilStoredAsync(int count, CancellationToken cancellationToken)
    {
        int seen = -1;
        return Poll.UntilAsync(
            $"{count} readings are stored",
            async () => (seen = (await StoredAsync(cancellationToken)).Length) >= count,
            TimeSpan.FromSeconds(120),
            cancellationToken,
            () => $"{seen} are; link {State.Link} ({State.LinkNote}), {State.Totals}");
    }

    public Task UntilLinkAsync(BrokerLinkState link, CancellationToken cancellationToken) =>
        Poll.UntilAsync(
            $"the link is {link}", () => Task.FromResult(State.Link == link), TimeSpan.FromSeconds(120), cancellationToken, () => $"It is {State.Link} ({State.LinkNote}).");

    public async ValueTask DisposeAsync()
    {
        await _host.StopAsync(CancellationToken.None);
        _host.Dispose();
    }
}
