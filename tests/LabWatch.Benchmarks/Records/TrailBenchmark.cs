using System.Diagnostics;
using System.Globalization;
using System.Text.Json.Nodes;
using LabWatch.Evidence.Verification;
using LabWatch.Lab.Assessments;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Time;
using LabWatch.Metrology.Uncertainty;
using LabWatch.Records;
using LabWatch.Records.Assessments;
using LabWatch.Records.Audit;
using Microsoft.Data.Sqlite;
using Microsoft.Extensions.DependencyInjection;

namespace LabWatch.Benchmarks.Records;

/// <summary>What an entry costs when it is appended, and how long a trail of a million entries takes to verify.</summary>
internal static class TrailBenchmark
{
    private const string Site = "hollin-vale";
    private const int Batch = 50;

    /// <summary>Arguments: entries (1,000,000) and assessments among them (20,000).</summary>
    public static async Task<int> RunAsync(string[] args)
    {
        int entries = args.Length > 0 ? int.Parse(args[0], CultureInfo.InvariantCulture) : 1_000_000;
        int assessments = args.Length > 1 ? int.Parse(args[1], CultureInfo.InvariantCulture) : 20_000;
        string directory = Directory.CreateTempSubdirectory("labwatch-trail-").FullName;
        try
        {
            RecordsOptions options = RecordsOptions.InDirectory(directory);
            await using (ServiceProvider services = new ServiceCollection().AddLabWatchRecords(options).BuildServiceProvider())
            {
                await AppendAsync(services.GetRequiredService<IAuditLedger>(), 5_000);
                await RecordAsync(services.GetRequiredService<IAssessmentLedger>(), assessments);
            }

            SqliteConnection.ClearAllPools();
            Stopwatch filling = Stopwatch.StartNew();
            TrailFill.Add(options.FilePath, Site, entries);
            Console.WriteLine($"bulk fill to {entries} entries: {filling.Elapsed.TotalSeconds:F1} s, file {new FileInfo(options.FilePath).Length / 1e6:F0} MB");
            for (int run = 0; run < 3; run++)
            {
                Verify(directory, options);
            }

            return 0;
        }
        finally
        {
            Directory.Delete(directory, recursive: true);
        }
    }

    private static void Verify(string directory, RecordsOptions options)
    {
        TimeSpan before = Environment.CpuUsage.TotalTime;
        Stopwatch verifying = Stopwatch.StartNew();
        (VerifyReport? report, _) = DataVerifier.Run(new VerifyRequest(directory, options, []));
        double seconds = verifying.Elapsed.TotalSeconds;
        Console.WriteLine(
            $"verify: {seconds:F2} s ({(Environment.CpuUsage.TotalTime - before).TotalSeconds:F2} s of processor time), {report!.Examined["audit_entries"]} entries ({report.Examined["audit_entries"] / seconds:N0}/s), {report.Examined["assessments"]} assessments, "
            + $"findings {report.Findings.Total}, peak memory {Process.GetCurrentProcess().PeakWorkingSet64 / 1e6:F0} MB");
    }

    private static async Task AppendAsync(IAuditLedger trail, int count)
    {
        await trail.AppendAsync(Note(0), CancellationToken.None);
        foreach (int batch in (int[])[1, Batch])
        {
            Stopwatch watch = Stopwatch.StartNew();
            for (int i = 0; i < count; i += batch)
            {
                await trail.AppendAsync([.. Enumerable.Range(i, batch).Select(Note)], null, CancellationToken.None);
            }

            Console.WriteLine($"append, {batch} a transaction: {watch.Elapsed.TotalMicroseconds / count:F0} us an entry");
        }
    }

    private static async Task RecordAsync(IAssessmentLedger ledger, int count)
    {
        Stopwatch watch = Stopwatch.StartNew();
        for (int i = 0; i < count; i += Batch)
        {
            await ledger.RecordAsync([.. Enumerable.Range(i, Batch).Select(Made)], CancellationToken.None);
        }

        Console.WriteLine($"assessments with their entries, {Batch} a transaction: {watch.Elapsed.TotalMicroseconds / count:F0} us each ({count})");
    }

    private static AuditNote Note(int i) => new(
        Site, Instant.FromUnixSeconds(1_796_126_400 + i), "kim", "signed-in", "account/kim", new JsonObject { ["from"] = "127.0.0.1", ["session"] = i }, null);

    private static Assessment Made(int i)
    {
        Instant start = Instant.FromUnixSeconds(1_790_000_000 + (1800L * i));
        return new Assessment(
            new SourceKey(Site, "fir"), "stability", string.Empty, new TimeWindow(start, start + TimeSpan.FromMinutes(30)), 1, new Estimate(0.1 + i, 1.0 / 3.0, 12.5), "mK", 50, 2,
            Decision.Pass, 0.99, [new AssessmentFigure("slope", new Estimate(-1e-3, 2e-4), "K/h"), new AssessmentFigure("range", new Estimate(0.041, 0.002), "K")],
            "Half-range over 30 min is 41 mK (U = 6 mK, k = 2); the limit is 50 mK.",
            new Provenance(new string('a', 64), [new SourceHourRead(start, 3600)], ["prt-1@2"], "fir-stability@1", "0.1.0"), start + TimeSpan.FromMinutes(31), null);
    }
}
