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
            if (step > 0 && reader.SkipZeros(times.Length - i) is > 0 and int run)
            {
                // Readings at even steps, which most are: no change of the step, one zero byte each.
                i = FillEven(times, i, run, ref before, step, unit, hour);
                last = times[i];
                continue;
            }

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

    private static int FillEven(Span<long> times, int from, int count, ref long before, long step, long unit, long hour)
    {
        // The last of them decides whether all lie in the hour; sums that wrap are far outside.
        Int128 end = ((Int128)before + ((Int128)step * count)) * unit;
        if (end >= Lab.Time.Instant.MicrosecondsPerHour || end < 0 || before < 0)
        {
            throw new DamagedDataException("Times do not rise inside their hour.");
        }

        long time = hour + (before * unit);
        long every = step * unit;
        foreach (ref long one in times.Slice(from, count))
        {
            time += every;
            one = time;
        }

        before += step * count;
        return from + count - 1;
    }
}
