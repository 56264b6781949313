using System.Buffers;

namespace LabWatch.Assessments.Evaluation;

/// <summary>What a stretch of readings shows of its resolution and its noise, in the unit of the values.</summary>
internal static class ReadingNoise
{
    /// <summary>Median absolute value to standard deviation for normal values.</summary>
    private const double MedianToDeviation = 1.4826022185056018;

    /// <summary>
    /// The resolution as the readings show it: the smallest difference between two that differ; zero where all are equal, because then
    /// nothing shows it. Unrounded readings give a value that is negligibly small, as it should be.
    /// </summary>
    public static double SmallestStep(ReadOnlySpan<double> values)
    {
        double[] sorted = ArrayPool<double>.Shared.Rent(Math.Max(1, values.Length));
        values.CopyTo(sorted);
        Array.Sort(sorted, 0, values.Length);
        double smallest = double.PositiveInfinity;
        for (int i = 1; i < values.Length; i++)
        {
            double step = sorted[i] - sorted[i - 1];
            smallest = step > 0 ? Math.Min(smallest, step) : smallest;
        }

        ArrayPool<double>.Shared.Return(sorted);
        return double.IsFinite(smallest) ? smallest : 0;
    }

    /// <summary>
    /// Standard deviation of the white noise: from the median of the second differences, so that neither a ramp nor a step of the value
    /// counts (white noise of standard deviation s gives second differences of sqrt(6) s). NaN from fewer than 20 of them.
    /// </summary>
    /// <param name="values">Values in the order of time.</param>
    /// <param name="from">First index of a stretch that does not count.</param>
    /// <param name="until">First index after that stretch; as <paramref name="from"/> where everything counts.</param>
    public static double Deviation(ReadOnlySpan<double> values, int from, int until)
    {
        const int Least = 20;
        double[] differences = ArrayPool<double>.Shared.Rent(Math.Max(1, values.Length));
        int count = 0;
        for (int i = 1; i + 1 < values.Length; i++)
        {
            if (i + 1 < from || i - 1 >= until || from == until)
            {
                differences[count++] = Math.Abs(values[i - 1] - (2 * values[i]) + values[i + 1]);
            }
        }

        Array.Sort(differences, 0, count);
        double median = count < Least ? double.NaN : differences[count / 2];
        ArrayPool<double>.Shared.Return(differences);
        return MedianToDeviation * median / Math.Sqrt(6);
    }
}
