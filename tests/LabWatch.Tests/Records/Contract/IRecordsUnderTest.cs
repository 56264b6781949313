using LabWatch.Records.Accounts;
using LabWatch.Records.Alerts;
using LabWatch.Records.Assessments;
using LabWatch.Records.Audit;
using LabWatch.Records.LabFiles;
using LabWatch.Records.Revisions;
using LabWatch.Records.Runs;

namespace LabWatch.Tests.Records.Contract;

/// <summary>An empty records database and its ledgers, for one test.</summary>
internal interface IRecordsUnderTest : IAsyncDisposable
{
    IAssessmentLedger Assessments { get; }

    IAlertLedger Alerts { get; }

    ILabImportLedger LabImports { get; }

    ILabRecords LabRecords { get; }

    IRunLedger Runs { get; }

    IAuditLedger Audit { get; }

    IAccountLedger Accounts { get; }

    ISessionLedger Sessions { get; }
}
