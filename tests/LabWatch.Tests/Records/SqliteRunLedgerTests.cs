using LabWatch.Tests.Records.Contract;

namespace LabWatch.Tests.Records;

public sealed class SqliteRunLedgerTests : RunLedgerContract
{
    private protected override ValueTask<IRecordsUnderTest> OpenAsync() => SqliteRecords.OpenAsync();
}
