using LabWatch.Tests.Records.Contract;

namespace LabWatch.SystemTests.Records;

[Collection(PostgreSqlCollection.Name)]
public sealed class PostgreSqlLabImportLedgerTests(PostgreSqlServer server) : LabImportLedgerContract
{
    private protected override ValueTask<IRecordsUnderTest> OpenAsync() => PostgreSqlRecords.OpenAsync(server);
}
