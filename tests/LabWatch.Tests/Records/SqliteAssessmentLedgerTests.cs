using LabWatch.Tests.Records.Contract;

namespace LabWatch.Tests.Records;

public sealed class SqliteAssessmentLedgerTests : AssessmentLedgerContract
{
    private protected override ValueTask<IRecordsUnderTest> OpenAsync() => SqliteRecords.OpenAsync();
}
