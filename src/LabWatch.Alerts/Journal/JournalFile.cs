using System.Buffers;

namespace LabWatch.Alerts.Journal;

/// <summary>
/// The alert journal as a file that is only ever appended to, flushed to the disk with every append, and replaced as a whole when it has
/// grown. The open file is the lock against a second service on the same folder. Not thread-safe.
/// </summary>
internal sealed class JournalFile : IAlertJournal, IDisposable
{
    /// <summary>Name of the file in the folder of the service's data.</summary>
    public const string FileName = "alerts.journal";

    // The journal itself can be read by others, for a backup; this file keeps a second writer away.
    private readonly FileStream _lock;
    private readonly string _path;
    private FileStream _stream;
    private long _sound;

    private JournalFile(string path, FileStream held, FileStream stream, long sound)
    {
        _lock = held;
        _path = path;
        _stream = stream;
        _sound = sound;
    }

    /// <inheritdoc/>
    public long Length => _sound;

    /// <summary>
    /// Opens or makes the journal of a folder and reads it. A damaged file is copied aside before anything is written; a torn last line is cut.
    /// </summary>
    /// <exception cref="IOException">Another service has it open, or the disk refuses.</exception>
    public static (JournalFile File, JournalContent Content, string? DamagedCopy) Open(string folder)
    {
        Directory.CreateDirectory(folder);
        string path = Path.Combine(folder, FileName);
        FileStream held = new(path + ".lock", FileMode.OpenOrCreate, FileAccess.ReadWrite, FileShare.None);
        FileStream? stream = null;
        try
        {
            stream = new FileStream(path, FileMode.OpenOrCreate, FileAccess.ReadWrite, FileShare.Read, bufferSize: 0);
            byte[] bytes = new byte[stream.Length];
            stream.ReadExactly(bytes);
            JournalContent content = JournalContent.Parse(bytes);
            string? copy = content.DamagedLines > 0 ? KeepAside(path, bytes) : null;
            JournalFile file = new(path, held, stream, content.SoundLength);
            if (content.SoundLength == 0)
            {
                file.Write(JournalLine.Header);
                FolderFlush.Flush(folder);
            }

            return (file, content, copy);
        }
        catch
        {
            stream?.Dispose();
            held.Dispose();
            throw;
        }
    }

    /// <inheritdoc/>
    public void Append(IReadOnlyList<JournalEntry> entries)
    {
        ArrayBufferWriter<byte> buffer = new();
        foreach (JournalEntry entry in entries)
        {
            JournalLine.Write(entry, buffer);
        }

        Write(buffer.WrittenSpan);
    }

    /// <inheritdoc/>
    public void Rewrite(IReadOnlyList<JournalEntry> entries)
    {
        ArrayBufferWriter<byte> buffer = new();
        buffer.Write(JournalLine.Header);
        foreach (JournalEntry entry in entries)
        {
            JournalLine.Write(entry, buffer);
        }

        string next = _path + ".new";
        using (FileStream stream = new(next, FileMode.Create, FileAccess.Write, FileShare.None, bufferSize: 0))
        {
            stream.Write(buffer.WrittenSpan);
            stream.Flush(flushToDisk: true);
        }

        // Windows replaces no file that is open, so the lock is let go for the moment of the exchange.
        _stream.Dispose();
        try
        {
            File.Move(next, _path, overwrite: true);
            _sound = buffer.WrittenCount;
            FolderFlush.Flush(Path.GetDirectoryName(_path)!);
        }
        finally
        {
            _stream = new FileStream(_path, FileMode.OpenOrCreate, FileAccess.ReadWrite, FileShare.Read, bufferSize: 0);
        }
    }

    /// <inheritdoc/>
    public void Dispose()
    {
        _stream.Dispose();
        _lock.Dispose();
    }

    // A write that failed half-way must not leave half a line before the next one.
    private void Write(ReadOnlySpan<byte> bytes)
    {
        if (_stream.Length != _sound)
        {
            _stream.SetLength(_sound);
        }

        _stream.Position = _sound;
        _stream.Write(bytes);
        _stream.Flush(flushToDisk: true);
        _sound += bytes.Length;
    }

    private static string KeepAside(string path, byte[] bytes)
    {
        for (int number = 1; ; number++)
        {
            string copy = $"{path}.damaged-{number}";
            try
            {
                using FileStream target = new(copy, FileMode.CreateNew, FileAccess.Write);
                target.Write(bytes);
                target.Flush(flushToDisk: true);
                return copy;
            }
            catch (IOException) when (File.Exists(copy))
            {
                // Kept from an earlier time: take the next number.
            }
        }
    }
}
