using LabWatch.Records;
using LabWatch.Records.Accounts;
using LabWatch.Records.Alerts;
using LabWatch.Records.Assessments;
using LabWatch.Records.Audit;
using LabWatch.Records.LabFiles;
using LabWatch.Records.Revisions;
using LabWatch.Records.Runs;
using LabWatch.Tests.Records.Contract;
using Microsoft.Extensions.DependencyInjection;

namespace LabWatch.SystemTests.Records;

/// <summary>Records in a PostgreSQL database.</summary>
internal sealed class PostgreSqlRecords(string connectionString) : IRecordsUnderTest
{
    private readonly ServiceProvider _services = new ServiceCollection()
        .AddLabWatchRecords(new RecordsOptions(RecordsProvider.PostgreSql, string.Empty, connectionString) { BusyTimeout = TimeSpan.FromSeconds(20) })
        .BuildServiceProvider();

    public IAssessmentLedger Assessments => _services.GetRequiredService<IAssessmentLedger>();

    public IAlertLedger Alerts => _services.GetRequiredService<IAlertLedger>();

    public IAccountLedger Accounts => _services.GetRequiredService<IAccountLedger>();

    public ISessionLedger Sessions => _services.GetRequiredService<ISessionLedger>();

    public ILabImportLedger LabImports => _services.GetRequiredService<ILabImportLedger>();

    public IRunLedger Runs => _services.GetRequiredService<IRunLedger>();

    public ILabRecords LabRecords => _services.GetRequiredService<ILabRecords>();

    public IAuditLedger Audit => _services.GetRequiredService<IAuditLedger>();

    public static async ValueTask<IRecordsUnderTest> OpenAsync(PostgreSqlServer server) =>
        new PostgreSqlRecords(await server.NewDatabaseAsync(TestContext.Current.CancellationToken));

    public ValueTask DisposeAsync() => _services.DisposeAsync();
}
