using System.Buffers;

namespace LabWatch.Metrology.Statistics;

/// <summary>
/// Spikes by the Hampel identifier: a value is an outlier that lies more than a number of scaled median absolute deviations from the median of the values around it
/// (F. R. Hampel, J. Am. Stat. Assoc. 69 (1974) 383-393; L. Davies and U. Gather, ibid. 88 (1993) 782-792).
/// </summary>
public static class HampelFilter
{
    /// <summary>Median absolute deviation to standard deviation for normal values.</summary>
    private const double Scale = 1.4826022185056018;

    /// <summary>Marks the outliers.</summary>
    /// <param name="values">Values in the order of time; NaN is skipped and never an outlier.</param>
    /// <param name="halfWidth">Number of neighbours on each side, at least 1; fewer at the ends.</param>
    /// <param name="threshold">Number of standard deviations, 3 by custom.</param>
    /// <param name="resolution">Smallest standard deviation to assume, as where a sensor's last digit hides its noise; 0 or more.</param>
    /// <param name="outliers">Receives one mark a value.</param>
    /// <returns>The number of outliers.</returns>
    public static int Find(ReadOnlySpan<double> values, int halfWidth, double threshold, double resolution, Span<bool> outliers)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(halfWidth, 1);
        double[] buffer = ArrayPool<double>.Shared.Rent(2 * halfWidth + 1);
        int found = 0;
        for (int i = 0; i < values.Length; i++)
        {
            outliers[i] = false;
            if (!double.IsFinite(values[i]) || IsNear(values, i, halfWidth, threshold * resolution)) continue;
            int count = 0;
            for (int j = Math.Max(0, i - halfWidth); j <= Math.Min(values.Length - 1, i + halfWidth); j++)
            {
                if (double.IsFinite(values[j])) buffer[count++] = values[j];
            }

            Span<double> window = buffer.AsSpan(0, count);
            double median = Median.InPlace(window);
            foreach (ref double value in window) value = Math.Abs(value - median);
            double sigma = Math.Max(resolution, Scale * Median.InPlace(window));
            if (count < 3 || Math.Abs(values[i] - median) <= threshold * sigma) continue;
            outliers[i] = true;
            found++;
        }

        ArrayPool<double>.Shared.Return(buffer);
        return found;
    }

    /// <summary>
    /// Whether all neighbours lie so near to a value that their median must, too: then it is no outlier, whatever their deviations are. That settles nearly all
    /// values without sorting.
    /// </summary>
    private static bool IsNear(ReadOnlySpan<double> values, int index, int halfWidth, double distance)
    {
        double value = values[index];
        foreach (double other in values[Math.Max(0, index - halfWidth)..Math.Min(values.Length, index + halfWidth + 1)])
        {
            if (Math.Abs(other - value) > distance) return false;
        }

        return true;
    }
}
