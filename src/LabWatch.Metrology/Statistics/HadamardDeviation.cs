namespace LabWatch.Metrology.Statistics;

/// <summary>
/// Deviations of complete, evenly spaced series that Allan's does not serve: Hadamard (blind to a steady drift) and total (more certain at long intervals).
/// NIST SP 1065, sections 5.2.6, 5.2.7 and 5.2.11. They need every value; NaN in a series gives NaN.
/// </summary>
public static class HadamardDeviation
{
    /// <summary>Hadamard deviation of means of m values that do not overlap.</summary>
    public static double NonOverlapping(ReadOnlySpan<double> values, int m) => Run(values, m, m);

    /// <summary>Hadamard deviation of overlapping means of m values.</summary>
    public static double Overlapping(ReadOnlySpan<double> values, int m) => Run(values, m, 1);

    /// <summary>Total deviation: the series is continued by its mirror image at both ends.</summary>
    public static double Total(ReadOnlySpan<double> values, int m)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(m, 1);
        double[] phase = Phase(values);
        int n = phase.Length;
        if (m > n - 2) return double.NaN;
        double squares = 0;
        for (int i = 1; i < n - 1; i++)
        {
            double second = Reflected(phase, i - m) - 2 * phase[i] + Reflected(phase, i + m);
            squares += second * second;
        }

        return Math.Sqrt(squares / (2.0 * m * m * (n - 2)));
    }

    private static double Run(ReadOnlySpan<double> values, int m, int step)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(m, 1);
        double[] phase = Phase(values);
        double squares = 0;
        int count = 0;
        for (int i = 0; i + 3 * m < phase.Length; i += step)
        {
            double third = phase[i + 3 * m] - 3 * phase[i + 2 * m] + 3 * phase[i + m] - phase[i];
            squares += third * third;
            count++;
        }

        return count > 0 ? Math.Sqrt(squares / (6.0 * count)) / m : double.NaN;
    }

    /// <summary>Running sum of the values about their mean.</summary>
    private static double[] Phase(ReadOnlySpan<double> values)
    {
        double mean = Summary.Of(values).Mean;
        double[] phase = new double[values.Length + 1];
        CompensatedSum sum = default;
        for (int i = 0; i < values.Length; i++)
        {
            sum.Add(values[i] - mean);
            phase[i + 1] = sum.Value;
        }

        return phase;
    }

    private static double Reflected(double[] phase, int i)
    {
        int last = phase.Length - 1;
        return i < 0 ? 2 * phase[0] - phase[-i] : i > last ? 2 * phase[last] - phase[2 * last - i] : phase[i];
    }
}
