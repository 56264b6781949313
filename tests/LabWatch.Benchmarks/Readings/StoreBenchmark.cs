using System.Diagnostics;
using System.Globalization;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Time;
using LabWatch.Readings;
using Microsoft.Data.Sqlite;
using Microsoft.Extensions.Logging.Abstractions;

namespace LabWatch.Benchmarks.Readings;

/// <summary>The store of readings alone: durable appends a second, bytes a reading, times of the usual reads. Arguments: a folder on the disk to measure, then "reads" to leave out the appends.</summary>
internal static class StoreBenchmark
{
    private const int Sources = 20;
    private static readonly Instant Start = Instant.FromUnixSeconds(1_764_547_200);

    public static async Task<int> RunAsync(string[] args)
    {
        string folder = args.Length > 0 ? args[0] : Path.Combine(Path.GetTempPath(), "labwatch-store-benchmark");
        Console.WriteLine($"Telemetry: {TelemetryStream.Description}.");
        Console.WriteLine($"{Environment.ProcessorCount} cores, .NET {Environment.Version}, folder {folder}; sealing runs beside the appends and is finished inside the time.");
        if (!args.Contains("reads"))
        {
            await AppendsAsync(folder, "packs of 12, 50 a commit", width: 12, packsACommit: 50, readings: 1_500_000);
            await AppendsAsync(folder, "packs of 60, 50 a commit", width: 60, packsACommit: 50, readings: 3_000_000);
            await AppendsAsync(folder, "packs of 12, 2,000 readings a commit", width: 12, packsACommit: 167, readings: 3_000_000);
            await AppendsAsync(folder, "packs of 60, 24,000 readings a commit", width: 60, packsACommit: 400, readings: 4_800_000);
        }

        await DayAsync(folder, "one day at 1 Hz", days: 1, stepSeconds: 1);
        await DayAsync(folder, "ten days at 0.1 Hz", days: 10, stepSeconds: 10);
        return 0;
    }

    private static async Task AppendsAsync(string folder, string name, int width, int packsACommit, int readings)
    {
        List<ReadingPack[]> commits = Commits(width, packsACommit, readings);
        await using SqliteReadingStore store = Open(folder, unsealedLimit: 1_000_000);
        await store.OpenAsync(default);
        using CancellationTokenSource done = new();
        Task sealing = SealBesideAsync(store, done.Token);
        TimeSpan cpuBefore = Process.GetCurrentProcess().TotalProcessorTime;
        long started = Stopwatch.GetTimestamp();
        long accepted = 0;
        foreach (ReadingPack[] commit in commits)
        {
            accepted += (await store.AppendAsync(commit, default)).Accepted;
        }

        double appended = Stopwatch.GetElapsedTime(started).TotalSeconds;
        await done.CancelAsync();
        await sealing;
        await store.SealEverythingAsync(default);
        double total = Stopwatch.GetElapsedTime(started).TotalSeconds;
        double cpu = (Process.GetCurrentProcess().TotalProcessorTime - cpuBefore).TotalSeconds;
        Print($"append, {name}: {accepted / appended:N0} readings/s durable ({commits.Count / appended:N0} commits/s), {accepted / total:N0} readings/s with all of it sealed at the end; {1e9 * cpu / accepted:N0} ns of processor a reading");
    }

    private static async Task SealBesideAsync(SqliteReadingStore store, CancellationToken done)
    {
        while (!done.IsCancellationRequested)
        {
            if (store.NeedsSealing)
            {
                await store.SealDueAsync(default);
            }

            await Task.Delay(TimeSpan.FromMilliseconds(50), TimeProvider.System, CancellationToken.None);
        }
    }

