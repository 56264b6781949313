using LabWatch.Tests.Records.Contract;

namespace LabWatch.Tests.Records;

public sealed class SqliteAccountLedgerTests : AccountLedgerContract
{
    private protected override ValueTask<IRecordsUnderTest> OpenAsync() => SqliteRecords.OpenAsync();
}
