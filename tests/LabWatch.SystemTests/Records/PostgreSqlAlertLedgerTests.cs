using LabWatch.Tests.Records.Contract;

namespace LabWatch.SystemTests.Records;

[Collection(PostgreSqlCollection.Name)]
public sealed class PostgreSqlAlertLedgerTests(PostgreSqlServer server) : AlertLedgerContract
{
    private protected override ValueTask<IRecordsUnderTest> OpenAsync() => PostgreSqlRecords.OpenAsync(server);
}
