using LabWatch.Readings;
using LabWatch.Readings.Quarantine;

namespace LabWatch.Tests.Readings;

/// <summary>The contract on SQLite, and what is its own.</summary>
public sealed class QuarantineTests : QuarantineContract, IDisposable
{
    private readonly TemporaryDirectory _directory = new();

    public void Dispose() => _directory.Dispose();

    [Fact]
    public async Task A_quarantine_that_cannot_be_written_says_so_and_goes_on_later()
    {
        using TableQuarantine quarantine = Open(name: "blocked");
        await File.WriteAllTextAsync(_directory.File("blocked"), "", Token);
        await Assert.ThrowsAsync<StoreUnavailableException>(async () => await quarantine.AddAsync([Message(0, "a", "x")], Token));
        File.Delete(_directory.File("blocked"));
        await quarantine.AddAsync([Message(0, "a", "x")], Token);
        Assert.Equal(1, await quarantine.TotalAsync(Token));
    }

    protected override TableQuarantine Open(int count = 100, long bytes = 1 << 20, string name = "q") => new SqliteQuarantine(
        new ReadingsOptions { DataDirectory = _directory.File(name), QuarantineCountLimit = count, QuarantineBytesLimit = bytes });
}
