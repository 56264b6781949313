using LabWatch.Lab.Time;
using LabWatch.Readings.Blocks;

namespace LabWatch.Readings.Summaries;

/// <summary>
/// The rows of one channel as columns: count, first, last, minimum, maximum, and either exact sums of whole numbers (where all values
/// lie on a decimal grid) or mean and squared deviations as they are.
/// </summary>
internal static class SummaryColumns
{
    private const byte Sums = 0;
    private const byte Moments = 1;
    private const int MaximumRows = 60;

    /// <summary>Whole numbers this far from the first, this many of them: their squares still add up exactly in a double.</summary>
    private const long MaximumOffset = 1 << 20;
    private const int MaximumCount = 1 << 12;

    public static void Write(ByteWriter writer, ReadingSeries series, long hour, long step)
    {
        List<ReadingSummary> rows = SummaryFold.Fold(series.TimeMicroseconds.Span, series.Values.Span, step);
        writer.WriteVarint(rows.Count);
        foreach (ReadingSummary row in rows)
        {
            writer.WriteByte((byte)((row.Start.Microseconds - hour) / step));
        }

        Column(writer, rows, row => row.Count);
        Column(writer, rows, row => row.First);
        Column(writer, rows, row => row.Last);
        Column(writer, rows, row => row.Minimum);
        Column(writer, rows, row => row.Maximum);
        if (TrySums(series, rows, step, out int exponent, out double[] sums, out double[] squares))
        {
            writer.WriteByte(Sums);
            writer.WriteByte((byte)exponent);
            ValueColumn.Write(writer, sums);
            ValueColumn.Write(writer, squares);
        }
        else
        {
            writer.WriteByte(Moments);
            Column(writer, rows, row => row.Mean);
            Column(writer, rows, row => row.SumOfSquaredDeviations);
        }
    }

    public static ChannelSummary Read(ref ByteReader reader, string channel, long hour, long step)
    {
        int count = reader.ReadCount(MaximumRows);
        ReadOnlySpan<byte> starts = reader.Take(count);
        double[][] columns = new double[7][];
        byte form = Moments;
        int exponent = 0;
        for (int i = 0; i < columns.Length; i++)
        {
            if (i == 5)
            {
                form = reader.ReadByte();
                exponent = form == Sums ? reader.ReadByte() : 0;
            }

            columns[i] = new double[count];
            ValueColumn.Read(ref reader, columns[i]);
        }

        if (form > Moments || exponent > DecimalGrid.MaximumExponent)
        {
            throw new DamagedDataException("The summary has an unknown form.");
        }

        ReadingSummary[] rows = new ReadingSummary[count];
        for (int i = 0; i < count; i++)
        {
            rows[i] = Row(hour + (starts[i] * step), columns, i, form == Sums ? DecimalGrid.Power(exponent) : 0);
        }

        return new ChannelSummary(channel, rows);
    }

    private static ReadingSummary Row(long start, double[][] columns, int i, double power)
    {
        double count = columns[0][i];
        if (!(count is >= 1 and <= BlockFormat.MaximumReadings))
        {
            throw new DamagedDataException("The summary has an empty row.");
        }

        double first = columns[1][i];
        double a = columns[5][i];
        double b = columns[6][i];
        double mean = power == 0 ? a : first + (a / count / power);
        double squares = power == 0 ? b : Math.Max(0, (b - (a * a / count)) / (power * power));
        return new ReadingSummary(new Instant(start), (int)count, first, columns[2][i], columns[3][i], columns[4][i], mean, squares);
    }

    private static bool TrySums(ReadingSeries series, List<ReadingSummary> rows, long step, out int exponent, out double[] sums, out double[] squares)
    {
        ReadOnlySpan<long> times = series.TimeMicroseconds.Span;
        ReadOnlySpan<double> values = series.Values.Span;
        exponent = DecimalGrid.Find(values, values.Length, out _);
        sums = new double[rows.Count];
        squares = new double[rows.Count];
        double power = DecimalGrid.Power(exponent);
        int row = -1;
        long first = 0;
        for (int i = 0; i < times.Length; i++)
        {
            if (double.IsNaN(values[i]))
            {
                continue;
            }

            if (!DecimalGrid.TryWhole(values[i], power, out long whole))
            {
                return false;
            }

            if (row < 0 || times[i] >= rows[row].Start.Microseconds + step)
            {
                row++;
                first = whole;
            }

            long offset = whole - first;
            if (offset is > MaximumOffset or < -MaximumOffset || rows[row].Count > MaximumCount)
            {
                return false;
            }

            sums[row] += offset;
            squares[row] += (double)offset * offset;
        }

        return true;
    }

    private static void Column(ByteWriter writer, List<ReadingSummary> rows, Func<ReadingSummary, double> select)
    {
        Span<double> values = stackalloc double[MaximumRows];
        for (int i = 0; i < rows.Count; i++)
        {
            values[i] = select(rows[i]);
        }

        ValueColumn.Write(writer, values[..rows.Count]);
    }
}
