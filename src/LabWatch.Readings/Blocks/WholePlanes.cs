using System.Buffers;
using System.Numerics;

namespace LabWatch.Readings.Blocks;

/// <summary>
/// Whole numbers as what a predictor leaves, one plane a byte, low byte first. Predictors: 0 the base, 1 the number before, 2 the straight
/// line through the two before; the numbers before the first are the base.
/// </summary>
internal static class WholePlanes
{
    public static void Write(ByteWriter writer, ReadOnlySpan<long> wholes)
    {
        int predictor = Cheapest(wholes, out long centre);
        long origin = predictor == 0 || wholes.IsEmpty ? centre : wholes[0];
        ulong[] rest = ArrayPool<ulong>.Shared.Rent(Math.Max(1, wholes.Length));
        ulong all = Predict(wholes, predictor, origin, rest);
        int width = (71 - BitOperations.LeadingZeroCount(all)) / 8;
        writer.WriteByte((byte)predictor);
        writer.WriteByte((byte)width);
        writer.WriteSigned(origin);
        for (int plane = 0; plane < width; plane++)
        {
            Span<byte> bytes = writer.Take(wholes.Length);
            for (int i = 0; i < bytes.Length; i++)
            {
                bytes[i] = (byte)((rest[i] >> (plane * 8)) & 0xFF);
            }
        }

        ArrayPool<ulong>.Shared.Return(rest);
    }

    /// <summary>Reads the numbers and gives each divided by a power of ten. Sums wrap: only damaged bytes can make them.</summary>
    public static void Read(ref ByteReader reader, Span<double> values, double power)
    {
        int predictor = reader.ReadByte();
        int width = reader.ReadByte();
        long origin = reader.ReadSigned();
        if (predictor > 2 || width > 8)
        {
            throw new DamagedDataException("A column has an unknown predictor or width.");
        }

        ReadOnlySpan<byte> planes = reader.Take(checked(width * values.Length));
        if (predictor < 2 && width is 1 or 2)
        {
            ReadNarrow(planes, values, predictor, origin, power);
            return;
        }

        long before = origin;
        long beforeThat = origin;
        for (int i = 0; i < values.Length; i++)
        {
            ulong rest = 0;
            for (int plane = 0, at = i; plane < width; plane++, at += values.Length)
            {
                rest |= (ulong)planes[at] << (plane * 8);
            }

            long predicted = predictor switch { 0 => origin, 1 => before, _ => unchecked((2 * before) - beforeThat) };
            long whole = unchecked(predicted + Zigzag.Decode(rest));
            values[i] = whole / power;
            beforeThat = before;
            before = whole;
        }
    }

    // What nearly every column of telemetry is: one or two bytes a value, from the one before or from the middle.
    private static void ReadNarrow(ReadOnlySpan<byte> planes, Span<double> values, int predictor, long origin, double power)
    {
        ReadOnlySpan<byte> low = planes[..values.Length];
        ReadOnlySpan<byte> high = planes[values.Length..];
        long before = origin;
        for (int i = 0; i < values.Length; i++)
        {
            uint rest = high.IsEmpty ? low[i] : low[i] | ((uint)high[i] << 8);
            long difference = (rest >> 1) ^ -(long)(rest & 1);
            long whole = unchecked((predictor == 0 ? origin : before) + difference);
            values[i] = whole / power;
            before = whole;
        }
    }

    private static int Cheapest(ReadOnlySpan<long> wholes, out long centre)
    {
        double sum = 0;
        foreach (long whole in wholes)
        {
            sum += whole;
        }

        centre = wholes.IsEmpty ? 0 : (long)Math.Round(sum / wholes.Length);
        long constant = 0, first = 0, second = 0;
        for (int i = 2; i < wholes.Length; i++)
        {
            constant += Bits(wholes[i] - centre);
            first += Bits(wholes[i] - wholes[i - 1]);
            second += Bits(wholes[i] - (2 * wholes[i - 1]) + wholes[i - 2]);
        }

        return first <= constant && first <= second ? 1 : constant <= second ? 0 : 2;
    }

    private static int Bits(long value) => 64 - BitOperations.LeadingZeroCount(Zigzag.Encode(value));

    private static ulong Predict(ReadOnlySpan<long> wholes, int predictor, long origin, Span<ulong> rest)
    {
        ulong all = 0;
        long before = origin;
        long beforeThat = origin;
        for (int i = 0; i < wholes.Length; i++)
        {
            long predicted = predictor switch { 0 => origin, 1 => before, _ => (2 * before) - beforeThat };
            rest[i] = Zigzag.Encode(wholes[i] - predicted);
            all |= rest[i];
            beforeThat = before;
            before = wholes[i];
        }

        return all;
    }
}
