using System.Buffers.Binary;
using System.Diagnostics;
using System.Globalization;
using System.IO.Hashing;
using System.Security.Cryptography;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Time;
using LabWatch.Readings;
using Microsoft.Data.Sqlite;
using Microsoft.Extensions.Logging.Abstractions;

namespace LabWatch.Benchmarks.Readings;

/// <summary>
/// A long store: one generated day of 240 channels at 1 Hz, written as the service writes it, then re-stamped day by day (the times in a
/// block are relative to its hour), and an hour unsealed at its end. Then the start in a process of its own and the usual reads. Arguments:
/// folder, days (365 unless said; 365 days take about 6 GB).
/// </summary>
internal static class YearBenchmark
{
    private const int Sources = 20;
    private const long Day = 24 * Instant.MicrosecondsPerHour;
    private static readonly Instant Start = Instant.FromUnixSeconds(1_764_547_200);

    public static async Task<int> RunAsync(string[] args)
    {
        string folder = args.Length > 0 ? args[0] : Path.Combine(Path.GetTempPath(), "labwatch-year-benchmark");
        int days = args.Length > 1 ? int.Parse(args[1], CultureInfo.InvariantCulture) : 365;
        await MakeAsync(folder, days);
        Print($"{days} days of {Sources * 12} channels at 1 Hz: {new FileInfo(Path.Combine(folder, SqliteReadingStore.FileName)).Length / (days * 86_400.0 * Sources * 12):F2} bytes a reading, whole file");
        using (Process child = Process.Start(Environment.ProcessPath!, ["store-open", folder]))
        {
            await child.WaitForExitAsync();
        }

        return 0;
    }

    /// <summary>The start and the reads, in a process that has done nothing else.</summary>
    public static async Task<int> OpenAsync(string[] args)
    {
        SourceKey source = Source(7);
        long began = Stopwatch.GetTimestamp();
        await using SqliteReadingStore store = Open(args[0]);
        await store.OpenAsync(default);
        double open = Stopwatch.GetElapsedTime(began).TotalSeconds;
        Instant newest = (await store.NewestAsync(source, default))[0].Time;
        await store.AppendAsync([new ReadingPack(source, newest, [new Reading("well-front", newest + TimeSpan.FromSeconds(1), 138.5)])], default);
        double taken = Stopwatch.GetElapsedTime(began).TotalSeconds;
        Print($"start: open {open:F2} s, first reading durable after {taken:F2} s (864,000 unsealed readings read back); resident {Environment.WorkingSet / 1e6:N0} MB");

        TimeWindow year = new(Start, newest);
        Instant middle = new Instant(Start.Microseconds + ((newest - Start).Ticks / TimeSpan.TicksPerMicrosecond / 2)).Floor(Day);
        TimeWindow day = new(middle, middle + TimeSpan.FromDays(1));
        ChannelKey channel = new(source, "well-front");
        await TimeAsync("one channel, an hour raw", async () => (await store.ReadAsync(source, ["well-front"], new TimeWindow(day.Start, day.Start + TimeSpan.FromHours(1)), default)).Series[0].Count);
        await TimeAsync("one channel, a day raw", async () => (await store.ReadAsync(source, ["well-front"], day, default)).Series[0].Count);
        TimeSpan bucket = TimeSpan.FromHours(Math.Ceiling(year.Duration.TotalHours / 2000));
        await TimeAsync($"one channel, all {year.Duration.TotalDays:F0} days in buckets of {bucket.TotalHours} h", async () => (await store.ReduceAsync(channel, year, bucket, default)).Count);
        await TimeAsync("one channel, thirty days by half an hour", async () => (await store.ReduceAsync(channel, new TimeWindow(day.Start - TimeSpan.FromDays(30), day.Start), TimeSpan.FromMinutes(30), default)).Count);
        await TimeAsync("last value of all channels", async () =>
        {
            int count = 0;
            for (int i = 0; i < Sources; i++)
            {
                count += (await store.NewestAsync(Source(i), default)).Count;
            }

            return count;
        });
        string[] all = [.. (await store.NewestAsync(source, default)).Select(one => one.Channel)];
        await TimeAsync("12 channels, a day by minute", async () =>
        {
            int rows = 0;
            foreach (string name in all)
            {
                rows += (await store.ReduceAsync(new ChannelKey(source, name), day, TimeSpan.FromMinutes(1), default)).Count;
            }

            return rows;
        });
        Print($"resident at the end {Environment.WorkingSet / 1e6:N0} MB");
        return 0;
    }

    /// <summary>5,000 channels at 1 Hz for an hour of their time, sealed as the service seals: what is resident at most.</summary>
    public static async Task<int> MemoryAsync(string[] args)
    {
        string folder = args.Length > 0 ? args[0] : Path.Combine(Path.GetTempPath(), "labwatch-memory-benchmark");
        Delete(folder);
        TelemetryStream telemetry = new(1);
        long most = 0;
        long accepted = 0;
        await using SqliteReadingStore store = Open(folder);
        for (int second = 0; second < 3600; second++)
        {
            Instant time = Start + TimeSpan.FromSeconds(second);
            accepted += (await store.AppendAsync([.. Enumerable.Range(0, 417).Select(i => telemetry.Pack(Source(i), i, time))], default)).Accepted;
            if (second % 5 == 0 || store.NeedsSealing)
            {
                await store.SealDueAsync(default);
                most = Math.Max(most, Environment.WorkingSet);
            }
        }

        Print($"5,004 channels at 1 Hz for an hour of their time, {accepted:N0} readings: resident at most {most / 1e6:N0} MB");
        return 0;
    }

