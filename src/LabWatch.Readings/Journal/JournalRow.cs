using System.Buffers.Binary;
using System.IO.Hashing;
using LabWatch.Lab.Readings;
using LabWatch.Readings.Blocks;

namespace LabWatch.Readings.Journal;

/// <summary>
/// The bytes of one commit: check sum (over the commit number and all that follows), version, then a section a pack: source, count,
/// and for each reading channel number, change of time, quality, value.
/// </summary>
internal sealed class JournalRow
{
    private const byte Version = 1;
    private const int CheckSumBytes = 4;

    private readonly ByteWriter _writer = new(64 * 1024);
    private long _time;
    private int _countPosition;
    private uint _count;

    public int Length => _writer.Length;

    public void Begin()
    {
        _writer.Clear();
        _writer.WriteUInt32(0);
        _writer.WriteByte(Version);
        _time = 0;
        _count = 0;
        _countPosition = -1;
    }

    public void BeginPack(int source)
    {
        EndPack();
        _writer.WriteVarint(source);
        _countPosition = _writer.Length;
        _writer.WriteUInt32(0);
    }

    public void Add(int channel, long time, double value, ReadingQuality quality)
    {
        _writer.WriteVarint(channel);
        _writer.WriteSigned(unchecked(time - _time));
        _writer.WriteByte((byte)quality);
        _writer.WriteDouble(value);
        _time = time;
        _count++;
    }

    /// <summary>Finishes the row of a commit.</summary>
    public byte[] Finish(long change)
    {
        EndPack();
        byte[] row = _writer.Written.ToArray();
        BinaryPrimitives.WriteUInt32LittleEndian(row, CheckSum(change, row));
        return row;
    }

    /// <summary>Reads a row back. Throws <see cref="DamagedDataException"/> where it is not what was written.</summary>
    public static void Read(long change, ReadOnlySpan<byte> row, List<JournalReading> readings)
    {
        readings.Clear();
        ByteReader reader = new(row);
        if (reader.ReadUInt32() != CheckSum(change, row))
        {
            throw new DamagedDataException("The check sum of the journal row is wrong.");
        }

        if (reader.ReadByte() != Version)
        {
            throw new DamagedDataException("The journal row has an unknown version.");
        }

        long time = 0;
        while (reader.Remaining > 0)
        {
            int source = reader.ReadCount(int.MaxValue);
            uint count = reader.ReadUInt32();
            for (uint i = 0; i < count; i++)
            {
                int channel = reader.ReadCount(BlockFormat.MaximumChannels);
                time = unchecked(time + reader.ReadSigned());
                ReadingQuality quality = (ReadingQuality)reader.ReadByte();
                readings.Add(new JournalReading(source, channel, time, reader.ReadDouble(), quality));
            }
        }
    }

    private void EndPack()
    {
        if (_countPosition >= 0)
        {
            BinaryPrimitives.WriteUInt32LittleEndian(_writer.Buffer.AsSpan(_countPosition), _count);
        }

        _countPosition = -1;
        _count = 0;
    }

    private static uint CheckSum(long change, ReadOnlySpan<byte> row)
    {
        Crc32 sum = new();
        Span<byte> number = stackalloc byte[sizeof(long)];
        BinaryPrimitives.WriteInt64LittleEndian(number, change);
        sum.Append(number);
        sum.Append(row[CheckSumBytes..]);
        return sum.GetCurrentHashAsUInt32();
    }
}
