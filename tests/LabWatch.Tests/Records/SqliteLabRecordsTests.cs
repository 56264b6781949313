using LabWatch.Tests.Records.Contract;

namespace LabWatch.Tests.Records;

public sealed class SqliteLabRecordsTests : LabRecordsContract
{
    private protected override ValueTask<IRecordsUnderTest> OpenAsync() => SqliteRecords.OpenAsync();
}
