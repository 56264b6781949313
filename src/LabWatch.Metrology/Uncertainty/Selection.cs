namespace LabWatch.Metrology.Uncertainty;

/// <summary>The k-th smallest of unordered numbers without sorting them all (C. A. R. Hoare 1961, median of three).</summary>
internal static class Selection
{
    /// <summary>Reorders so that the element at an index is the one that would stand there after sorting, and gives it. No NaN.</summary>
    public static double Nth(Span<double> values, int index)
    {
        int low = 0;
        int high = values.Length - 1;
        while (high - low > 32)
        {
            double pivot = MedianOfThree(values[low], values[(int)(((uint)low + (uint)high) / 2)], values[high]);
            int i = low;
            int k = high;
            while (i <= k)
            {
                while (values[i] < pivot)
                {
                    i++;
                }

                while (values[k] > pivot)
                {
                    k--;
                }

                if (i <= k)
                {
                    (values[i], values[k]) = (values[k], values[i]);
                    i++;
                    k--;
                }
            }

            if (index <= k)
            {
                high = k;
            }
            else if (index >= i)
            {
                low = i;
            }
            else
            {
                return values[index];
            }
        }

        values[low..(high + 1)].Sort();
        return values[index];
    }

    private static double MedianOfThree(double a, double b, double c) => Math.Max(Math.Min(a, b), Math.Min(Math.Max(a, b), c));
}
