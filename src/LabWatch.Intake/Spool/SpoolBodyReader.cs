using System.Buffers.Binary;
using System.Text;

namespace LabWatch.Intake.Spool;

/// <summary>Reads the fields of one spool record. What does not fit sets <see cref="Failed"/> and gives empty values; it never throws.</summary>
internal ref struct SpoolBodyReader(ReadOnlySpan<byte> bytes)
{
    /// <summary>Bytes of an empty text.</summary>
    public const int ShortestText = sizeof(int);

    /// <summary>Bytes of one reading.</summary>
    public const int ReadingLength = sizeof(int) + sizeof(long) + sizeof(long) + 1;

    /// <summary>Bytes of a finding of empty texts.</summary>
    public const int ShortestFinding = (5 * ShortestText) + 1;

    private ReadOnlySpan<byte> _rest = bytes;

    public bool Failed { get; private set; }

    public byte Byte()
    {
        ReadOnlySpan<byte> taken = Take(1);
        return taken.IsEmpty ? (byte)0 : taken[0];
    }

    public long Int64()
    {
        ReadOnlySpan<byte> taken = Take(sizeof(long));
        return taken.IsEmpty ? 0 : BinaryPrimitives.ReadInt64LittleEndian(taken);
    }

    public ReadOnlySpan<byte> Bytes() => Take(Int32());

    public string Text() => Encoding.UTF8.GetString(Bytes());

    /// <summary>A count of items that need at least a number of bytes each: never more than the bytes left can hold.</summary>
    public int Count(int shortestItem)
    {
        int count = Int32();
        if (count < 0 || count > _rest.Length / shortestItem)
        {
            Failed = true;
            return 0;
        }

        return count;
    }

    /// <summary>The text of an index.</summary>
    public string Pick(string[] texts)
    {
        int index = Int32();
        if (index >= 0 && index < texts.Length)
        {
            return texts[index];
        }

        Failed = true;
        return string.Empty;
    }

    private int Int32()
    {
        ReadOnlySpan<byte> taken = Take(sizeof(int));
        return taken.IsEmpty ? 0 : BinaryPrimitives.ReadInt32LittleEndian(taken);
    }

    private ReadOnlySpan<byte> Take(int length)
    {
        if (length < 0 || length > _rest.Length)
        {
            Failed = true;
            _rest = default;
            return default;
        }

        ReadOnlySpan<byte> taken = _rest[..length];
        _rest = _rest[length..];
        return taken;
    }
}
