namespace LabWatch.Simulator.Noise;

/// <summary>
/// Random numbers that are a pure function of (seed, stream, counter): the same moment always gives the same number, whatever came before.
/// Mixing function of SplitMix64 (Steele, Lea and Flood 2014, OOPSLA).
/// </summary>
internal static class CounterNoise
{
    /// <summary>64 well-mixed bits.</summary>
    public static ulong Bits(long seed, long stream, long counter)
    {
        unchecked
        {
            ulong state = Mix((ulong)seed + 0x9E3779B97F4A7C15UL);
            state = Mix(state ^ ((ulong)stream * 0xD1B54A32D192ED03UL));
            return Mix(state ^ ((ulong)counter * 0x9E3779B97F4A7C15UL));
        }
    }

    /// <summary>Uniform in (0, 1).</summary>
    public static double Uniform(long seed, long stream, long counter) => ((Bits(seed, stream, counter) >> 11) + 0.5) * (1.0 / (1UL << 53));

    /// <summary>Standard normal deviate (Box and Muller 1958), both uniforms from one counter.</summary>
    public static double Gaussian(long seed, long stream, long counter)
    {
        ulong bits = Bits(seed, stream, counter);
        double radius = ((bits >> 32) + 0.5) * (1.0 / 4294967296.0);
        double angle = (bits & uint.MaxValue) * (Math.Tau / 4294967296.0);
        return Math.Sqrt(-2 * Math.Log(radius)) * Math.Cos(angle);
    }

    /// <summary>A smooth random function of time with unit variance at its knots, which are <paramref name="spacing"/> counts apart (linear between them).</summary>
    public static double Slow(long seed, long stream, long counter, int spacing)
    {
        long knot = Math.DivRem(counter, spacing, out long rest);
        double share = (double)rest / spacing;
        return ((1 - share) * Gaussian(seed, stream, knot)) + (share * Gaussian(seed, stream, knot + 1));
    }

    /// <summary>A stream number for a name (FNV-1a, upper 62 bits), the same on every platform. The next few numbers are free for further streams of the name.</summary>
    public static long Stream(string name)
    {
        unchecked
        {
            ulong hash = 14695981039346656037UL;
            foreach (char letter in name)
            {
                hash = (hash ^ letter) * 1099511628211UL;
            }

            return (long)(hash >> 2);
        }
    }

    private static ulong Mix(ulong value)
    {
        unchecked
        {
            value = (value ^ (value >> 30)) * 0xBF58476D1CE4E5B9UL;
            value = (value ^ (value >> 27)) * 0x94D049BB133111EBUL;
            return value ^ (value >> 31);
        }
    }
}
