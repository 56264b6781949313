using LabWatch.Readings;
using LabWatch.Readings.Influx;
using LabWatch.Readings.Quarantine;
using LabWatch.Tests.Readings;
using Microsoft.Extensions.Logging.Abstractions;

namespace LabWatch.SystemTests.Readings;

/// <summary>The contract on an InfluxDB of another generation, from a container image.</summary>
public sealed class InfluxContainerTests(InfluxContainer container) : ReadingStoreContract, IClassFixture<InfluxContainer>
{
    private readonly TemporaryDirectory _directory = new();
    private ReadingsOptions? _options;
    private SqliteQuarantine? _quarantine;

    public override async ValueTask DisposeAsync()
    {
        await base.DisposeAsync();
        _quarantine?.Dispose();
        _directory.Dispose();
    }

    protected override async ValueTask<IReadingStore> OpenAsync()
    {
        _options ??= await container.NewDatabaseAsync(_directory.Path, Token);
        _quarantine ??= new SqliteQuarantine(_options);
        return new InfluxReadingStore(_options, _quarantine, TimeProvider.System, NullLogger.Instance);
    }

    protected override async ValueTask SealAsync() => await ((IReadingSealer)Store).SealEverythingAsync(Token);
}
