using System.Buffers;
using System.Buffers.Binary;
using System.Text;

namespace LabWatch.Intake.Spool;

/// <summary>Writes the fields of one spool record.</summary>
internal sealed class SpoolBodyWriter
{
    private readonly ArrayBufferWriter<byte> _bytes = new(512);

    public ReadOnlySpan<byte> Written => _bytes.WrittenSpan;

    public void Byte(byte value)
    {
        _bytes.GetSpan(1)[0] = value;
        _bytes.Advance(1);
    }

    public void Int32(int value)
    {
        BinaryPrimitives.WriteInt32LittleEndian(_bytes.GetSpan(sizeof(int)), value);
        _bytes.Advance(sizeof(int));
    }

    public void Int64(long value)
    {
        BinaryPrimitives.WriteInt64LittleEndian(_bytes.GetSpan(sizeof(long)), value);
        _bytes.Advance(sizeof(long));
    }

    public void Bytes(ReadOnlySpan<byte> value)
    {
        Int32(value.Length);
        _bytes.Write(value);
    }

    public void Text(string value)
    {
        int length = Encoding.UTF8.GetByteCount(value);
        Int32(length);
        Encoding.UTF8.GetBytes(value, _bytes.GetSpan(Math.Max(1, length)));
        _bytes.Advance(length);
    }
}
