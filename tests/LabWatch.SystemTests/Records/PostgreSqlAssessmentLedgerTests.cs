using LabWatch.Tests.Records.Contract;

namespace LabWatch.SystemTests.Records;

[Collection(PostgreSqlCollection.Name)]
public sealed class PostgreSqlAssessmentLedgerTests(PostgreSqlServer server) : AssessmentLedgerContract
{
    private protected override ValueTask<IRecordsUnderTest> OpenAsync() => PostgreSqlRecords.OpenAsync(server);
}
