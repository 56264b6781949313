using LabWatch.Tests.Records.Contract;

namespace LabWatch.SystemTests.Records;

[Collection(PostgreSqlCollection.Name)]
public sealed class PostgreSqlLabRecordsTests(PostgreSqlServer server) : LabRecordsContract
{
    private protected override ValueTask<IRecordsUnderTest> OpenAsync() => PostgreSqlRecords.OpenAsync(server);
}
