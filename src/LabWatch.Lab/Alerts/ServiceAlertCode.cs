namespace LabWatch.Lab.Alerts;

/// <summary>Codes of alerts about the service itself. Their source is <see cref="Source"/> of the site, which is no reference source.</summary>
public static class ServiceAlertCode
{
    /// <summary>Readings cannot be stored: the disk is full, read-only or fails, or the database does not answer.</summary>
    public const string ReadingsNotStored = "readings-not-stored";

    /// <summary>The disk of the data directory is nearly full.</summary>
    public const string DiskNearlyFull = "disk-nearly-full";

    /// <summary>Stored readings were found damaged or missing.</summary>
    public const string ReadingsDamaged = "readings-damaged";

    /// <summary>No reading of any source arrives.</summary>
    public const string NoReadings = "no-readings";

    /// <summary>What stands for the source in these alerts.</summary>
    public const string Source = "labwatch";

    /// <summary>All codes.</summary>
    public static IReadOnlyList<string> All { get; } = [ReadingsNotStored, DiskNearlyFull, ReadingsDamaged, NoReadings];

    /// <summary>Whether an alert is about the service itself.</summary>
    public static bool IsService(string code) => All.Contains(code, StringComparer.Ordinal);
}
