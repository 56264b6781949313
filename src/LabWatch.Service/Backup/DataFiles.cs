using LabWatch.Readings;
using LabWatch.Records;
using LabWatch.Records.Audit;

namespace LabWatch.Service.Backup;

/// <summary>
/// Which files of a data directory a backup takes, in the order that makes it consistent beside a running service: what only points into
/// the databases first, then the records, then the readings. So nothing in the copy tells of readings that the copy does not have.
/// </summary>
internal static class DataFiles
{
    /// <summary>Says that a restore did not come to its end; a service refuses such a directory.</summary>
    public const string RestoreMarker = "restore-incomplete";

    private static readonly string[] Databases = [RecordsOptions.FileName, "quarantine.db", SqliteReadingStore.FileName];
    /// <summary>Device accounts with hashes of passwords, not keys of this machine.</summary>
    private const string DeviceAccounts = "keys/devices.json";

    private static readonly string[] Private = ["keys/", "secrets/"];
    private static readonly string[] First = [TrailHeadFile.FileName, "readings.mark"];
    private static readonly string[] LeftOutEndings = [".lock", ".db-wal", ".db-shm", ".db-journal", ".part", ".tmp", ".partial", ".migrating", ".owner"];

    /// <summary>What is left out and why, for people.</summary>
    public static string KeysNote => "The directories keys (private keys of this machine) and secrets: a restored service makes new keys, so its own certificate has a new fingerprint; put the secrets there again.";

    /// <summary>Paths in the directory, with slashes, in the order in which to copy them.</summary>
    public static IReadOnlyList<string> InOrder(string directory)
    {
        string[] all = [.. Directory.EnumerateFiles(directory, "*", SearchOption.AllDirectories)
            .Select(path => Path.GetRelativePath(directory, path).Replace(Path.DirectorySeparatorChar, '/'))
            .Where(IsTaken)
            .Order(StringComparer.Ordinal)];
        return [.. First.Intersect(all), .. all.Except(First).Except(Databases), .. Databases.Intersect(all)];
    }

    /// <summary>Whether a file is a live database, which is copied as a snapshot.</summary>
    public static bool IsDatabase(string path) => Databases.Contains(path, StringComparer.Ordinal);

    private static bool IsTaken(string path) =>
        (path == DeviceAccounts || !Private.Any(folder => path.StartsWith(folder, StringComparison.Ordinal))) && path is not ("set-up-code" or RestoreMarker)
        && !LeftOutEndings.Any(ending => path.EndsWith(ending, StringComparison.Ordinal));
}
