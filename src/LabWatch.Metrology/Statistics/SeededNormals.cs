namespace LabWatch.Metrology.Statistics;

/// <summary>
/// The standard normal numbers of one fixed seed, drawn once and kept: every bootstrap uses the same ones from the first on, so drawing them anew each time
/// would give the same numbers for ten times the cost. Safe for several threads.
/// </summary>
internal static class SeededNormals
{
    private const ulong Seed = 0x5354_4142;
    private const int Step = 1 << 14;

    private static readonly Lock Gate = new();
    private static Xoshiro256 _random = new(Seed);
    private static volatile double[] _drawn = [];

    /// <summary>The first numbers of the sequence.</summary>
    public static ReadOnlySpan<double> First(int count)
    {
        double[] drawn = _drawn;
        return (drawn.Length >= count ? drawn : Extended(count)).AsSpan(0, count);
    }

    private static double[] Extended(int count)
    {
        lock (Gate)
        {
            int known = _drawn.Length;
            if (known < count)
            {
                double[] drawn = new double[(count + Step - 1) / Step * Step];
                _drawn.CopyTo(drawn, 0);
                for (int i = known; i < drawn.Length; i++) drawn[i] = _random.NextNormal();
                _drawn = drawn;
            }

            return _drawn;
        }
    }
}
