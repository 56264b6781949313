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
        ByteWriter columns = new();
        foreach (ReadingSeries one in series)
        {
            columns.Clear();
            SummaryColumns.Write(columns, one, hour, step * Minute);
            raw.WriteText(one.Channel);
            raw.WriteVarint(columns.Length);
            raw.WriteBytes(columns.Written);
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

    /// <summary>Length of a row in microseconds, without unfolding; 0 where the bytes are too short to say.</summary>
    public static long StepOf(ReadOnlySpan<byte> bytes) => bytes.Length > 5 ? bytes[5] * Minute : 0;

    /// <summary>Reads a summary. Throws <see cref="DamagedDataException"/> where it does not have its form.</summary>
    /// <param name="bytes">The bytes.</param>
    /// <param name="hour">Start of the hour.</param>
    /// <param name="only">The one channel to unfold; null for all.</param>
    public static SealedSummary Decode(ReadOnlySpan<byte> bytes, long hour, string? only = null)
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
        List<ChannelSummary> channels = [];
        for (int left = rows.ReadCount(BlockFormat.MaximumChannels); left > 0; left--)
        {
            string channel = rows.ReadText();
            ByteReader columns = new(rows.Take(rows.ReadCount(rows.Remaining)));
            if (only is null || string.Equals(only, channel, StringComparison.Ordinal))
            {
                channels.Add(SummaryColumns.Read(ref columns, channel, hour, step * Minute));
            }
        }

        return new SealedSummary(step * Minute, channels);
    }
}
