using LabWatch.Tests.Records.Contract;

namespace LabWatch.Tests.Records;

public sealed class SqliteAuditLedgerTests : AuditLedgerContract
{
    private protected override ValueTask<IRecordsUnderTest> OpenAsync() => SqliteRecords.OpenAsync();
}
