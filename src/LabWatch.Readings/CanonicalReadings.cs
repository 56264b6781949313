using System.Buffers.Binary;
using System.Security.Cryptography;
using System.Text;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Readings;

namespace LabWatch.Readings;

/// <summary>
/// The canonical form of raw readings, over which digests are taken; it is part of the stored format (docs/reference/assessments.md): a
/// head line, then for each channel in ordinal order its id, the number of its readings, and each reading as time, value and quality;
/// numbers big-endian, the value as IEEE 754 bits with one bit pattern for NaN.
/// </summary>
public static class CanonicalReadings
{
    private const int ReadingLength = 17;
    private const int ReadingsAtOnce = 240;
    private const long CanonicalNaN = 0x7FF8_0000_0000_0000;

    /// <summary>Appends the form of readings to a hash.</summary>
    public static void AppendTo(IncrementalHash hash, SourceKey source, IEnumerable<ReadingSeries> series)
    {
        ArgumentNullException.ThrowIfNull(hash);
        ArgumentNullException.ThrowIfNull(series);
        Append(hash, $"labwatch-readings-1\n{source}\n");
        foreach (ReadingSeries one in series.OrderBy(one => one.Channel, StringComparer.Ordinal))
        {
            Append(hash, $"{one.Channel}\n");
            Append(hash, one);
        }
    }

    private static void Append(IncrementalHash hash, string text) => hash.AppendData(Encoding.UTF8.GetBytes(text));

    private static void Append(IncrementalHash hash, ReadingSeries series)
    {
        ReadOnlySpan<long> times = series.TimeMicroseconds.Span;
        ReadOnlySpan<double> values = series.Values.Span;
        ReadOnlySpan<ReadingQuality> qualities = series.Qualities.Span;
        Span<byte> block = stackalloc byte[ReadingLength * ReadingsAtOnce];
        BinaryPrimitives.WriteInt32BigEndian(block, times.Length);
        hash.AppendData(block[..sizeof(int)]);
        int used = 0;
        for (int i = 0; i < times.Length; i++)
        {
            Span<byte> place = block.Slice(used, ReadingLength);
            BinaryPrimitives.WriteInt64BigEndian(place, times[i]);
            BinaryPrimitives.WriteInt64BigEndian(place[8..], double.IsNaN(values[i]) ? CanonicalNaN : BitConverter.DoubleToInt64Bits(values[i]));
            place[16] = (byte)qualities[i];
            used += ReadingLength;
            if (used == block.Length)
            {
                hash.AppendData(block);
                used = 0;
            }
        }

        hash.AppendData(block[..used]);
    }
}
