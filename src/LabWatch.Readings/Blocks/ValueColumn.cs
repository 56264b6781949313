using System.Buffers;

namespace LabWatch.Readings.Blocks;

/// <summary>A column of doubles, bit for bit: whole numbers of a decimal grid where they are exact, else exclusive-or with the value before.</summary>
internal static class ValueColumn
{
    private const byte Scaled = 0;
    private const byte ExclusiveOr = 1;

    /// <summary>One value in this many may lie off the grid before the column is taken as not decimal.</summary>
    private const int ExceptionShare = 16;

    public static void Write(ByteWriter writer, ReadOnlySpan<double> values)
    {
        int exponent = DecimalGrid.Find(values, values.Length / ExceptionShare, out int exceptions);
        if (exponent < 0)
        {
            writer.WriteByte(ExclusiveOr);
            ExclusiveOrPlanes.Write(writer, values);
            return;
        }

        long[] wholes = ArrayPool<long>.Shared.Rent(values.Length);
        writer.WriteByte(Scaled);
        writer.WriteByte((byte)exponent);
        WriteExceptions(writer, values, exponent, exceptions, wholes.AsSpan(0, values.Length));
        WholePlanes.Write(writer, wholes.AsSpan(0, values.Length));
        ArrayPool<long>.Shared.Return(wholes);
    }

    public static void Read(ref ByteReader reader, Span<double> values)
    {
        switch (reader.ReadByte())
        {
            case Scaled:
                ReadScaled(ref reader, values);
                break;
            case ExclusiveOr:
                ExclusiveOrPlanes.Read(ref reader, values);
                break;
            default:
                throw new DamagedDataException("A column has an unknown encoding.");
        }
    }

    private static void WriteExceptions(ByteWriter writer, ReadOnlySpan<double> values, int exponent, int exceptions, Span<long> wholes)
    {
        double power = DecimalGrid.Power(exponent);
        writer.WriteVarint(exceptions);
        int previous = 0;
        long last = FirstWhole(values, power);
        for (int i = 0; i < values.Length; i++)
        {
            if (DecimalGrid.TryWhole(values[i], power, out long whole))
            {
                last = whole;
            }
            else
            {
                writer.WriteVarint(i - previous);
                writer.WriteDouble(values[i]);
                previous = i;
            }

            wholes[i] = last;
        }
    }

    private static long FirstWhole(ReadOnlySpan<double> values, double power)
    {
        foreach (double value in values)
        {
            if (DecimalGrid.TryWhole(value, power, out long whole))
            {
                return whole;
            }
        }

        return 0;
    }

    private static void ReadScaled(ref ByteReader reader, Span<double> values)
    {
        int exponent = reader.ReadByte();
        if (exponent > DecimalGrid.MaximumExponent)
        {
            throw new DamagedDataException("A decimal exponent is out of range.");
        }

        int exceptions = reader.ReadCount(values.Length);
        ByteReader exceptionReader = reader;
        for (int i = 0; i < exceptions; i++)
        {
            reader.ReadVarint();
            reader.Take(sizeof(double));
        }

        WholePlanes.Read(ref reader, values, DecimalGrid.Power(exponent));
        int index = 0;
        for (int i = 0; i < exceptions; i++)
        {
            index += exceptionReader.ReadCount(values.Length);
            if (index >= values.Length)
            {
                throw new DamagedDataException("An exception lies outside its column.");
            }

            values[index] = exceptionReader.ReadDouble();
        }
    }
}
