namespace LabWatch.Records.Accounts;

/// <summary>What somebody is in the laboratory. One person may have several roles; what each may do is listed in docs/reference/access.md.</summary>
public enum Role
{
    /// <summary>Works at the sources: acknowledges alerts, starts and ends calibration runs.</summary>
    Technician,

    /// <summary>Answers for the records: limits, certificates, installations.</summary>
    QualityManager,

    /// <summary>Sees everything, changes nothing.</summary>
    Auditor,

    /// <summary>Looks after accounts; no say in measurement.</summary>
    Administrator,
}
