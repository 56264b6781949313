using System.Buffers.Binary;
using System.Text;

namespace LabWatch.Readings.Blocks;

/// <summary>A growing buffer that writes the primitive forms of the stored formats; little-endian throughout.</summary>
internal sealed class ByteWriter(int capacity = 1024)
{
    private byte[] _buffer = new byte[capacity];

    public int Length { get; private set; }

    public byte[] Buffer => _buffer;

    public ReadOnlySpan<byte> Written => _buffer.AsSpan(0, Length);

    public void Clear() => Length = 0;

    /// <summary>Takes back the last bytes written.</summary>
    public void Drop(int count) => Length -= count;

    /// <summary>Reserves bytes and counts them as written; the span is only good until the next call.</summary>
    public Span<byte> Take(int count)
    {
        Ensure(count);
        Span<byte> span = _buffer.AsSpan(Length, count);
        Length += count;
        return span;
    }

    public void WriteByte(byte value)
    {
        Ensure(1);
        _buffer[Length++] = value;
    }

    public void WriteUInt32(uint value) => BinaryPrimitives.WriteUInt32LittleEndian(Take(4), value);

    public void WriteInt64(long value) => BinaryPrimitives.WriteInt64LittleEndian(Take(8), value);

    public void WriteDouble(double value) => BinaryPrimitives.WriteDoubleLittleEndian(Take(8), value);

    public void WriteBytes(ReadOnlySpan<byte> bytes) => bytes.CopyTo(Take(bytes.Length));

    /// <summary>Unsigned LEB128: seven bits a byte, low bits first, high bit set while more follow.</summary>
    public void WriteVarint(ulong value)
    {
        Ensure(10);
        while (value >= 0x80)
        {
            _buffer[Length++] = (byte)((value & 0x7F) | 0x80);
            value >>= 7;
        }

        _buffer[Length++] = (byte)value;
    }

    public void WriteVarint(int value) => WriteVarint((ulong)value);

    public void WriteSigned(long value) => WriteVarint(Zigzag.Encode(value));

    public void WriteText(string text)
    {
        int length = Encoding.UTF8.GetByteCount(text);
        WriteVarint(length);
        Encoding.UTF8.GetBytes(text, Take(length));
    }

    private void Ensure(int count)
    {
        if (_buffer.Length - Length < count)
        {
            Array.Resize(ref _buffer, Math.Max(_buffer.Length * 2, Length + count));
        }
    }
}
