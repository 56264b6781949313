using LabWatch.Records.LabFiles;

namespace LabWatch.Tests.Records.Contract;

/// <summary>What every engine's ledger of lab files does.</summary>
public abstract class LabImportLedgerContract : IAsyncLifetime
{
    private protected abstract ValueTask<IRecordsUnderTest> OpenAsync();

    private IRecordsUnderTest _records = null!;

    private ILabImportLedger Ledger => _records.LabImports;

    private static CancellationToken Token => TestContext.Current.CancellationToken;

    public async ValueTask InitializeAsync() => _records = await OpenAsync();

    public async ValueTask DisposeAsync()
    {
        await _records.DisposeAsync();
        GC.SuppressFinalize(this);
    }

    [Fact]
    public async Task Imports_are_numbered_by_site_and_all_of_them_stay()
    {
        Assert.Null(await Ledger.LatestAsync("hollin-vale", Token));
        await Ledger.RecordAsync("hollin-vale", "{\"a\": 1} // \u00e5", Sample.Noon, "kim", Token);
        await Ledger.RecordAsync("other", "{}", Sample.Noon, "kim", Token);
        LabImport second = await Ledger.RecordAsync("hollin-vale", "{\"a\": 2}", Sample.Noon + TimeSpan.FromSeconds(1), "lee", Token);
        Assert.Equal((2, "lee"), (second.Sequence, second.By));
        Assert.Equal(second, await Ledger.LatestAsync("hollin-vale", Token));
        Assert.Equal(["{\"a\": 1} // \u00e5", "{\"a\": 2}"], (await Ledger.ListAsync("hollin-vale", Token)).Select(import => import.Document));
    }

    [Fact]
    public async Task The_same_file_again_is_no_new_import()
    {
        LabImport first = await Ledger.RecordAsync("hollin-vale", "{}", Sample.Noon, "kim", Token);
        Assert.Equal(first, await Ledger.RecordAsync("hollin-vale", "{}", Sample.Noon + TimeSpan.FromDays(1), "lee", Token));
        Assert.Single(await Ledger.ListAsync("hollin-vale", Token));
    }

    [Fact]
    public async Task The_digest_is_sha_256_of_the_text() =>
        // FIPS 180-4 example, one block: "abc".
        Assert.Equal(
            "ba7816bf8f01cfea414140de5dae2223b00361a396177a9cb410ff61f20015ad",
            (await Ledger.RecordAsync("hollin-vale", "abc", Sample.Noon, "kim", Token)).Digest);
}
