namespace LabWatch.Service.Api.Access;

/// <summary>What an endpoint needs its caller to be allowed. Names in the API: <c>read</c>, <c>record-runs</c> and so on.</summary>
internal enum Permission
{
    /// <summary>See sources, readings, assessments, alerts, records.</summary>
    Read,

    /// <summary>Acknowledge alerts.</summary>
    Acknowledge,

    /// <summary>Start, end and correct calibration runs.</summary>
    RecordRuns,

    /// <summary>Make new revisions of limits, certificates and installations.</summary>
    ReviseRecords,

    /// <summary>See the audit trail.</summary>
    ReadTrail,

    /// <summary>Make, change and disable accounts.</summary>
    ManageAccounts,

    /// <summary>Inject faults into the demo's simulated laboratory.</summary>
    InjectFaults,
}
