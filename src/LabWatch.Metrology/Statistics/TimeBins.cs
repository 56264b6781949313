namespace LabWatch.Metrology.Statistics;

/// <summary>
/// Means of irregular readings over a fixed grid of bins [k b, (k + 1) b) that is aligned to 1970-01-01T00:00:00Z, so that the bins of two windows, sources or
/// recomputations always coincide. Bins without a finite reading are left out, never filled.
/// </summary>
public static class TimeBins
{
    /// <summary>Start of the bin that holds a time, in microseconds since 1970-01-01T00:00:00Z.</summary>
    /// <param name="timeMicros">Time in microseconds; may be negative.</param>
    /// <param name="binMicros">Width of a bin in microseconds, positive.</param>
    public static long StartOf(long timeMicros, long binMicros)
    {
        long rest = timeMicros % binMicros;
        return timeMicros - (rest < 0 ? rest + binMicros : rest);
    }

    /// <summary>Computes the mean of each bin that holds at least one finite value.</summary>
    /// <param name="timesMicros">Times in microseconds since 1970-01-01T00:00:00Z, never falling.</param>
    /// <param name="values">One value a time; NaN and infinities are skipped.</param>
    /// <param name="binMicros">Width of a bin in microseconds, positive.</param>
    /// <param name="starts">Receives the starts of the bins, rising; as long as <paramref name="timesMicros"/> always suffices.</param>
    /// <param name="means">Receives the means; as long as <paramref name="starts"/>.</param>
    /// <returns>The number of bins written.</returns>
    /// <exception cref="ArgumentException">The spans differ in length, the width is not positive, or the times fall.</exception>
    public static int Means(ReadOnlySpan<long> timesMicros, ReadOnlySpan<double> values, long binMicros, Span<long> starts, Span<double> means)
    {
        if (timesMicros.Length != values.Length) throw new ArgumentException("One value for each time is needed.", nameof(values));
        ArgumentOutOfRangeException.ThrowIfNegativeOrZero(binMicros);
        int bins = 0, inBin = 0;
        long bin = long.MinValue;
        CompensatedSum sum = default;
        for (int i = 0; i < values.Length; i++)
        {
            if (!double.IsFinite(values[i])) continue;
            long start = StartOf(timesMicros[i], binMicros);
            if (start < bin) throw new ArgumentException("Times must not fall.", nameof(timesMicros));
            if (start > bin)
            {
                if (inBin > 0) means[bins - 1] = sum.Value / inBin;
                (bin, inBin, sum) = (start, 0, default);
                starts[bins++] = start;
            }

            sum.Add(values[i]);
            inBin++;
        }

        if (inBin > 0) means[bins - 1] = sum.Value / inBin;
        return bins;
    }
}
