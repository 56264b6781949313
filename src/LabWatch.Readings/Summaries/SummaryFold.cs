using LabWatch.Lab.Time;

namespace LabWatch.Readings.Summaries;

/// <summary>Readings to summaries, and summaries to coarser ones.</summary>
internal static class SummaryFold
{
    /// <summary>
    /// Summaries of the values of a series in buckets aligned to the epoch; readings without a value are left out. Mean and squared
    /// deviations by Welford's update (Technometrics 4, 1962, 419-420).
    /// </summary>
    public static List<ReadingSummary> Fold(ReadOnlySpan<long> times, ReadOnlySpan<double> values, long bucket)
    {
        List<ReadingSummary> rows = [];
        ReadingSummary row = default;
        long end = long.MinValue;
        for (int i = 0; i < times.Length; i++)
        {
            if (double.IsNaN(values[i]))
            {
                continue;
            }

            if (times[i] >= end)
            {
                Close(rows, row);
                Instant start = new Instant(times[i]).Floor(bucket);
                end = start.Microseconds + bucket;
                row = new ReadingSummary(start, 0, values[i], values[i], values[i], values[i], 0, 0);
            }

            row = Add(row, values[i]);
        }

        Close(rows, row);
        return rows;
    }

    /// <summary>Merges rows in rising order into coarser buckets.</summary>
    public static List<ReadingSummary> Coarsen(IReadOnlyList<ReadingSummary> rows, long bucket)
    {
        List<ReadingSummary> merged = [];
        foreach (ReadingSummary row in rows)
        {
            Instant start = row.Start.Floor(bucket);
            if (merged.Count > 0 && merged[^1].Start == start)
            {
                merged[^1] = Merge(merged[^1], row);
            }
            else
            {
                merged.Add(row with { Start = start });
            }
        }

        return merged;
    }

    private static ReadingSummary Add(in ReadingSummary row, double value)
    {
        int count = row.Count + 1;
        double deviation = value - row.Mean;
        double mean = row.Mean + (deviation / count);
        return row with
        {
            Count = count,
            Last = value,
            Minimum = Math.Min(row.Minimum, value),
            Maximum = Math.Max(row.Maximum, value),
            Mean = mean,
            SumOfSquaredDeviations = row.SumOfSquaredDeviations + (deviation * (value - mean)),
        };
    }

    /// <summary>Pairwise update of Chan, Golub and LeVeque (The American Statistician 37, 1983, 242-247).</summary>
    private static ReadingSummary Merge(in ReadingSummary left, in ReadingSummary right)
    {
        double count = (double)left.Count + right.Count;
        double difference = right.Mean - left.Mean;
        return new ReadingSummary(
            left.Start,
            left.Count + right.Count,
            left.First,
            right.Last,
            Math.Min(left.Minimum, right.Minimum),
            Math.Max(left.Maximum, right.Maximum),
            left.Mean + (difference * right.Count / count),
            left.SumOfSquaredDeviations + right.SumOfSquaredDeviations + (difference * difference * left.Count * right.Count / count));
    }

    private static void Close(List<ReadingSummary> rows, in ReadingSummary row)
    {
        if (row.Count > 0)
        {
            rows.Add(row);
        }
    }
}
