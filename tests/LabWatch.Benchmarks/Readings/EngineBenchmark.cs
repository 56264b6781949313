using System.Diagnostics;
using System.Globalization;
using System.Text;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Time;
using LabWatch.Readings;
using Microsoft.Extensions.Logging.Abstractions;
using Npgsql;

namespace LabWatch.Benchmarks.Readings;

/// <summary>
/// Durable appends a second on the database engines, each beside the server's own bulk load of the same readings in the same run.
/// Arguments: <c>postgresql CONNECTION</c> or <c>influxdb URL WRITEPATH</c>; an empty database for each run.
/// </summary>
internal static class EngineBenchmark
{
    private const int Sources = 20;
    private const int BulkReadings = 600_000;
    private static readonly Instant Start = Instant.FromUnixSeconds(1_764_547_200);

    public static async Task<int> RunAsync(string[] args)
    {
        string stamp = DateTimeOffset.UnixEpoch.AddTicks(Instant.Now(TimeProvider.System).Microseconds * 10).ToString("yyyyMMddHHmmss", CultureInfo.InvariantCulture);
        ReadingsOptions? options = args switch
        {
            ["postgresql", var connection] => new ReadingsOptions { DataDirectory = Folder(stamp), Engine = ReadingsEngine.PostgreSql, PostgreSql = new PostgreSqlReadingsOptions { ConnectionString = connection, Schema = "bench_" + stamp } },
            ["influxdb", var url, var path] => new ReadingsOptions { DataDirectory = Folder(stamp), Engine = ReadingsEngine.InfluxDb, InfluxDb = new InfluxDbReadingsOptions { Url = url, WritePath = path, Database = "bench_" + stamp } },
            _ => null,
        };
        if (options is null || options.Validate().Count > 0)
        {
            Console.Error.WriteLine("Arguments: postgresql CONNECTION, or influxdb URL WRITEPATH.");
            return 1;
        }

        Console.WriteLine($"{Environment.ProcessorCount} cores, .NET {Environment.Version}, {options.Engine}. Telemetry: {TelemetryStream.Description}.");
        await using ReadingEngine engine = ReadingEngine.Create(options, TimeProvider.System, NullLoggerFactory.Instance);
        await engine.Health.OpenAsync(default);
        double bulk = options.Engine is ReadingsEngine.PostgreSql ? await CopyAsync(options) : await LinesAsync(options);
        Console.WriteLine($"the server's own bulk load: {bulk:N0} readings/s");
        int day = 1;
        await AppendAsync(engine, "single readings, one a commit", 1, 1, 2_000, day++, bulk);
        await AppendAsync(engine, "single readings, 50 a commit", 1, 50, 40_000, day++, bulk);
        await AppendAsync(engine, "packs of 12, one a commit", 12, 1, 24_000, day++, bulk);
        await AppendAsync(engine, "packs of 12, 50 a commit", 12, 50, 300_000, day++, bulk);
        await AppendAsync(engine, "packs of 12, 2,000 readings a commit", 12, 167, 600_000, day++, bulk);
        await AppendAsync(engine, "packs of 60, 24,000 readings a commit", 60, 400, 1_200_000, day, bulk);
        return 0;
    }

    private static string Folder(string stamp) => Path.Combine(Path.GetTempPath(), "labwatch-engine-benchmark-" + stamp);

    private static List<ReadingPack[]> Commits(int width, int packsACommit, int readings, int day)
    {
        TelemetryStream telemetry = new(day);
        SourceKey[] sources = [.. Enumerable.Range(1, Sources).Select(number => new SourceKey("hollin-vale", $"bath-{number}"))];
        List<ReadingPack[]> commits = [];
        int pack = 0;
        for (int made = 0; made < readings; made += width * packsACommit)
        {
            commits.Add([.. Enumerable.Range(0, packsACommit).Select(_ => telemetry.Pack(sources[pack % Sources], pack % Sources, Start + TimeSpan.FromDays(day) + TimeSpan.FromSeconds(pack++ / Sources), width))]);
        }

        return commits;
    }

