namespace LabWatch.Metrology.Statistics;

/// <summary>Count, mean, standard deviation and extremes of a set of values, in the unit of the values.</summary>
/// <param name="Count">Number of finite values.</param>
/// <param name="Mean">Arithmetic mean; NaN without values.</param>
/// <param name="StandardDeviation">Sample standard deviation with n - 1; NaN for fewer than two values.</param>
/// <param name="Minimum">Smallest value; NaN without values.</param>
/// <param name="Maximum">Largest value; NaN without values.</param>
public readonly record struct Summary(int Count, double Mean, double StandardDeviation, double Minimum, double Maximum)
{
    /// <summary>Half of the difference between the largest and the smallest value; NaN without values.</summary>
    public double HalfRange => (Maximum - Minimum) / 2;

    /// <summary>Summarises the finite values; NaN and infinities are skipped. Two passes with compensated sums.</summary>
    /// <param name="values">The values, in any order.</param>
    public static Summary Of(ReadOnlySpan<double> values)
    {
        CompensatedSum sum = default;
        int count = 0;
        double min = double.PositiveInfinity, max = double.NegativeInfinity;
        foreach (double value in values)
        {
            if (!double.IsFinite(value)) continue;
            sum.Add(value);
            min = Math.Min(min, value);
            max = Math.Max(max, value);
            count++;
        }

        if (count == 0) return new Summary(0, double.NaN, double.NaN, double.NaN, double.NaN);
        double mean = sum.Value / count;
        return new Summary(count, mean, Deviation(values, mean, count), min, max);
    }

    private static double Deviation(ReadOnlySpan<double> values, double mean, int count)
    {
        if (count < 2) return double.NaN;
        CompensatedSum squares = default, rest = default;
        foreach (double value in values)
        {
            if (!double.IsFinite(value)) continue;
            double d = value - mean;
            squares.Add(d * d);
            rest.Add(d);
        }

        // The rest is the rounding of the mean; taking its square off makes the two-pass formula exact to the last digits.
        return Math.Sqrt(Math.Max(0, squares.Value - rest.Value * rest.Value / count) / (count - 1));
    }
}
