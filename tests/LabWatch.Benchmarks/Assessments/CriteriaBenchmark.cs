using System.Diagnostics;
using System.Globalization;
using LabWatch.Assessments;
using LabWatch.Assessments.Evaluation;
using LabWatch.Lab.Assessments;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Time;
using LabWatch.Readings;
using Microsoft.Extensions.DependencyInjection;

namespace LabWatch.Benchmarks.Assessments;

/// <summary>
/// One cycle of all criteria: their newest window for each of many sources, readings each 10 s. First the evaluation alone on readings in
/// memory, then planner, store and records as the service joins them. Arguments: <c>[sources]</c> (200), or <c>history [days]</c> (1) for the demo's four
/// sources whose history is assessed from the beginning.
/// </summary>
internal static class CriteriaBenchmark
{
    public static async Task<int> RunAsync(string[] args)
    {
        if (args.Length > 0 && args[0] == "history")
        {
            await PlannerBench.HistoryAsync(args.Length > 1 ? int.Parse(args[1], CultureInfo.InvariantCulture) : 1);
            return 0;
        }

        int sources = args.Length > 0 ? int.Parse(args[0], CultureInfo.InvariantCulture) : 200;
        BenchSite site = BenchSite.Of(sources, BenchSite.Morning);
        TimeWindow span = new(BenchSite.Morning, BenchSite.Morning + TimeSpan.FromHours(3));
        // The longest criterion looks at a day; planner and store take the last hours, in which each criterion has a window.
        TimeWindow day = new(span.End - TimeSpan.FromHours(25), span.End);
        List<ReadingPack> all = [.. BenchSite.Packs(day.Start, day.Duration)];
        Evaluate(site, BenchSite.Windows(all, day), span.End);
        List<ReadingPack> packs = [.. all.Where(pack => span.Contains(pack.Arrival))];
        await PlannerBench.CycleAsync(site, packs, span);
        return 0;
    }

    /// <summary>The criteria as the service registers them.</summary>
    public static IReadOnlyList<ICriterion> Criteria()
    {
        using ServiceProvider provider = new ServiceCollection().AddLabWatchAssessments(new AssessmentsOptions()).BuildServiceProvider();
        return [.. provider.GetServices<ICriterion>()];
    }

    private static void Evaluate(BenchSite site, IReadOnlyDictionary<string, ReadingWindow> windows, Instant end)
    {
        double total = 0;
        foreach (ICriterion criterion in Criteria())
        {
            List<(WindowEvaluator Evaluator, ReadingWindow Readings)> work =
                [.. site.Snapshot.Sources.Select(source => (new WindowEvaluator(site.Snapshot, source.Key, criterion, "bench"), windows[site.Models[source.Key]] with { Source = source.Key }))];
            TimeWindow window = criterion.Schedule.EndingAt(criterion.Schedule.EndAtOrBefore(end));
            foreach ((WindowEvaluator evaluator, ReadingWindow readings) in work)
            {
                evaluator.Evaluate(window, readings, [], end);
            }

            GC.Collect();
            long bytes = GC.GetAllocatedBytesForCurrentThread();
            TimeSpan start = Process.GetCurrentProcess().TotalProcessorTime;
            List<Assessment> made = [.. work.SelectMany(item => item.Evaluator.Evaluate(window, item.Readings, [], end))];
            double milliseconds = (Process.GetCurrentProcess().TotalProcessorTime - start).TotalMilliseconds;
            bytes = GC.GetAllocatedBytesForCurrentThread() - bytes;
            total += milliseconds;
            Console.WriteLine(string.Create(CultureInfo.InvariantCulture,
                $"{criterion.Code}: {made.Count} assessments of {work.Count} sources, {made.Count(item => item.Decision is not LabWatch.Metrology.Uncertainty.Decision.NotDecided)} decided, {milliseconds:F0} ms of processor time, {bytes / 1e3 / work.Count:F0} kB allocated a source"));
        }

        Console.WriteLine(string.Create(CultureInfo.InvariantCulture, $"evaluation of all criteria for {site.Snapshot.Sources.Count} sources: {total:F0} ms of processor time"));
    }
}
