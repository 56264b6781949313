using System.Buffers.Binary;
using System.Text;

namespace LabWatch.Readings.Blocks;

/// <summary>Reads the primitive forms of the stored formats; every step is checked against the end of the bytes.</summary>
internal ref struct ByteReader(ReadOnlySpan<byte> bytes)
{
    private readonly ReadOnlySpan<byte> _bytes = bytes;
    private int _position;

    public readonly int Position => _position;

    public readonly int Remaining => _bytes.Length - _position;

    public ReadOnlySpan<byte> Take(int count)
    {
        if (count < 0 || count > Remaining)
        {
            throw new DamagedDataException("The bytes end too early.");
        }

        ReadOnlySpan<byte> span = _bytes.Slice(_position, count);
        _position += count;
        return span;
    }

    /// <summary>Passes over zero bytes, at most a number of them; gives how many there were.</summary>
    public int SkipZeros(int most)
    {
        ReadOnlySpan<byte> ahead = _bytes.Slice(_position, Math.Min(most, Remaining));
        int count = ahead.IndexOfAnyExcept((byte)0);
        count = count < 0 ? ahead.Length : count;
        _position += count;
        return count;
    }

    public byte ReadByte() => Take(1)[0];

    public uint ReadUInt32() => BinaryPrimitives.ReadUInt32LittleEndian(Take(4));

    public long ReadInt64() => BinaryPrimitives.ReadInt64LittleEndian(Take(8));

    public double ReadDouble() => BinaryPrimitives.ReadDoubleLittleEndian(Take(8));

    public ulong ReadVarint()
    {
        ulong value = 0;
        for (int shift = 0; shift < 64; shift += 7)
        {
            byte next = ReadByte();
            value |= (ulong)(next & 0x7F) << shift;
            if (next < 0x80)
            {
                return value;
            }
        }

        throw new DamagedDataException("A variable-length number is longer than ten bytes.");
    }

    public long ReadSigned() => Zigzag.Decode(ReadVarint());

    /// <summary>Reads a count or size and refuses one above a limit, so that damage cannot ask for memory.</summary>
    public int ReadCount(int limit)
    {
        ulong value = ReadVarint();
        return limit >= 0 && value <= (ulong)limit ? (int)value : throw new DamagedDataException("A count is beyond its limit.");
    }

    /// <summary>As <see cref="ReadCount"/> for numbers that need 64 bits.</summary>
    public long ReadLong(long limit)
    {
        ulong value = ReadVarint();
        return value <= (ulong)limit ? (long)value : throw new DamagedDataException("A number is beyond its limit.");
    }

    public string ReadText() => Encoding.UTF8.GetString(Take(ReadCount(BlockFormat.MaximumTextBytes)));
}
