using System.Formats.Tar;
using System.Security.Cryptography;
using LabWatch.Lab.Findings;
using LabWatch.Lab.Time;
using LabWatch.Records.Audit;
using LabWatch.Service.Api.Live;
using Microsoft.Data.Sqlite;

namespace LabWatch.Service.Backup;

/// <summary>
/// Makes a backup of a data directory, also while a service writes it: databases as snapshots, everything else as it is. What is under way
/// has the ending <c>.partial</c>; the name that was asked for appears when the backup is whole and on the disk.
/// </summary>
internal sealed class BackupWriter(string data, string target, IReadOnlyList<string> notContained, TimeProvider clock, Action<string>? progress = null)
{
    private const string Partial = ".partial";
    private const int OpenAttempts = 20;

    private static readonly TimeSpan BetweenAttempts = TimeSpan.FromMilliseconds(100);

    /// <summary>Whether the backup becomes one file.</summary>
    private bool IsArchive => target.EndsWith(".tar", StringComparison.OrdinalIgnoreCase);

    /// <summary>What stands in the way of a backup to this target.</summary>
    public IReadOnlyList<Finding> Check() =>
        File.Exists(target) || (Directory.Exists(target) && Directory.EnumerateFileSystemEntries(target).Any())
            ? [new Finding("target-exists", "--to", "There is something under this name already; a backup never overwrites.", target, "Choose another name, for example with the date in it.")]
            : IsInside(target, data)
            ? [new Finding("target-inside-data", "--to", "The backup would lie inside the data directory.", target, "Choose a place outside, best on another disk.")]
            : [];

    /// <summary>Makes the backup; gives its manifest and the digest of that.</summary>
    public (BackupManifest Manifest, string Digest) Run(CancellationToken cancellationToken)
    {
        string staging = target + Partial;
        Clear(staging);
        Directory.CreateDirectory(staging);
        string at = Instant.Now(clock).ToString();
        IReadOnlyDictionary<string, AuditHead> heads = TrailHeadFile.Read(data) ?? new Dictionary<string, AuditHead>(StringComparer.Ordinal);
        List<BackupFile> files = [];
        foreach (string path in DataFiles.InOrder(data))
        {
            cancellationToken.ThrowIfCancellationRequested();
            progress?.Invoke(path);
            if (TryCopy(path, Path.Combine(staging, path)))
            {
                files.Add(DurableFile.Describe(Path.Combine(staging, path), path));
            }
        }

        BackupManifest manifest = new(BackupManifest.CurrentFormat, SiteBoard.Version, at, heads, files, notContained);
        byte[] bytes = manifest.ToBytes();
        DurableFile.Write(new MemoryStream(bytes), Path.Combine(staging, BackupManifest.FileName));
        Finish(staging, manifest);
        return (manifest, Convert.ToHexStringLower(SHA256.HashData(bytes)));
    }

    private bool TryCopy(string path, string copy)
    {
        try
        {
            if (DataFiles.IsDatabase(path))
            {
                Snapshot(Path.Combine(data, path), copy);
                return true;
            }

            using FileStream source = OpenSource(Path.Combine(data, path));
            DurableFile.Write(source, copy);
            return true;
        }
        catch (FileNotFoundException)
        {
            // Gone since the list was made: what a spool file held is in the readings, which are copied last.
            return false;
        }
    }

    // A file that is being made anew is held for a moment.
    private static FileStream OpenSource(string path)
    {
        for (int attempt = 1; ; attempt++)
        {
            try
            {
                return new FileStream(path, FileMode.Open, FileAccess.Read, FileShare.ReadWrite | FileShare.Delete);
            }
            catch (IOException exception) when (exception is not (FileNotFoundException or DirectoryNotFoundException) && attempt < OpenAttempts)
            {
                Task.Delay(BetweenAttempts, TimeProvider.System).GetAwaiter().GetResult();
            }
        }
    }

    // One step copies all pages under one read transaction: the state of one commit, while others go on.
    private static void Snapshot(string database, string copy)
    {
        Directory.CreateDirectory(Path.GetDirectoryName(copy)!);
        using (SqliteConnection source = Open(database, SqliteOpenMode.ReadOnly))
        using (SqliteConnection destination = Open(copy, SqliteOpenMode.ReadWriteCreate))
        {
            source.BackupDatabase(destination);
        }

        DurableFile.Flush(copy);
    }

    private static SqliteConnection Open(string path, SqliteOpenMode mode)
    {
        SqliteConnection connection = new(new SqliteConnectionStringBuilder { DataSource = path, Mode = mode, Pooling = false, DefaultTimeout = 60 }.ToString());
        connection.Open();
        return connection;
    }

    private void Finish(string staging, BackupManifest manifest)
    {
        if (!IsArchive)
        {
            if (Directory.Exists(target))
            {
                Directory.Delete(target);
            }

            Directory.Move(staging, target);
            return;
        }

        string archive = target + Partial + ".tar";
        File.Delete(archive);
        using (FileStream file = File.Create(archive))
        {
            using (TarWriter tar = new(file, TarEntryFormat.Pax, leaveOpen: true))
            {
                // The manifest first, so that a reader knows what to expect.
                foreach (string path in (string[])[BackupManifest.FileName, .. manifest.Files.Select(one => one.Path)])
                {
                    tar.WriteEntry(Path.Combine(staging, path), path);
                }
            }

            file.Flush(flushToDisk: true);
        }

        File.Move(archive, target);
        Directory.Delete(staging, recursive: true);
    }

    private static void Clear(string staging)
    {
        if (Directory.Exists(staging))
        {
            Directory.Delete(staging, recursive: true);
        }
    }

    private static bool IsInside(string path, string directory) =>
        Path.GetFullPath(path).StartsWith(Path.TrimEndingDirectorySeparator(Path.GetFullPath(directory)) + Path.DirectorySeparatorChar, StringComparison.Ordinal);
}