    private static async Task MakeAsync(string folder, int days)
    {
        Delete(folder);
        TelemetryStream telemetry = new(1);
        await using (SqliteReadingStore store = Open(folder))
        {
            for (int minute = 0; minute < 24 * 60; minute++)
            {
                await store.AppendAsync([.. Enumerable.Range(0, 60 * Sources).Select(i => telemetry.Pack(Source(i % Sources), i % Sources, Start + TimeSpan.FromSeconds((minute * 60) + (i / Sources))))], default);
                if (minute % 60 == 59)
                {
                    await store.SealEverythingAsync(default);
                }
            }
        }

        long began = Stopwatch.GetTimestamp();
        Restamp(Path.Combine(folder, SqliteReadingStore.FileName), days);
        Print($"re-stamped {days - 1} times in {Stopwatch.GetElapsedTime(began).TotalSeconds:F0} s");
        await using (SqliteReadingStore store = Open(folder))
        {
            began = Stopwatch.GetTimestamp();
            while (!await IsRolledUpAsync(folder))
            {
                await store.SealDueAsync(default);
            }

            Print($"rows of hours made in {Stopwatch.GetElapsedTime(began).TotalSeconds:F0} s");
            for (int second = 0; second < 3600; second++)
            {
                Instant time = Start + TimeSpan.FromDays(days) + TimeSpan.FromSeconds(second);
                await store.AppendAsync([.. Enumerable.Range(0, Sources).Select(i => telemetry.Pack(Source(i), i, time))], default);
            }
        }
    }

    private static void Restamp(string database, int days)
    {
        using SqliteConnection connection = Connect(database);
        Execute(connection, "PRAGMA synchronous = OFF");
        List<(long Source, long Hour, int Readings, long Change, byte[] Block, byte[] Summary)> day = [];
        using (SqliteCommand read = connection.CreateCommand())
        {
            read.CommandText = "SELECT b.source_id, b.hour, b.readings, b.last_change, b.data, s.data FROM block b JOIN summary s ON s.block_id = b.id ORDER BY b.source_id, b.hour";
            using SqliteDataReader row = read.ExecuteReader();
            while (row.Read())
            {
                day.Add((row.GetInt64(0), row.GetInt64(1), row.GetInt32(2), row.GetInt64(3), row.GetFieldValue<byte[]>(4), row.GetFieldValue<byte[]>(5)));
            }
        }

        long id = day.Count;
        for (int number = 1; number < days; number++)
        {
            using SqliteTransaction transaction = connection.BeginTransaction();
            using SqliteCommand block = Insert(connection, transaction, "INSERT INTO block(id, source_id, hour, part, readings, last_change, sealed_at, digest, data) VALUES ($0, $1, $2, 0, $3, $4, $2, $5, $6)", 7);
            using SqliteCommand summary = Insert(connection, transaction, "INSERT INTO summary(block_id, data) VALUES ($0, $1)", 2);
            foreach ((long source, long hour, int readings, long change, byte[] bytes, byte[] rows) in day)
            {
                BinaryPrimitives.WriteInt64LittleEndian(bytes.AsSpan(8), hour + (number * Day));
                BinaryPrimitives.WriteUInt32LittleEndian(bytes.AsSpan(bytes.Length - 4), Crc32.HashToUInt32(bytes.AsSpan(0, bytes.Length - 4)));
                Execute(block, ++id, source, hour + (number * Day), readings, change, SHA256.HashData(bytes), bytes);
                Execute(summary, id, rows);
            }

            transaction.Commit();
        }
    }

    private static async Task<bool> IsRolledUpAsync(string folder)
    {
        await using SqliteConnection connection = Connect(Path.Combine(folder, SqliteReadingStore.FileName));
        await using SqliteCommand command = connection.CreateCommand();
        command.CommandText = "SELECT (SELECT value FROM state WHERE name = 'hourly_through') = (SELECT MAX(id) FROM block)";
        return (long)(await command.ExecuteScalarAsync())! == 1;
    }

    private static SqliteCommand Insert(SqliteConnection connection, SqliteTransaction transaction, string sql, int count)
    {
        SqliteCommand command = connection.CreateCommand();
        command.Transaction = transaction;
#pragma warning disable CA2100 // Constants of this file.
        command.CommandText = sql;
#pragma warning restore CA2100
        for (int i = 0; i < count; i++)
        {
            command.Parameters.Add(new SqliteParameter { ParameterName = FormattableString.Invariant($"${i}") });
        }

        return command;
    }

    private static void Execute(SqliteCommand command, params ReadOnlySpan<object> values)
    {
        for (int i = 0; i < values.Length; i++)
        {
            command.Parameters[i].Value = values[i];
        }

        command.ExecuteNonQuery();
    }

    private static void Execute(SqliteConnection connection, string sql)
    {
        using SqliteCommand command = connection.CreateCommand();
#pragma warning disable CA2100 // Constants of this file.
        command.CommandText = sql;
#pragma warning restore CA2100
        command.ExecuteNonQuery();
    }

    private static SqliteConnection Connect(string database)
    {
        SqliteConnection connection = new($"Data Source={database};Pooling=False");
        connection.Open();
        return connection;
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

        double first = times[0];
        times.Sort();
        Print($"{name}: first {first:F2} ms, median {times[12]:F2} ms, fastest {times[0]:F2} ms ({rows} rows)");
    }

    private static SourceKey Source(int number) => new("hollin-vale", FormattableString.Invariant($"source-{number}"));

    private static SqliteReadingStore Open(string folder) => new(new ReadingsOptions { DataDirectory = folder }, TimeProvider.System, NullLogger<SqliteReadingStore>.Instance);

    private static void Delete(string folder)
    {
        if (Directory.Exists(folder))
        {
            Directory.Delete(folder, recursive: true);
        }
    }

    private static void Print(FormattableString line) => Console.WriteLine(line.ToString(CultureInfo.InvariantCulture));
}
