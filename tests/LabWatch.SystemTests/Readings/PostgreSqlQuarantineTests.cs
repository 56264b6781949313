using LabWatch.Readings;
using LabWatch.Readings.Quarantine;
using LabWatch.SystemTests.Records;
using LabWatch.Tests.Readings;

namespace LabWatch.SystemTests.Readings;

/// <summary>The contract of the quarantine on PostgreSQL.</summary>
[Collection(PostgreSqlCollection.Name)]
public sealed class PostgreSqlQuarantineTests(PostgreSqlServer server) : QuarantineContract
{
    private string? _database;

    [Fact]
    public async Task Two_services_write_one_quarantine()
    {
        using TableQuarantine one = Open(), other = Open();
        await Parallel.ForAsync(0, 40, Token, async (i, token) => await (i % 2 == 0 ? one : other).AddAsync([Message(i, $"{i % 10}", "x")], token));
        Assert.Equal(40, await one.TotalAsync(Token));
        Assert.Equal(10, (await other.NewestAsync(100, Token)).Count);
    }

    protected override TableQuarantine Open(int count = 100, long bytes = 1 << 20, string name = "q") => PostgreSqlReadingStore.Quarantine(new ReadingsOptions
    {
        DataDirectory = Path.GetTempPath(),
        Engine = ReadingsEngine.PostgreSql,
        PostgreSql = new PostgreSqlReadingsOptions { ConnectionString = _database ??= server.NewDatabaseAsync(Token).GetAwaiter().GetResult(), Schema = "readings_" + name },
        QuarantineCountLimit = count,
        QuarantineBytesLimit = bytes,
    });
}
