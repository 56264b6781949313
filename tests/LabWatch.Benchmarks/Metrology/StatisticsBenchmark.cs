using System.Diagnostics;
using LabWatch.Metrology.Statistics;

namespace LabWatch.Benchmarks.Metrology;

/// <summary>Statistics of the assessments: a 30 min window, the Allan deviation of a day at 1 Hz at all octaves, a trend of a year of daily values. No arguments.</summary>
internal static class StatisticsBenchmark
{
    public static int Run(string[] args)
    {
        var random = new Random(1);
        double[] day = [.. Enumerable.Range(0, 86_400).Select(_ => random.NextDouble())];
        double[] gapped = [.. day.Select((value, i) => i % 500 < 20 ? double.NaN : value)];
        long[] times = [.. Enumerable.Range(0, 1800).Select(i => 1_764_547_200_000_000 + i * 1_000_000L)];
        long[] days = [.. Enumerable.Range(0, 365).Select(i => 1_764_547_200_000_000 + i * 86_400_000_000L)];
        Report("stability of 30 min at 1 Hz", () => Stability.Evaluate(times, day.AsSpan(0, 1800)).HalfRange.Value);
        Report("Allan deviation of a day at 1 Hz, all octaves", () => Octaves(day));
        Report("the same with gaps", () => Octaves(gapped));
        Report("overlapping and modified, all octaves", () => AllanDeviation.Octaves(day).Count);
        Report("Theil-Sen with Mann-Kendall, 365 values", () => TheilSenTrend.Of(days, day.AsSpan(0, 365), 0).SlopePerDay);
        return 0;
    }

    private static double Octaves(double[] values) => AllanDeviation.OverlappingOctaves(values).Count;

    private static void Report(string name, Func<double> run)
    {
        run();
        double best = double.PositiveInfinity;
        for (int i = 0; i < 20; i++)
        {
            long start = Stopwatch.GetTimestamp();
            run();
            best = Math.Min(best, Stopwatch.GetElapsedTime(start).TotalMilliseconds);
        }

        Console.WriteLine(FormattableString.Invariant($"{name}: {best:F2} ms"));
    }
}
