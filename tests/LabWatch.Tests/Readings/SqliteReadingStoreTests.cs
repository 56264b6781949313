using LabWatch.Readings;
using Microsoft.Extensions.Logging.Abstractions;
using Microsoft.Extensions.Time.Testing;

namespace LabWatch.Tests.Readings;

/// <summary>The contract on SQLite.</summary>
public sealed class SqliteReadingStoreTests : ReadingStoreContract
{
    private readonly TemporaryDirectory _directory = new();
    private readonly FakeTimeProvider _clock = new(Noon.ToDateTimeOffset());

    public override async ValueTask DisposeAsync()
    {
        await base.DisposeAsync();
        _directory.Dispose();
    }

    protected override ValueTask<IReadingStore> OpenAsync() => ValueTask.FromResult<IReadingStore>(new SqliteReadingStore(
        new ReadingsOptions { DataDirectory = _directory.Path }, _clock, NullLogger<SqliteReadingStore>.Instance));

    protected override async ValueTask SealAsync() => await ((SqliteReadingStore)Store).SealEverythingAsync(Token);
}
