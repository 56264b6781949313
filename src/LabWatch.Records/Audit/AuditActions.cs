namespace LabWatch.Records.Audit;

/// <summary>What an entry of the audit trail can tell of. The words belong to the stored format and never change.</summary>
public static class AuditActions
{
    /// <summary>The chain begins at a database that has records already.</summary>
    public const string ChainBegun = "chain-begun";

    /// <summary>A record that was there before the trail covered its table.</summary>
    public const string ChainedLater = "chained-later";

    /// <summary>The service found another chain than the one whose end it had noted.</summary>
    public const string HeadDiffers = "head-differs";

    /// <summary>A revision of an assessment.</summary>
    public const string AssessmentRecorded = "assessment-recorded";

    /// <summary>A new alert: what stays the same in its life.</summary>
    public const string AlertOpened = "alert-opened";

    /// <summary>A step in the life of an alert.</summary>
    public const string AlertStep = "alert-step";

    /// <summary>A lab file.</summary>
    public const string LabFileImported = "lab-file-imported";

    /// <summary>A sealed part of a source-hour.</summary>
    public const string HourSealed = "hour-sealed";

    /// <summary>Readings were removed by the rules of retention, with the digests before and after.</summary>
    public const string ReadingsRemoved = "readings-removed";

    /// <summary>The service started, with the version of the program.</summary>
    public const string ServiceStarted = "service-started";

    /// <summary>The digest of the configuration in force.</summary>
    public const string ConfigurationInForce = "configuration-in-force";
}
