using System.Security.Cryptography;
using LabWatch.Lab;
using LabWatch.Lab.Findings;
using LabWatch.Lab.LabFile;

namespace LabWatch.Service.Hosting;

/// <summary>
/// The snapshot in force. Its text is kept on disk beside the databases, so that hazards are watched from the first second even when no
/// database answers and the lab file is out of reach.
/// </summary>
internal sealed class LabSnapshotSource : ILabSnapshotSource
{
    private LabSnapshot _current;

    private LabSnapshotSource(LabSnapshot snapshot, ReadOnlyMemory<byte> text)
    {
        _current = snapshot;
        Text = text;
    }

    /// <inheritdoc/>
    public event EventHandler? Changed;

    /// <inheritdoc/>
    public LabSnapshot Current => Volatile.Read(ref _current);

    /// <summary>The lab file that <see cref="Current"/> came from, UTF-8.</summary>
    public ReadOnlyMemory<byte> Text { get; private set; }

    /// <summary>SHA-256 of <see cref="Text"/>, small hexadecimal digits.</summary>
    public string Digest => Convert.ToHexStringLower(SHA256.HashData(Text.Span));

    /// <summary>Where the text in force is kept in a data directory.</summary>
    public static string CachePath(string dataDirectory) => Path.Combine(dataDirectory, "lab-in-force.json");

    /// <summary>Reads a lab file, or the one kept from the last start where none is named, and keeps it.</summary>
    /// <param name="labFile">Path of the lab file; null to go on with the one in force.</param>
    /// <param name="dataDirectory">The data directory.</param>
    public static (LabSnapshotSource? Source, IReadOnlyList<Finding> Findings) Load(string? labFile, string dataDirectory)
    {
        string cache = CachePath(dataDirectory);
        string path = labFile ?? cache;
        if (labFile is null && !File.Exists(cache))
        {
            return (null, [new Finding("no-lab-file", "--lab", "There is no lab file yet.", null, "Name one with --lab FILE; `labwatch demo` shows a lab without one.")]);
        }

        (ReadOnlyMemory<byte>? text, string? problem) = ReadFile(path);
        return text is { } known ? Adopt(known, cache) : (null, [Unreadable(path, problem)]);
    }

    /// <summary>Takes a lab file's text, and keeps it on disk where it is valid.</summary>
    public static (LabSnapshotSource? Source, IReadOnlyList<Finding> Findings) Adopt(ReadOnlyMemory<byte> text, string cache)
    {
        LabFileResult result = LabFileReader.Read(text);
        if (result.Snapshot is null)
        {
            return (null, result.Findings);
        }

        Keep(text, cache);
        return (new LabSnapshotSource(result.Snapshot, text), []);
    }

    /// <summary>Puts another valid snapshot in force.</summary>
    public void Replace(LabSnapshot snapshot, ReadOnlyMemory<byte> text)
    {
        Text = text;
        Volatile.Write(ref _current, snapshot);
        Changed?.Invoke(this, EventArgs.Empty);
    }

    /// <summary>Reads a whole file; the problem in words where it cannot be read.</summary>
    internal static (ReadOnlyMemory<byte>? Text, string? Problem) ReadFile(string path)
    {
        try
        {
            return new FileInfo(path) is { Exists: true, Length: > LabFileReader.MaximumLength }
                ? (null, "it is larger than 16 MiB")
                : (File.ReadAllBytes(path), null);
        }
        catch (Exception exception) when (exception is IOException or UnauthorizedAccessException)
        {
            return (null, exception.Message);
        }
    }

    /// <summary>The finding for a lab file that cannot be read.</summary>
    internal static Finding Unreadable(string path, string? problem) =>
        new("lab-file-unreadable", "--lab", "The lab file cannot be read: " + problem, path, "Check the path and the rights of the service's account.");

    private static void Keep(ReadOnlyMemory<byte> text, string cache)
    {
        string fresh = cache + ".new";
        using (FileStream stream = new(fresh, FileMode.Create, FileAccess.Write, FileShare.None))
        {
            stream.Write(text.Span);
            stream.Flush(flushToDisk: true);
        }

        File.Move(fresh, cache, overwrite: true);
    }
}
