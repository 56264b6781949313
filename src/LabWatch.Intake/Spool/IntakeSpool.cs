using System.Buffers;
using System.Globalization;

namespace LabWatch.Intake.Spool;

/// <summary>
/// A bounded, synchronised queue on local disk for what the store could not take in time. Files are numbered in order; one is appended
/// to, the older ones are sealed and read from the oldest on, and removed when the store has their content. After a restart every file
/// found counts as sealed: entries may be read twice then, never lost, and the store takes a repeat as one. One writer and one reader.
/// </summary>
internal sealed class IntakeSpool : IDisposable
{
    private const string Extension = ".spool";
    private const int DamagedFilesKept = 8;
    private readonly Lock _lock = new();
    private readonly string _directory;
    private readonly long _limitBytes;
    private readonly long _fileBytes;
    private readonly SortedDictionary<long, long> _sealed = [];
    private readonly ArrayBufferWriter<byte> _buffer = new(64 << 10);
    private FileStream? _open;
    private long _openNumber;
    private long _entries;
    private long _bytes;
    private bool _empty = true;

    /// <summary>Opens the spool of a directory, made where it is missing. Throws <see cref="IOException"/> where it cannot be used.</summary>
    public IntakeSpool(string directory, long limitBytes, long fileBytes)
    {
        _directory = directory;
        _limitBytes = limitBytes;
        _fileBytes = fileBytes;
        Directory.CreateDirectory(directory);
        foreach (FileInfo file in new DirectoryInfo(directory).EnumerateFiles("*" + Extension))
        {
            if (long.TryParse(Path.GetFileNameWithoutExtension(file.Name), NumberStyles.None, CultureInfo.InvariantCulture, out long number))
            {
                _sealed.Add(number, file.Length);
                _openNumber = Math.Max(_openNumber, number);
            }
        }

        Publish();
    }

    /// <summary>Whether nothing waits to be moved to the store.</summary>
    /// <remarks>Never waits for a write in progress, as a disk may hang.</remarks>
    public bool IsEmpty => Volatile.Read(ref _empty);

    /// <summary>Bytes on disk. Never waits for a write in progress.</summary>
    public long Bytes => Volatile.Read(ref _bytes);

    /// <summary>Entries written since the start and not yet moved; those of an earlier run are not counted.</summary>
    public long Entries => Math.Max(0, Interlocked.Read(ref _entries));

    /// <summary>
    /// Appends entries and synchronises them: when this returns true they survive a crash. False where the bound would be exceeded;
    /// throws <see cref="IOException"/> where the disk fails, with nothing of the entries kept.
    /// </summary>
    public bool TryAppend(IReadOnlyList<SpoolEntry> entries)
    {
        lock (_lock)
        {
            _buffer.ResetWrittenCount();
            foreach (SpoolEntry entry in entries)
            {
                SpoolCodec.Write(_buffer, entry);
            }

            if (TotalBytes() + _buffer.WrittenCount > _limitBytes)
            {
                return false;
            }

            try
            {
                AppendBuffer();
            }
            finally
            {
                Publish();
            }

            Interlocked.Add(ref _entries, entries.Count);
            return true;
        }
    }

    /// <summary>Seals the file being written and reads the oldest one; null where the spool is empty.</summary>
    public SpoolChunk? ReadOldest()
    {
        string path;
        lock (_lock)
        {
            if (_sealed.Count == 0)
            {
                Seal();
            }

            if (_sealed.Count == 0)
            {
                return null;
            }

            path = PathOf(_sealed.Keys.First());
        }

        byte[] bytes = File.ReadAllBytes(path);
        return new SpoolChunk(path, bytes.Length, SpoolFile.Parse(bytes));
    }

    /// <summary>Removes a file whose intact entries the store has. A damaged one is set aside instead, up to eight of them.</summary>
    public void Remove(SpoolChunk chunk)
    {
        lock (_lock)
        {
            if (chunk.File.Damaged > 0)
            {
                SetAside(chunk.Path);
            }
            else
            {
                File.Delete(chunk.Path);
            }

            Forget(chunk.File.Entries.Count);
        }
    }

    /// <summary>Sets the oldest file aside because it cannot be read, so that the ones behind it are not held up. Returns its path.</summary>
    public string SetAsideOldest()
    {
        lock (_lock)
        {
            string path = PathOf(_sealed.Keys.First());
            SetAside(path);
            Forget(0);
            return path;
        }
    }

    /// <inheritdoc/>
    public void Dispose()
    {
        lock (_lock)
        {
            _open?.Dispose();
            _open = null;
        }
    }

    private void Forget(int entries)
    {
        _sealed.Remove(_sealed.Keys.First());
        Interlocked.Add(ref _entries, -entries);
        Publish();
        if (_empty)
        {
            Interlocked.Exchange(ref _entries, 0);
        }
    }

    private void Publish()
    {
        Volatile.Write(ref _bytes, TotalBytes());
        Volatile.Write(ref _empty, _sealed.Count == 0 && _open is null);
    }

    private void AppendBuffer()
    {
        FileStream file = _open ??= Create();
        long before = file.Length;
        try
        {
            file.Write(_buffer.WrittenSpan);
            file.Flush(flushToDisk: true);
        }
        catch (IOException)
        {
            // What is left of the write is cut off, so that it cannot come back; where even that fails the file is not used again and
            // its torn end is passed over when it is read.
            Seal();
            TryTruncate(_openNumber, before);
            throw;
        }

        if (file.Length >= _fileBytes)
        {
            Seal();
        }
    }

    private FileStream Create()
    {
        string path = PathOf(_openNumber + 1);
        var file = new FileStream(path, FileMode.CreateNew, FileAccess.Write, FileShare.Read, bufferSize: 0);
        try
        {
            file.Write(SpoolCodec.FileHeader);
            DirectoryFlush.Flush(_directory);
        }
        catch
        {
            file.Dispose();
            File.Delete(path);
            throw;
        }

        _openNumber++;
        return file;
    }

    private void Seal()
    {
        if (_open is { } file)
        {
            _sealed.Add(_openNumber, file.Length);
            file.Dispose();
            _open = null;
        }
    }

    private void TryTruncate(long number, long length)
    {
        try
        {
            using FileStream file = new(PathOf(number), FileMode.Open, FileAccess.Write);
            file.SetLength(length);
            _sealed[number] = length;
        }
        catch (IOException)
        {
            // The torn end stays; see AppendBuffer.
        }
    }

    private void SetAside(string path)
    {
        File.Move(path, path + ".damaged", overwrite: true);
        foreach (string old in Directory.EnumerateFiles(_directory, "*.damaged").Order(StringComparer.Ordinal).SkipLast(DamagedFilesKept).ToArray())
        {
            File.Delete(old);
        }
    }

    private long TotalBytes() => _sealed.Values.Sum() + (_open?.Length ?? 0);

    private string PathOf(long number) => Path.Combine(_directory, number.ToString("D16", CultureInfo.InvariantCulture) + Extension);
}
