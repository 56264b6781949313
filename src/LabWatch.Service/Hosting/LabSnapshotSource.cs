using LabWatch.Lab;
using LabWatch.Lab.Findings;
using LabWatch.Lab.LabFile;
using LabWatch.Records.Revisions;

namespace LabWatch.Service.Hosting;

/// <summary>
/// The snapshot in force. Its text is kept on disk beside the databases, so that hazards are watched from the first second even when no
/// database answers and the lab file is out of reach.
/// </summary>
internal sealed class LabSnapshotSource : ILabSnapshotSource, ILabInForce
{
    private readonly Lock _gate = new();
    private readonly string _cache;
    private LabInForce _inForce;

    private LabSnapshotSource(LabInForce inForce, string cache) => (_inForce, _cache) = (inForce, cache);

    /// <inheritdoc/>
    public event EventHandler? Changed;

    /// <inheritdoc/>
    public LabSnapshot Current => Volatile.Read(ref _inForce).Snapshot;

    /// <summary>The document in force, UTF-8.</summary>
    public ReadOnlyMemory<byte> Text => Volatile.Read(ref _inForce).Text;

    /// <summary>Number of the newest revision in force; 0 for a lab file that is not on record yet.</summary>
    public long Sequence => Volatile.Read(ref _inForce).Recorded?.Sequence ?? 0;

    /// <summary>A lab file that has still to be put on record; null where none has.</summary>
    public LabOrder? Pending { get; init; }

    /// <summary>Where the text in force is kept in a data directory.</summary>
    public static string CachePath(string dataDirectory) => Path.Combine(dataDirectory, "lab-in-force.json");

    /// <summary>A source of a document. It is not kept yet.</summary>
    public static (LabSnapshotSource? Source, IReadOnlyList<Finding> Findings) Of(ReadOnlyMemory<byte> text, string cache, LabOrder? pending = null)
    {
        (LabInForce? inForce, IReadOnlyList<Finding> findings) = LabInForce.Read(text);
        return (inForce is null ? null : new LabSnapshotSource(inForce, cache) { Pending = pending }, findings);
    }

    /// <inheritdoc/>
    public IReadOnlyList<Finding> Adopt(LabRecordSet records)
    {
        ArgumentNullException.ThrowIfNull(records);
        lock (_gate)
        {
            bool isKnown = records.Sequence < Sequence || (records.Sequence == Sequence && records.LatestImport?.Digest == _inForce.Recorded?.ImportDigest);
            if (isKnown || records.Compose() is not { } text)
            {
                return [];
            }

            (LabInForce? inForce, IReadOnlyList<Finding> findings) = LabInForce.Read(text);
            if (inForce is null)
            {
                return findings;
            }

            Volatile.Write(ref _inForce, inForce);
            Keep();
        }

        Changed?.Invoke(this, EventArgs.Empty);
        return [];
    }

    /// <summary>Keeps the text in force on disk, whole or not at all. The problem in words where it cannot be kept.</summary>
    public string? Keep()
    {
        string fresh = _cache + ".new";
        try
        {
            using (FileStream stream = new(fresh, FileMode.Create, FileAccess.Write, FileShare.None))
            {
                stream.Write(Text.Span);
                stream.Flush(flushToDisk: true);
            }

            File.Move(fresh, _cache, overwrite: true);
            return null;
        }
        catch (Exception exception) when (exception is IOException or UnauthorizedAccessException)
        {
            // The records have it; the next start reads them.
            return exception.Message;
        }
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
}
