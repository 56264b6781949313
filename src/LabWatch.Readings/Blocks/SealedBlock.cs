using System.IO.Hashing;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Readings;

namespace LabWatch.Readings.Blocks;

/// <summary>
/// A sealed block opened for reading: the check sum is verified and the directory read at once, a channel is unfolded when it is asked for.
/// Every failure is a <see cref="DamagedDataException"/>. Not thread-safe.
/// </summary>
internal sealed class SealedBlock
{
    private readonly BlockGroups _groups;
    private readonly (int Count, long Last)[] _timeColumns;
    private readonly long[]?[] _times;

    private SealedBlock(BlockHeader header, int readings, BlockGroups groups, (int Count, long Last)[] timeColumns, SealedChannel[] channels)
    {
        Header = header;
        Readings = readings;
        _groups = groups;
        _timeColumns = timeColumns;
        _times = new long[timeColumns.Length][];
        Channels = channels;
    }

    public BlockHeader Header { get; }

    public int Readings { get; }

    public IReadOnlyList<SealedChannel> Channels { get; }

    /// <summary>Opens a block; the bytes must not change afterwards.</summary>
    public static SealedBlock Open(ReadOnlyMemory<byte> data)
    {
        if (data.Length < BlockFormat.HeaderBytes + BlockFormat.CheckSumBytes)
        {
            throw new DamagedDataException("The block is shorter than its header.");
        }

        ReadOnlyMemory<byte> body = data[..^BlockFormat.CheckSumBytes];
        ByteReader end = new(data.Span[body.Length..]);
        if (end.ReadUInt32() != Crc32.HashToUInt32(body.Span))
        {
            throw new DamagedDataException("The check sum of the block is wrong.");
        }

        ByteReader reader = new(body.Span);
        if (reader.ReadUInt32() != BlockFormat.Magic || reader.ReadByte() != BlockFormat.Version)
        {
            throw new DamagedDataException("The block has an unknown form or version.");
        }

        reader.Take(3);
        long hour = reader.ReadInt64();
        uint part = reader.ReadUInt32();
        uint readings = reader.ReadUInt32();
        byte[] previous = reader.Take(BlockFormat.DigestBytes).ToArray();
        uint directoryBytes = reader.ReadUInt32();
        if (part > int.MaxValue || readings > BlockFormat.MaximumReadings || hour is < -BlockFormat.MaximumHour or > BlockFormat.MaximumHour || directoryBytes > (uint)reader.Remaining)
        {
            throw new DamagedDataException("The header of the block is out of range.");
        }

        ByteReader directory = new(reader.Take((int)directoryBytes));
        return ReadDirectory(ref directory, hour, (int)part, (int)readings, previous, body[reader.Position..]);
    }

    /// <summary>Number of a channel in <see cref="Channels"/>; -1 where the block does not have it.</summary>
    public int Find(string channel)
    {
        for (int i = 0; i < Channels.Count; i++)
        {
            if (string.Equals(Channels[i].Name, channel, StringComparison.Ordinal))
            {
                return i;
            }
        }

        return -1;
    }

    /// <summary>Time of the last reading of a channel, from the directory alone.</summary>
    public long LastTime(int channel) => _timeColumns[Channels[channel].TimeColumn].Last;

    /// <summary>Unfolds the readings of a channel.</summary>
    public ReadingSeries Decode(int channel)
    {
        SealedChannel place = Channels[channel];
        long[] times = Times(place.TimeColumn);
        double[] values = new double[times.Length];
        ReadingQuality[] qualities = new ReadingQuality[times.Length];
        ReadOnlySpan<byte> raw = _groups.Raw(place.Group);
        if (place.Offset > raw.Length)
        {
            throw new DamagedDataException("A channel lies outside its group.");
        }

        ByteReader reader = new(raw[place.Offset..]);
        ValueColumn.Read(ref reader, values);
        QualityRuns.Read(ref reader, qualities);
        return new ReadingSeries(place.Name, times, values, qualities);
    }

    private static SealedBlock ReadDirectory(
        ref ByteReader directory, long hour, int part, int readings, byte[] previous, ReadOnlyMemory<byte> groupBytes)
    {
        SourceKey source = new(directory.ReadText(), directory.ReadText());
        (int Count, long Last)[] timeColumns = new (int, long)[directory.ReadCount(Math.Min(BlockFormat.MaximumChannels, directory.Remaining))];
        long times = 0;
        for (int i = 0; i < timeColumns.Length; i++)
        {
            int count = directory.ReadCount(readings);
            timeColumns[i] = (count, hour + directory.ReadLong(Lab.Time.Instant.MicrosecondsPerHour));
            times += count;
        }

        BlockGroups groups = BlockGroups.Read(ref directory, groupBytes);
        if (times > groups.RawLength(0))
        {
            throw new DamagedDataException("The block counts more times than it holds.");
        }

        SealedChannel[] channels = new SealedChannel[directory.ReadCount(Math.Min(BlockFormat.MaximumChannels, directory.Remaining))];
        long total = 0;
        for (int i = 0; i < channels.Length; i++)
        {
            channels[i] = new SealedChannel(
                directory.ReadText(),
                directory.ReadCount(timeColumns.Length - 1),
                directory.ReadCount(groups.Count - 1),
                directory.ReadCount(BlockFormat.MaximumGroupBytes));
            total += timeColumns[channels[i].TimeColumn].Count;
        }

        return total == readings
            ? new SealedBlock(new BlockHeader(source, hour, part, previous), readings, groups, timeColumns, channels)
            : throw new DamagedDataException("The block does not hold the readings that it counts.");
    }

    private long[] Times(int column)
    {
        if (_times[column] is { } known)
        {
            return known;
        }

        ByteReader reader = new(_groups.Raw(0));
        for (int i = 0; i <= column; i++)
        {
            long[] times = _times[i] ?? new long[_timeColumns[i].Count];
            TimeColumn.Read(ref reader, times, Header.Hour);
            _times[i] = times;
        }

        return _times[column]!;
    }
}
