using System.Globalization;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Time;

namespace LabWatch.Benchmarks.Alerts;

/// <summary>
/// Hazard reading at the tap to hand-over to the webhook's HTTP client (journal flushed to disk in between): alone, while other packs stream at
/// full rate through the same tap, and that with a records database that fails or hangs.
/// <c>hazard [hazards a case, default 300] [milliseconds between them, default 20]</c>.
/// </summary>
internal static class HazardBenchmark
{
    public static async Task<int> RunAsync(string[] args)
    {
        int count = args.Length > 0 ? int.Parse(args[0], CultureInfo.InvariantCulture) : 300;
        TimeSpan pause = TimeSpan.FromMilliseconds(args.Length > 1 ? int.Parse(args[1], CultureInfo.InvariantCulture) : 20);
        Console.WriteLine("case                            median ms   99th ms   worst ms   other readings/s");
        await CaseAsync("alone", count, pause, load: false, LedgerBehaviour.Answers);
        await CaseAsync("packs at full rate", count, pause, load: true, LedgerBehaviour.Answers);
        await CaseAsync("full rate, database fails", count, pause, load: true, LedgerBehaviour.Fails);
        await CaseAsync("full rate, database hangs", count, pause, load: true, LedgerBehaviour.Hangs);
        return 0;
    }

    private static async Task CaseAsync(string name, int count, TimeSpan pause, bool load, LedgerBehaviour behaviour)
    {
        await using HazardBench bench = await HazardBench.StartAsync(count + 1, behaviour);
        using CancellationTokenSource stop = new();
        Task<double> stream = load ? Task.Factory.StartNew(() => Stream(bench, stop.Token), CancellationToken.None, TaskCreationOptions.LongRunning, TaskScheduler.Default) : Task.FromResult(0d);
        bench.Send(0);
        await bench.Handed(0);
        double[] milliseconds = new double[count];
        for (int i = 0; i < count; i++)
        {
            await Task.Delay(pause, TimeProvider.System);
            long start = TimeProvider.System.GetTimestamp();
            bench.Send(i + 1);
            long end = await bench.Handed(i + 1);
            milliseconds[i] = TimeProvider.System.GetElapsedTime(start, end).TotalMilliseconds;
        }

        await stop.CancelAsync();
        double rate = await stream;
        Array.Sort(milliseconds);
        Console.WriteLine(string.Create(
            CultureInfo.InvariantCulture,
            $"{name,-30} {milliseconds[count / 2],10:0.00} {milliseconds[(int)(count * 0.99)],9:0.00} {milliseconds[^1],10:0.00} {rate,18:0}"));
    }

    private static double Stream(HazardBench bench, CancellationToken stop)
    {
        SourceKey source = HazardBench.Source(HazardBench.Streaming);
        long start = TimeProvider.System.GetTimestamp();
        long readings = 0;
        while (!stop.IsCancellationRequested)
        {
            Instant now = Instant.Now(TimeProvider.System);
            Reading[] pack = new Reading[12];
            for (int i = 0; i < pack.Length; i++)
            {
                pack[i] = new Reading(i == 0 ? "case" : HazardBench.Wells[i], now, 25);
            }

            bench.Tap.OnPack(new ReadingPack(source, now, pack));
            readings += pack.Length;
        }

        return readings / TimeProvider.System.GetElapsedTime(start).TotalSeconds;
    }
}
