using LabWatch.Tests.Records.Contract;

namespace LabWatch.SystemTests.Records;

[Collection(PostgreSqlCollection.Name)]
public sealed class PostgreSqlAccountLedgerTests(PostgreSqlServer server) : AccountLedgerContract
{
    private protected override ValueTask<IRecordsUnderTest> OpenAsync() => PostgreSqlRecords.OpenAsync(server);
}
