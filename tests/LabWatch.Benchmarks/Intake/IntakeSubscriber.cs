using LabWatch.Intake;
using LabWatch.Intake.Diagnostics;
using LabWatch.Intake.Options;
using LabWatch.Lab;
using LabWatch.Readings;
using Microsoft.Extensions.DependencyInjection;
using Microsoft.Extensions.Hosting;

namespace LabWatch.Benchmarks.Intake;

/// <summary>The whole intake with the SQLite store, as the service composes them. A message is done when it is durable and acknowledged.</summary>
internal sealed class IntakeSubscriber : ISubscriber
{
    private readonly string _directory;
    private readonly IHost _host;
    private readonly IIntakeState _state;

    public IntakeSubscriber(string parent, int sources, ExternalBrokerOptions? external, EmbeddedBrokerOptions? embedded)
    {
        _directory = Path.Combine(parent, "labwatch-bench-" + Guid.NewGuid().ToString("N"));
        HostApplicationBuilder builder = Host.CreateEmptyApplicationBuilder(new HostApplicationBuilderSettings());
        builder.Services.AddLogging();
        builder.Services.AddSingleton<ILabSnapshotSource>(new BenchLab(sources));
        builder.Services.AddLabWatchReadings(new ReadingsOptions { DataDirectory = _directory });
        builder.Services.AddLabWatchIntake(new IntakeOptions
        {
            InstallationId = "bench",
            SpoolDirectory = Path.Combine(_directory, "spool"),
            ExternalBroker = external,
            EmbeddedBroker = embedded,
        });
        _host = builder.Build();
        _state = _host.Services.GetRequiredService<IIntakeState>();
    }

    public long Done => _state.Totals.Acknowledged;

    public IntakeTotals Totals => _state.Totals;

    public int Port => _state.EmbeddedPort ?? 0;

    public async Task StartAsync()
    {
        await _host.StartAsync();
        while (_state.EmbeddedPort is null && _state.Link != BrokerLinkState.Connected)
        {
            await Task.Delay(TimeSpan.FromMilliseconds(5), TimeProvider.System);
        }
    }

    public override string ToString() => $"link {_state.Link} ({_state.LinkNote}), queue {_state.QueueLength}, spool {_state.SpoolBytes}, {_state.Totals}";

    public Task StopAsync() => _host.StopAsync();

    public async ValueTask DisposeAsync()
    {
        await _host.StopAsync();
        if (_host is IAsyncDisposable disposable)
        {
            await disposable.DisposeAsync();
        }

        if (Directory.Exists(_directory))
        {
            Directory.Delete(_directory, recursive: true);
        }
    }
}