    private static async Task DayAsync(string folder, string name, int days, int stepSeconds)
    {
        TelemetryStream telemetry = new(3);
        SourceKey source = new("hollin-vale", "fir");
        await using SqliteReadingStore store = Open(folder, unsealedLimit: 4_000_000);
        for (int hour = 0; hour < 24 * days; hour++)
        {
            await store.AppendAsync(
                [.. Enumerable.Range(0, 3600 / stepSeconds).Select(i => telemetry.Pack(source, 0, Start + TimeSpan.FromSeconds((hour * 3600) + (i * stepSeconds))))],
                default);
        }

        await store.SealEverythingAsync(default);
        long readings = 24L * days * 3600 / stepSeconds * 12;
        Print($"{name}: {Size(folder, readings)}");
        TimeWindow day = new(Start, Start + TimeSpan.FromHours(24));
        TimeWindow half = new(Start + TimeSpan.FromHours(7.7), Start + TimeSpan.FromHours(8.2));
        string[] all = [.. (await store.NewestAsync(source, default)).Select(one => one.Channel)];
        await TimeAsync($"{name}: one channel, 24 h raw", async () => (await store.ReadAsync(source, ["well-front"], day, default)).Series[0].Count);
        await TimeAsync($"{name}: one channel, 30 min raw", async () => (await store.ReadAsync(source, ["well-front"], half, default)).Series[0].Count);
        await TimeAsync($"{name}: all 12 channels, 24 h raw", async () => (await store.ReadAsync(source, null, day, default)).Series.Sum(one => one.Count));
        await TimeAsync($"{name}: one channel, 24 h by minute", async () => (await store.ReduceAsync(new ChannelKey(source, "well-front"), day, TimeSpan.FromMinutes(1), default)).Count);
        await TimeAsync($"{name}: 12 channels, 24 h by minute", async () =>
        {
            int rows = 0;
            foreach (string channel in all)
            {
                rows += (await store.ReduceAsync(new ChannelKey(source, channel), day, TimeSpan.FromMinutes(1), default)).Count;
            }

            return rows;
        });
    }

    private static async Task TimeAsync(string name, Func<Task<int>> read)
    {
        List<double> times = [];
        int rows = 0;
        for (int i = 0; i < 25; i++)
        {
            long started = Stopwatch.GetTimestamp();
            rows = await read();
            times.Add(Stopwatch.GetElapsedTime(started).TotalMilliseconds);
        }

        times.Sort();
        Print($"{name}: median {times[12]:F2} ms, fastest {times[0]:F2} ms ({rows} rows)");
    }

    private static string Size(string folder, long readings)
    {
        using SqliteConnection connection = new($"Data Source={Path.Combine(folder, SqliteReadingStore.FileName)};Mode=ReadOnly;Pooling=False");
        connection.Open();
        double blocks = Number(connection, "SELECT SUM(LENGTH(data)) FROM block");
        double summaries = Number(connection, "SELECT SUM(LENGTH(data)) FROM summary");
        double used = Number(connection, "SELECT (SELECT * FROM pragma_page_count) - (SELECT * FROM pragma_freelist_count)") * Number(connection, "PRAGMA page_size");
        return string.Create(
            CultureInfo.InvariantCulture, $"{blocks / readings:F3} bytes a reading in blocks, {summaries / readings:F3} in summaries, {used / readings:F3} in pages of the database");
    }

    private static double Number(SqliteConnection connection, string sql)
    {
        using SqliteCommand command = connection.CreateCommand();
#pragma warning disable CA2100 // Constants of this file.
        command.CommandText = sql;
#pragma warning restore CA2100
        return (long)command.ExecuteScalar()!;
    }

    private static List<ReadingPack[]> Commits(int width, int packsACommit, int readings)
    {
        TelemetryStream telemetry = new(1);
        SourceKey[] sources = [.. Enumerable.Range(0, Sources).Select(i => new SourceKey("hollin-vale", FormattableString.Invariant($"source-{i}")))];
        List<ReadingPack> packs = [];
        for (int i = 0; i < readings / width; i++)
        {
            packs.Add(telemetry.Pack(sources[i % Sources], i % Sources, Start + TimeSpan.FromSeconds(i / Sources), width));
        }

        return [.. packs.Chunk(packsACommit)];
    }

    private static SqliteReadingStore Open(string folder, int unsealedLimit)
    {
        if (Directory.Exists(folder))
        {
            Directory.Delete(folder, recursive: true);
        }

        return new SqliteReadingStore(
            new ReadingsOptions { DataDirectory = folder, UnsealedReadingsLimit = unsealedLimit }, TimeProvider.System, NullLogger<SqliteReadingStore>.Instance);
    }

    private static void Print(FormattableString line) => Console.WriteLine(line.ToString(CultureInfo.InvariantCulture));
}