    private static async Task AppendAsync(ReadingEngine engine, string name, int width, int packsACommit, int readings, int day, double bulk)
    {
        List<ReadingPack[]> commits = Commits(width, packsACommit, readings, day);
        long started = Stopwatch.GetTimestamp();
        long accepted = 0;
        foreach (ReadingPack[] commit in commits)
        {
            accepted += (await engine.Store.AppendAsync(commit, default)).Accepted;
        }

        double rate = accepted / Stopwatch.GetElapsedTime(started).TotalSeconds;
        await engine.Sealer.SealEverythingAsync(default);
        Console.WriteLine(string.Create(CultureInfo.InvariantCulture, $"{name}: {rate:N0} readings/s durable ({rate / width / packsACommit:N0} commits/s), {rate / bulk:F2} of the bulk load"));
    }

    /// <summary>COPY in binary form into a table of one row a reading, in one transaction.</summary>
    private static async Task<double> CopyAsync(ReadingsOptions options)
    {
        await using NpgsqlConnection connection = new(options.PostgreSql.ConnectionString);
        await connection.OpenAsync();
        await using NpgsqlCommand create = new("CREATE TABLE IF NOT EXISTS bench_row(source smallint, channel smallint, time bigint, value double precision, quality smallint); TRUNCATE bench_row", connection);
        await create.ExecuteNonQueryAsync();
        List<ReadingPack[]> commits = Commits(12, 50, BulkReadings, 0);
        long started = Stopwatch.GetTimestamp();
        await using (NpgsqlBinaryImporter import = await connection.BeginBinaryImportAsync("COPY bench_row FROM STDIN (FORMAT BINARY)"))
        {
            foreach (Reading reading in commits.SelectMany(one => one).SelectMany(one => one.Readings))
            {
                await import.StartRowAsync();
                await import.WriteAsync((short)1);
                await import.WriteAsync((short)1);
                await import.WriteAsync(reading.Time.Microseconds);
                await import.WriteAsync(reading.Value);
                await import.WriteAsync((short)reading.Quality);
            }

            await import.CompleteAsync();
        }

        double rate = BulkReadings / Stopwatch.GetElapsedTime(started).TotalSeconds;
        await using NpgsqlCommand drop = new("DROP TABLE bench_row", connection);
        await drop.ExecuteNonQueryAsync();
        return rate;
    }

    /// <summary>Line protocol that was made before, 10,000 points a request, one request after the other.</summary>
    private static async Task<double> LinesAsync(ReadingsOptions options)
    {
        string[] requests = [.. Commits(12, 50, BulkReadings, 0).SelectMany(one => one)
            .SelectMany(pack => pack.Readings.Select(reading => string.Create(CultureInfo.InvariantCulture, $"bulk,channel={reading.Channel},site={pack.Source.Site},source={pack.Source.Source} v={reading.Value:R} {reading.Time.Microseconds}")))
            .Chunk(10_000).Select(lines => string.Join('\n', lines))];
        using HttpClient http = new() { Timeout = TimeSpan.FromMinutes(2) };
        string precision = options.InfluxDb.WritePath.EndsWith("v2/write", StringComparison.Ordinal) ? "us" : "u";
        Uri address = new($"{options.InfluxDb.Url}{options.InfluxDb.WritePath}?db={options.InfluxDb.Database}&bucket={options.InfluxDb.Database}&precision={precision}");
        long started = Stopwatch.GetTimestamp();
        foreach (string request in requests)
        {
            using StringContent content = new(request, Encoding.UTF8, "text/plain");
            using HttpResponseMessage answer = await http.PostAsync(address, content);
            answer.EnsureSuccessStatusCode();
        }

        return BulkReadings / Stopwatch.GetElapsedTime(started).TotalSeconds;
    }
}
