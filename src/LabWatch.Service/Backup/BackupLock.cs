namespace LabWatch.Service.Backup;

/// <summary>Held by a backup, and by what removes readings, so that a copy has the trail from before a removal and the readings from after it never.</summary>
internal static class BackupLock
{
    /// <summary>Takes the lock. Throws <see cref="IOException"/> where another process has it.</summary>
    public static FileStream Take(string dataDirectory) =>
        new(Path.Combine(dataDirectory, "backup.lock"), FileMode.OpenOrCreate, FileAccess.ReadWrite, FileShare.None);
}
