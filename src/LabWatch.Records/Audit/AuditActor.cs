namespace LabWatch.Records.Audit;

/// <summary>Actors of the trail that are no persons.</summary>
public static class AuditActor
{
    /// <summary>The service itself.</summary>
    public const string Service = "labwatch";
}
