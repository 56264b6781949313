using System.Buffers.Binary;
using System.IO.Hashing;
using Microsoft.Win32.SafeHandles;

namespace LabWatch.Readings.Journal;

/// <summary>
/// The number of the last commit, kept beside the database and written after each commit. It is not forced to the disk, so after a
/// loss of power it may be old, but it is never ahead of what was durable: a database that ends before it has lost commits.
/// </summary>
internal sealed class CommitMark : IDisposable
{
    private const int Bytes = 12;

    private readonly SafeFileHandle _lock;
    private readonly SafeFileHandle _file;
    private readonly byte[] _buffer = new byte[Bytes];

    /// <summary>
    /// Opens or makes the file, and takes the lock file beside it for this process alone. Throws <see cref="IOException"/> where another
    /// process has it.
    /// </summary>
    public CommitMark(string path)
    {
        _lock = File.OpenHandle(Path.ChangeExtension(path, ".lock"), FileMode.OpenOrCreate, FileAccess.ReadWrite, FileShare.None);
        try
        {
            _file = File.OpenHandle(path, FileMode.OpenOrCreate, FileAccess.ReadWrite, FileShare.ReadWrite | FileShare.Delete);
            Last = Read();
        }
        catch
        {
            _lock.Dispose();
            throw;
        }
    }

    /// <summary>The number found at opening or written since; 0 where there was none.</summary>
    public long Last { get; private set; }

    public void Write(long change)
    {
        BinaryPrimitives.WriteInt64LittleEndian(_buffer, change);
        BinaryPrimitives.WriteUInt32LittleEndian(_buffer.AsSpan(8), Crc32.HashToUInt32(_buffer.AsSpan(0, 8)));
        RandomAccess.Write(_file, _buffer, 0);
        Last = change;
    }

    public void Dispose()
    {
        _file.Dispose();
        _lock.Dispose();
    }

    private long Read()
    {
        Span<byte> bytes = stackalloc byte[Bytes];
        return RandomAccess.Read(_file, bytes, 0) == Bytes
            && BinaryPrimitives.ReadUInt32LittleEndian(bytes[8..]) == Crc32.HashToUInt32(bytes[..8])
            ? BinaryPrimitives.ReadInt64LittleEndian(bytes)
            : 0;
    }
}
