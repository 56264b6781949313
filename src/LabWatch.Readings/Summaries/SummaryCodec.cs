using System.IO.Compression;
using System.IO.Hashing;
using LabWatch.Lab.Time;
using LabWatch.Readings.Blocks;

namespace LabWatch.Readings.Summaries;

/// <summary>
/// The bytes of a summary: check sum, version, minutes a row, unfolded length, then one compressed stream. Summaries can be computed
/// again from the block at any time, so they are no part of its digest.
/// </summary>
internal static class SummaryCodec
{
    public const long Minute = 60 * Instant.MicrosecondsPerSecond;

    private const byte Version = 1;
    private const int MinutesAnHour = 60;
    private const int MaximumRawBytes = 1 << 26;

    /// <summary>Minutes are kept where they hold this many readings on average; otherwise the hour is.</summary>
    private const int ReadingsAMinute = 20;

    public static byte[] Encode(IReadOnlyList<ReadingSeries> series, long hour)
    {
        long readings = series.Sum(one => (long)one.Count);
        long minutes = series.Sum(one => 1 + ((one.TimeMicroseconds.Span[^1] - one.TimeMicroseconds.Span[0]) / Minute));
        int step = readings >= minutes * ReadingsAMinute ? 1 : MinutesAnHour;
        ByteWriter raw = new();
        raw.WriteVarint(series.Count);
        foreach (ReadingSeries one in series)
        {
            SummaryColumns.Write(raw, one, hour, step * Minute);
        }

        ByteWriter summary = new(raw.Length + 64);
        summary.WriteUInt32(0);
        summary.WriteByte(Version);
        summary.WriteVarint(step);
        summary.WriteVarint(raw.Length);
        Span<byte> target = summary.Take(BrotliEncoder.GetMaxCompressedLength(raw.Length));
        BrotliEncoder.TryCompress(raw.Written, target, out int written, BlockFormat.BrotliQuality, BlockFormat.BrotliWindow);
        summary.Drop(target.Length - written);
        byte[] bytes = summary.Written.ToArray();
        System.Buffers.Binary.BinaryPrimitives.WriteUInt32LittleEndian(bytes, Crc32.HashToUInt32(bytes.AsSpan(4)));
        return bytes;
    }

    /// <summary>Reads a summary. Throws <see cref="DamagedDataException"/> where it does not have its form.</summary>
    public static SealedSummary Decode(ReadOnlySpan<byte> bytes, long hour)
    {
        ByteReader reader = new(bytes);
        if (reader.ReadUInt32() != Crc32.HashToUInt32(bytes[reader.Position..]) || reader.ReadByte() != Version)
        {
            throw new DamagedDataException("The summary has a wrong check sum or version.");
        }

        int step = reader.ReadCount(MinutesAnHour);
        byte[] raw = new byte[reader.ReadCount(MaximumRawBytes)];
        if (step < 1 || !BrotliDecoder.TryDecompress(reader.Take(reader.Remaining), raw, out int written) || written != raw.Length)
        {
            throw new DamagedDataException("The summary does not unfold.");
        }

        ByteReader rows = new(raw);
        ChannelSummary[] channels = new ChannelSummary[rows.ReadCount(Math.Min(BlockFormat.MaximumChannels, rows.Remaining))];
        for (int i = 0; i < channels.Length; i++)
        {
            channels[i] = SummaryColumns.Read(ref rows, hour, step * Minute);
        }

        return new SealedSummary(step * Minute, channels);
    }
}
