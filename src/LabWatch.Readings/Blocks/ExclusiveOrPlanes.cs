namespace LabWatch.Readings.Blocks;

/// <summary>Doubles as the exclusive-or of their bits with the value before (zero before the first), one plane a byte, planes of zeros left out.</summary>
internal static class ExclusiveOrPlanes
{
    public static void Write(ByteWriter writer, ReadOnlySpan<double> values)
    {
        ulong all = 0;
        ulong previous = 0;
        foreach (double value in values)
        {
            ulong bits = BitConverter.DoubleToUInt64Bits(value);
            all |= bits ^ previous;
            previous = bits;
        }

        byte mask = MaskOf(all);
        writer.WriteByte(mask);
        for (int plane = 0; plane < 8; plane++)
        {
            if ((mask & (1 << plane)) != 0)
            {
                WritePlane(writer.Take(values.Length), values, plane * 8);
            }
        }
    }

    public static void Read(ref ByteReader reader, Span<double> values)
    {
        byte mask = reader.ReadByte();
        values.Clear();
        for (int plane = 0; plane < 8; plane++)
        {
            if ((mask & (1 << plane)) == 0)
            {
                continue;
            }

            ReadOnlySpan<byte> bytes = reader.Take(values.Length);
            ulong running = 0;
            for (int i = 0; i < values.Length; i++)
            {
                running ^= bytes[i];
                values[i] = BitConverter.UInt64BitsToDouble(BitConverter.DoubleToUInt64Bits(values[i]) | (running << (plane * 8)));
            }
        }
    }

    private static byte MaskOf(ulong all)
    {
        int mask = 0;
        for (int plane = 0; plane < 8; plane++)
        {
            mask |= ((all >> (plane * 8)) & 0xFF) != 0 ? 1 << plane : 0;
        }

        return (byte)mask;
    }

    private static void WritePlane(Span<byte> plane, ReadOnlySpan<double> values, int shift)
    {
        byte previous = 0;
        for (int i = 0; i < values.Length; i++)
        {
            byte next = (byte)((BitConverter.DoubleToUInt64Bits(values[i]) >> shift) & 0xFF);
            plane[i] = (byte)(next ^ previous);
            previous = next;
        }
    }
}
