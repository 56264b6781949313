namespace LabWatch.Readings.Blocks;

/// <summary>
/// Decimal numbers as whole numbers: a value lies on the grid of exponent e where the whole number n = round(value * 10^e) gives the very
/// same bits back as n / 10^e. Both operands are exact below 2^53 and 10^22, so the division rounds as reading the decimal text did.
/// </summary>
internal static class DecimalGrid
{
    public const int MaximumExponent = 12;

    private const double MaximumWhole = 9007199254740992.0;

    private static readonly double[] Powers = [1e0, 1e1, 1e2, 1e3, 1e4, 1e5, 1e6, 1e7, 1e8, 1e9, 1e10, 1e11, 1e12];

    public static double Power(int exponent) => Powers[exponent];

    /// <summary>Whether a value lies on the grid, and its whole number. NaN, infinities and negative zero never do.</summary>
    public static bool TryWhole(double value, double power, out long whole)
    {
        double rounded = Math.Round(value * power);
        if (!(Math.Abs(rounded) < MaximumWhole))
        {
            whole = 0;
            return false;
        }

        whole = (long)rounded;
        return BitConverter.DoubleToInt64Bits(whole / power) == BitConverter.DoubleToInt64Bits(value);
    }

    /// <summary>
    /// The smallest exponent whose grid holds all values but a few, and how many it does not hold; -1 where more than
    /// <paramref name="permitted"/> values lie on no grid.
    /// </summary>
    public static int Find(ReadOnlySpan<double> values, int permitted, out int exceptions)
    {
        int exponent = 0;
        exceptions = 0;
        foreach (double value in values)
        {
            if (TryWhole(value, Powers[exponent], out _))
            {
                continue;
            }

            int needed = FindAbove(value, exponent);
            if (needed >= 0)
            {
                exponent = needed;
            }
            else if (++exceptions > permitted)
            {
                return -1;
            }
        }

        return exponent;
    }

    private static int FindAbove(double value, int exponent)
    {
        if (!double.IsFinite(value))
        {
            return -1;
        }

        for (int e = exponent + 1; e <= MaximumExponent; e++)
        {
            if (TryWhole(value, Powers[e], out _))
            {
                return e;
            }
        }

        return -1;
    }
}
