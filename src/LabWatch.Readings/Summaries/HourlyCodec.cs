using System.IO.Hashing;
using LabWatch.Lab.Time;
using LabWatch.Readings.Blocks;

namespace LabWatch.Readings.Summaries;

/// <summary>
/// The hours of one channel in one day: a chart of years reads these instead of the summary of each hour. Check sum, version, count, hour of
/// the day of each row, then the columns count, first, last, minimum, maximum, mean, sum of squared deviations.
/// </summary>
internal static class HourlyCodec
{
    public const long Day = 24 * Instant.MicrosecondsPerHour;

    private const byte Version = 1;
    private const int Columns = 7;
    private const int HoursADay = 24;
    private const int CheckSumBytes = 4;

    public static byte[] Encode(IReadOnlyList<ReadingSummary> rows, long day)
    {
        ByteWriter writer = new();
        writer.WriteUInt32(0);
        writer.WriteByte(Version);
        writer.WriteVarint(rows.Count);
        foreach (ReadingSummary row in rows)
        {
            writer.WriteByte((byte)((row.Start.Microseconds - day) / Instant.MicrosecondsPerHour));
        }

        Span<double> values = stackalloc double[HoursADay];
        for (int column = 0; column < Columns; column++)
        {
            for (int i = 0; i < rows.Count; i++)
            {
                values[i] = Value(rows[i], column);
            }

            ValueColumn.Write(writer, values[..rows.Count]);
        }

        byte[] bytes = writer.Written.ToArray();
        System.Buffers.Binary.BinaryPrimitives.WriteUInt32LittleEndian(bytes, Crc32.HashToUInt32(bytes.AsSpan(CheckSumBytes)));
        return bytes;
    }

    /// <summary>The rows in order. Throws <see cref="DamagedDataException"/> where the bytes are not what was written.</summary>
    public static ReadingSummary[] Decode(ReadOnlySpan<byte> bytes, long day)
    {
        ByteReader reader = new(bytes);
        if (reader.ReadUInt32() != Crc32.HashToUInt32(bytes[CheckSumBytes..]) || reader.ReadByte() != Version)
        {
            throw new DamagedDataException("The hours of a day have a wrong check sum or version.");
        }

        int count = reader.ReadCount(HoursADay);
        ReadOnlySpan<byte> hours = reader.Take(count);
        double[] values = new double[Columns * HoursADay];
        for (int column = 0; column < Columns; column++)
        {
            ValueColumn.Read(ref reader, values.AsSpan(column * HoursADay, count));
        }

        ReadingSummary[] rows = new ReadingSummary[count];
        for (int i = 0; i < count; i++)
        {
            double readings = values[i];
            rows[i] = readings is >= 1 and <= BlockFormat.MaximumReadings
                ? new ReadingSummary(
                    new Instant(day + (hours[i] * Instant.MicrosecondsPerHour)), (int)readings, values[HoursADay + i], values[(2 * HoursADay) + i],
                    values[(3 * HoursADay) + i], values[(4 * HoursADay) + i], values[(5 * HoursADay) + i], values[(6 * HoursADay) + i])
                : throw new DamagedDataException("The hours of a day have an empty row.");
        }

        return rows;
    }

    private static double Value(in ReadingSummary row, int column) => column switch
    {
        0 => row.Count,
        1 => row.First,
        2 => row.Last,
        3 => row.Minimum,
        4 => row.Maximum,
        5 => row.Mean,
        _ => row.SumOfSquaredDeviations,
    };
}
