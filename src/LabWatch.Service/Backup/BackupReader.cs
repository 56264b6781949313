using System.Formats.Tar;
using LabWatch.Lab.Findings;

namespace LabWatch.Service.Backup;

/// <summary>Puts a backup, a directory or an archive, into a data directory and compares every file with its digest.</summary>
internal sealed class BackupReader(string source, string data, Action<string>? progress = null)
{
    private const long LongestManifest = 64 << 20;

    private readonly List<Finding> _findings = [];

    /// <summary>The manifest; null before <see cref="Run"/>, and where there is none.</summary>
    public BackupManifest? Manifest { get; private set; }

    /// <summary>Copies and compares; the findings, empty where all is as the manifest says.</summary>
    public IReadOnlyList<Finding> Run(CancellationToken cancellationToken)
    {
        if (Directory.Exists(source))
        {
            FromDirectory(cancellationToken);
        }
        else if (File.Exists(source))
        {
            FromArchive(cancellationToken);
        }
        else
        {
            Add("backup-missing", "There is no backup under this name.", source, "Name the directory or the .tar file that labwatch backup made.");
        }

        return _findings;
    }

    private void FromDirectory(CancellationToken cancellationToken)
    {
        string path = Path.Combine(source, BackupManifest.FileName);
        Manifest = File.Exists(path) && new FileInfo(path).Length <= LongestManifest ? BackupManifest.Read(File.ReadAllBytes(path)) : null;
        foreach (BackupFile file in Expected())
        {
            cancellationToken.ThrowIfCancellationRequested();
            string from = Path.Combine(source, file.Path);
            if (!File.Exists(from))
            {
                AddMissing(file);
                continue;
            }

            using FileStream stream = File.OpenRead(from);
            Take(file, stream);
        }
    }

    private void FromArchive(CancellationToken cancellationToken)
    {
        using FileStream file = File.OpenRead(source);
        using TarReader tar = new(file);
        Dictionary<string, BackupFile> missing = [];
        try
        {
            for (TarEntry? entry = tar.GetNextEntry(); entry is not null; entry = tar.GetNextEntry())
            {
                cancellationToken.ThrowIfCancellationRequested();
                if (Manifest is null)
                {
                    Manifest = entry is { Name: BackupManifest.FileName, Length: < LongestManifest, DataStream: not null } ? ReadManifest(entry.DataStream) : null;
                    missing = Expected().ToDictionary(one => one.Path, StringComparer.Ordinal);
                    if (Manifest is null)
                    {
                        return;
                    }
                }
                else if (missing.Remove(entry.Name, out BackupFile? expected))
                {
                    Take(expected, entry.DataStream ?? Stream.Null);
                }
            }
        }
        catch (Exception exception) when (exception is InvalidDataException or EndOfStreamException or FormatException)
        {
            Add("backup-damaged", "The archive is damaged: " + exception.Message, source, "Use another copy.");
        }

        if (Manifest is null)
        {
            _ = Expected();
        }

        foreach (BackupFile file1 in missing.Values)
        {
            AddMissing(file1);
        }
    }

    private static BackupManifest? ReadManifest(Stream stream)
    {
        using MemoryStream bytes = new();
        stream.CopyTo(bytes);
        return BackupManifest.Read(bytes.ToArray());
    }

    private IReadOnlyList<BackupFile> Expected()
    {
        if (Manifest is null && _findings.Count == 0)
        {
            Add("no-manifest", $"There is no {BackupManifest.FileName} that this program can read: it is no backup, or was not finished.", source, "Name a backup that labwatch backup finished, or use the version of LabWatch that made it.");
        }

        return Manifest?.Files ?? [];
    }

    private void Take(BackupFile file, Stream stream)
    {
        progress?.Invoke(file.Path);
        string target = Path.Combine(data, file.Path);
        DurableFile.Write(stream, target);
        BackupFile found = DurableFile.Describe(target, file.Path);
        if (found != file)
        {
            Add(
                "backup-differs", FormattableString.Invariant($"{file.Path} is not what was backed up: {found.Bytes} bytes with SHA-256 {found.Sha256}; the manifest says {file.Bytes} bytes, {file.Sha256}."),
                file.Path, "Use another copy; this one was damaged or altered.");
        }
    }

    private void AddMissing(BackupFile file) => Add("backup-incomplete", $"{file.Path} is missing from the backup.", file.Path, "Use another copy; this one is not complete.");

    private void Add(string code, string message, string value, string cure) => _findings.Add(new Finding(code, "--from", message, value, cure));
}
