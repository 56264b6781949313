using System.Buffers.Binary;
using System.Security.Cryptography;
using System.Text;
using LabWatch.Lab.Readings;
using LabWatch.Readings;

namespace LabWatch.Assessments.Evaluation;

/// <summary>
/// SHA-256 over the canonical form of raw readings: what an assessment names as its evidence. The form is part of the stored format
/// (docs/reference/assessments.md): a head line, then for each channel in ordinal order its id, the number of its readings, and each
/// reading as time, value and quality; numbers big-endian, the value as IEEE 754 bits with one bit pattern for NaN.
/// </summary>
public static class ReadingsDigest
{
    private const int ReadingLength = 17;
    private const int ReadingsAtOnce = 240;
    private const long CanonicalNaN = 0x7FF8_0000_0000_0000;

    /// <summary>The digest, 64 small hexadecimal digits.</summary>
    public static string Of(ReadingWindow readings)
    {
        ArgumentNullException.ThrowIfNull(readings);
        using IncrementalHash hash = IncrementalHash.CreateHash(HashAlgorithmName.SHA256);
        Append(hash, $"labwatch-readings-1\n{readings.Source}\n");
        foreach (ReadingSeries series in readings.Series.OrderBy(series => series.Channel, StringComparer.Ordinal))
        {
            Append(hash, $"{series.Channel}\n");
            Append(hash, series);
        }

        return Convert.ToHexStringLower(hash.GetHashAndReset());
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
