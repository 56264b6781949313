namespace LabWatch.Metrology.Uncertainty;

/// <summary>Coverage intervals from the values of a Monte Carlo propagation, JCGM 101:2008, 7.7. The values are reordered.</summary>
internal static class CoverageInterval
{
    /// <summary>The probabilistically symmetric interval.</summary>
    public static (double Low, double High) Symmetric(Span<double> values, double probability)
    {
        int inside = Inside(values.Length, probability);
        int first = (values.Length - inside) / 2;
        double low = Selection.Nth(values, first);
        return (low, Selection.Nth(values[first..], inside));
    }

    /// <summary>The shortest interval.</summary>
    public static (double Low, double High) Shortest(Span<double> values, double probability)
    {
        values.Sort();
        int inside = Inside(values.Length, probability);
        int best = 0;
        for (int i = 1; i + inside < values.Length; i++)
        {
            if (values[i + inside] - values[i] < values[best + inside] - values[best])
            {
                best = i;
            }
        }

        return (values[best], values[best + inside]);
    }

    private static int Inside(int count, double probability) => Math.Min(count - 1, (int)((probability * count) + 0.5));
}
