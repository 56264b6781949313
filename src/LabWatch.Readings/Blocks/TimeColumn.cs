namespace LabWatch.Readings.Blocks;

/// <summary>Strictly rising times inside an hour: in the coarsest decimal unit that is exact, the change of the step from one to the next.</summary>
internal static class TimeColumn
{
    private const int MaximumUnitExponent = 6;

    public static void Write(ByteWriter writer, ReadOnlySpan<long> times, long hour)
    {
        int exponent = MaximumUnitExponent;
        long unit = 1_000_000;
        foreach (long time in times)
        {
            while ((time - hour) % unit != 0)
            {
                unit /= 10;
                exponent--;
            }
        }

        writer.WriteByte((byte)exponent);
        long before = 0;
        long step = 0;
        foreach (long time in times)
        {
            long offset = (time - hour) / unit;
            long nextStep = offset - before;
            writer.WriteSigned(nextStep - step);
            before = offset;
            step = nextStep;
        }
    }

    public static void Read(ref ByteReader reader, Span<long> times, long hour)
    {
        int exponent = reader.ReadByte();
        if (exponent > MaximumUnitExponent)
        {
            throw new DamagedDataException("A unit of time is out of range.");
        }

        long unit = (long)DecimalGrid.Power(exponent);
        long last = long.MinValue;
        long before = 0;
        long step = 0;
        for (int i = 0; i < times.Length; i++)
        {
            unchecked
            {
                step += reader.ReadSigned();
                before += step;
                times[i] = hour + (before * unit);
            }

            if (times[i] <= last || times[i] < hour || times[i] - hour >= Lab.Time.Instant.MicrosecondsPerHour)
            {
                throw new DamagedDataException("Times do not rise inside their hour.");
            }

            last = times[i];
        }
    }
}
