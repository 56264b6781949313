using System.Diagnostics;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Time;
using LabWatch.Readings;
using LabWatch.Readings.Blocks;
using LabWatch.Simulator;

namespace LabWatch.Benchmarks.Simulator;

/// <summary>
/// The demo lab without a broker: processor time for days of physics, with and without their packs, and bytes a reading in sealed blocks (block alone,
/// without the database around it). Argument: days, 3 by default.
/// </summary>
internal static class SimulatorBenchmark
{
    public static int Run(string[] args)
    {
        int days = args.Length > 0 ? int.Parse(args[0], System.Globalization.CultureInfo.InvariantCulture) : 3;
        Instant start = Instant.From(new DateTimeOffset(2026, 11, 30, 0, 0, 0, TimeSpan.Zero));
        LabSimulation lab = new(1, start);
        double physics = Processor(() => lab.AdvanceTo(lab.Second + (days * 86400L)));
        SenmlWriter writer = new(DemoLab.Designs);
        long packs = 0;
        long bytes = 0;
        double history = Processor(() =>
        {
            for (int i = 0; i < days * 8640; i++)
            {
                lab.Produce(lab.Second + 10, writer, (_, pack) =>
                {
                    packs++;
                    bytes += pack.Length;
                });
            }
        });
        Console.WriteLine(FormattableString.Invariant($"{days} days of four sources: physics alone {physics:F2} s of processor time, with a pack each 10 s {history:F2} s"));
        Console.WriteLine(FormattableString.Invariant($"30 days of history: {history / days * 30:F1} s of processor time; {1e6 * history / packs:F1} us and {(double)bytes / packs:F0} bytes a pack"));
        Blocks("a pack each 10 s, one day", start, hours: 24, step: 10);
        Blocks("a pack each second, four working hours", start + TimeSpan.FromHours(8), hours: 4, step: 1);
        return 0;
    }

    private static void Blocks(string name, Instant start, int hours, int step)
    {
        foreach (string source in LabSimulation.SourceIds)
        {
            (long bytes, long readings) = (0, 0);
            LabSimulation own = new(1, start);
            for (int hour = 0; hour < hours; hour++)
            {
                Instant from = own.Now;
                List<ReadingSeries> series = Hour(own, source, step);
                bytes += new BlockEncoder().Encode(new BlockHeader(new SourceKey(DemoLab.Site, source), from.Microseconds, 0, new byte[32]), series).Length;
                readings += series.Sum(one => one.Count);
            }

            Console.WriteLine(FormattableString.Invariant($"{name}, {source}: {(double)bytes / readings:F2} bytes a reading"));
        }
    }

    private static List<ReadingSeries> Hour(LabSimulation lab, string source, int step)
    {
        Dictionary<string, (List<long> Times, List<double> Values)> columns = new(StringComparer.Ordinal);
        for (int i = 0; i < 3600 / step; i++)
        {
            foreach (SimulatedReading reading in lab.Read(source))
            {
                if (!columns.TryGetValue(reading.Channel, out (List<long> Times, List<double> Values) column))
                {
                    columns[reading.Channel] = column = ([], []);
                }

                column.Times.Add(reading.DeviceTime.Microseconds);
                column.Values.Add(reading.Value);
            }

            lab.Advance(step);
        }

        return [.. columns.Select(pair => new ReadingSeries(pair.Key, pair.Value.Times.ToArray(), pair.Value.Values.ToArray(), new ReadingQuality[pair.Value.Times.Count]))];
    }

    private static double Processor(Action work)
    {
        TimeSpan before = Process.GetCurrentProcess().TotalProcessorTime;
        work();
        return (Process.GetCurrentProcess().TotalProcessorTime - before).TotalSeconds;
    }
}
