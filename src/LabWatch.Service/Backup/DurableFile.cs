using System.Security.Cryptography;

namespace LabWatch.Service.Backup;

/// <summary>Writes files so that they are on the disk when the call is over, and reads them back for their digest.</summary>
internal static class DurableFile
{
    private const int BufferBytes = 1 << 20;

    /// <summary>Copies a stream to a new file and forces it to the disk.</summary>
    public static void Write(Stream source, string target)
    {
        Directory.CreateDirectory(Path.GetDirectoryName(target)!);
        using FileStream file = new(target, FileMode.CreateNew, FileAccess.Write, FileShare.None, BufferBytes);
        source.CopyTo(file, BufferBytes);
        file.Flush(flushToDisk: true);
    }

    /// <summary>Length and digest of what the disk holds.</summary>
    public static BackupFile Describe(string path, string name)
    {
        using FileStream file = new(path, FileMode.Open, FileAccess.Read, FileShare.Read, BufferBytes);
        return new BackupFile(name, file.Length, Convert.ToHexStringLower(SHA256.HashData(file)));
    }

    /// <summary>Forces the content of a file that something else wrote to the disk.</summary>
    public static void Flush(string path)
    {
        using FileStream file = new(path, FileMode.Open, FileAccess.ReadWrite, FileShare.ReadWrite);
        file.Flush(flushToDisk: true);
    }
}
