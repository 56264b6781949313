using System.Buffers;

namespace LabWatch.Metrology.Statistics;

/// <summary>Medians.</summary>
public static class Median
{
    /// <summary>The median of the finite values; NaN without any.</summary>
    public static double Of(ReadOnlySpan<double> values)
    {
        double[] buffer = ArrayPool<double>.Shared.Rent(Math.Max(1, values.Length));
        int count = 0;
        foreach (double value in values)
        {
            if (double.IsFinite(value)) buffer[count++] = value;
        }

        double median = InPlace(buffer.AsSpan(0, count));
        ArrayPool<double>.Shared.Return(buffer);
        return median;
    }

    /// <summary>Sorts the values and gives their median; NaN without any.</summary>
    internal static double InPlace(Span<double> values)
    {
        values.Sort();
        int n = values.Length;
        return n == 0 ? double.NaN : n % 2 == 1 ? values[n / 2] : (values[n / 2 - 1] + values[n / 2]) / 2;
    }
}
