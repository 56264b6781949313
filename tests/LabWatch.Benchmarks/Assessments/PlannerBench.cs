using System.Diagnostics;
using System.Globalization;
using LabWatch.Assessments;
using LabWatch.Assessments.Planning;
using LabWatch.Lab;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Time;
using LabWatch.Readings;
using LabWatch.Records;
using LabWatch.Records.Assessments;
using Microsoft.Extensions.DependencyInjection;
using Microsoft.Extensions.Logging.Abstractions;

namespace LabWatch.Benchmarks.Assessments;

/// <summary>Planner, store and records as the service joins them, on files in the temporary folder.</summary>
internal static class PlannerBench
{
    /// <summary>History of the demo's four sources, from nothing.</summary>
    public static async Task HistoryAsync(int days)
    {
        Instant start = BenchSite.Morning.Floor(86_400_000_000);
        BenchSite site = BenchSite.Of(4, start);
        await RunAsync(site, start + TimeSpan.FromDays(days) + TimeSpan.FromMinutes(2), async bench =>
        {
            foreach (ReadingPack[] packs in BenchSite.Packs(start, TimeSpan.FromDays(days)).Chunk(360))
            {
                await bench.Store.AppendAsync(packs, default);
            }

            await bench.MeasureAsync($"history of {days} days of 4 sources");
            bench.Clock.Now += TimeSpan.FromSeconds(61);
            await bench.MeasureAsync("the same hours, when quiet");
        });
    }

    /// <summary>The newest windows of many sources, everything before being assessed.</summary>
    public static async Task CycleAsync(BenchSite site, IReadOnlyList<ReadingPack> packs, TimeWindow span) =>
        await RunAsync(site, span.End - TimeSpan.FromMinutes(5), async bench =>
        {
            foreach (IGrouping<string, SourceKey> model in site.Models.GroupBy(pair => pair.Value, pair => pair.Key))
            {
                ReadingPack[] own = [.. packs.Where(pack => pack.Source.Source == model.Key)];
                foreach (SourceKey source in model)
                {
                    await bench.Store.AppendAsync([.. own.Select(pack => pack with { Source = source })], default);
                }
            }

            await bench.MeasureAsync($"catching up with {site.Snapshot.Sources.Count} sources");
            bench.Clock.Now += TimeSpan.FromSeconds(61);
            await bench.MeasureAsync("the same hours, when quiet");
            bench.Clock.Now = (span.End + TimeSpan.FromSeconds(31)).ToDateTimeOffset();
            await bench.MeasureAsync($"one cycle of {site.Snapshot.Sources.Count} sources");
        });

    private static async Task RunAsync(BenchSite site, Instant now, Func<Bench, Task> work)
    {
        string folder = Directory.CreateTempSubdirectory("labwatch-criteria-").FullName;
        BenchClock clock = new(now.ToDateTimeOffset());
        await using (ServiceProvider records = new ServiceCollection().AddLabWatchRecords(RecordsOptions.InDirectory(folder)).BuildServiceProvider())
        await using (SqliteReadingStore store = new(new ReadingsOptions { DataDirectory = folder }, clock, NullLogger<SqliteReadingStore>.Instance))
        {
            TimedStore timedStore = new(store);
            TimedLedger ledger = new(records.GetRequiredService<IAssessmentLedger>());
            await records.GetRequiredService<IAssessmentLedger>().LatestAsync(default);
            PlannerState state = new(clock);
            using Planner planner = new(
                timedStore, ledger, records.GetRequiredService<IPositionLedger>(), new Site(site.Snapshot), CriteriaBenchmark.Criteria(),
                new AssessmentsOptions { ProgramVersion = "bench" }, state, clock, NullLogger<Planner>.Instance);
            await work(new Bench(timedStore, ledger, planner, state, clock));
        }

        Microsoft.Data.Sqlite.SqliteConnection.ClearAllPools();
        Directory.Delete(folder, recursive: true);
    }

    private sealed record Bench(TimedStore Store, TimedLedger Ledger, Planner Planner, PlannerState State, BenchClock Clock)
    {
        public async Task MeasureAsync(string what)
        {
            Store.Reset();
            Ledger.Reset();
            long before = State.Current.Recorded, bytes = GC.GetTotalAllocatedBytes(), start = Stopwatch.GetTimestamp();
            TimeSpan processor = Process.GetCurrentProcess().TotalProcessorTime;
            while (await Planner.RunAsync(default))
            {
            }

            double seconds = Stopwatch.GetElapsedTime(start).TotalSeconds;
            processor = Process.GetCurrentProcess().TotalProcessorTime - processor;
            Console.WriteLine(string.Create(CultureInfo.InvariantCulture,
                $"{what}: {State.Current.Recorded - before} assessments, {seconds:F2} s, {processor.TotalSeconds:F2} s of processor time, {(GC.GetTotalAllocatedBytes() - bytes) / 1e6:F0} MB allocated, working set {Environment.WorkingSet / 1e6:F0} MB"));
            Console.WriteLine(string.Create(CultureInfo.InvariantCulture,
                $"    of that (summed over threads) ledger: look-ups {Ledger.Reading.TotalSeconds:F2} s, recording {Ledger.Recording.TotalSeconds:F2} s; store: {Store.Reads} reads {Store.Reading.TotalSeconds:F2} s, hours {Store.Hours.TotalSeconds:F2} s"));
            if (State.Current.LastError is { } error)
            {
                Console.WriteLine($"    error: {error}");
            }
        }
    }

    private sealed class Site(LabSnapshot snapshot) : ILabSnapshotSource
    {
        public LabSnapshot Current => snapshot;

        public event EventHandler? Changed
        {
            add { }
            remove { }
        }
    }
}
