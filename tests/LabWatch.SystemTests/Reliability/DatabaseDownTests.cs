using LabWatch.Lab.Identity;
using LabWatch.Lab.Time;
using LabWatch.Readings;
using LabWatch.SystemTests.Intake;
using LabWatch.SystemTests.Readings;
using LabWatch.SystemTests.Records;
using LabWatch.SystemTests.Service;
using Microsoft.Extensions.Logging.Abstractions;
using Npgsql;

namespace LabWatch.SystemTests.Reliability;

/// <summary>
/// The database of the readings goes away under the service while a device sends, and comes back: the device is acknowledged all the
/// while, nothing is lost or doubled, and the service is not restarted. Short: some seconds; long: ten minutes a fault.
/// </summary>
[Collection(PostgreSqlCollection.Name)]
public sealed class DatabaseDownTests(PostgreSqlServer postgres, InfluxServer influx) : IClassFixture<InfluxServer>
{
    private static readonly TimeSpan Patience = TimeSpan.FromMinutes(TestLength.IsLong ? 30 : 3);
    private static readonly SourceKey Fir = new("sample", "fir");

    private static CancellationToken Token => TestContext.Current.CancellationToken;

    private static TimeSpan Down => TimeSpan.FromSeconds(TestLength.Of(shortForm: 3, longForm: 600));

    [Fact]
    public async Task PostgreSql_killed_and_a_link_to_it_that_hangs()
    {
        NpgsqlConnectionStringBuilder database = new(await postgres.NewDatabaseAsync(Token));
        using FreezableProxy proxy = new(database.Port);
        ReadingsOptions options = new()
        {
            DataDirectory = "",
            Engine = ReadingsEngine.PostgreSql,
            PostgreSql = new PostgreSqlReadingsOptions { ConnectionString = $"Host=127.0.0.1;Port={proxy.Port};Username={database.Username};Database={database.Database};Timeout=5" },
        };
        await RunAsync("PostgreSQL", options, ("LABWATCH__Readings__PostgreSql__ConnectionString", options.PostgreSql.ConnectionString!), [
            ("server killed and started again", () => postgres.ControlAsync("stop"), () => postgres.ControlAsync("start")),
            ("link hangs", () => Done(proxy.Freeze), () => Done(proxy.Thaw)),
        ]);
    }

    [Fact]
    public async Task InfluxDB_killed_and_paused()
    {
        ReadingsOptions options = new() { DataDirectory = "", Engine = ReadingsEngine.InfluxDb, InfluxDb = influx.NewDatabase() with { RequestTimeout = TimeSpan.FromSeconds(3) } };
        await RunAsync("InfluxDB", options, ("LABWATCH__Readings__InfluxDb__Url", options.InfluxDb.Url!), [
            ("server killed (kill -9) and started again", influx.KillAsync, influx.StartAsync),
            ("server paused (SIGSTOP)", () => influx.SignalAsync("STOP"), () => influx.SignalAsync("CONT")),
        ]);
    }

    private static Task Done(Action action)
    {
        action();
        return Task.CompletedTask;
    }

    private static async Task RunAsync(string part, ReadingsOptions options, (string Name, string Value) place, (string Name, Func<Task> Begin, Func<Task> End)[] faults)
    {
        long first = (Instant.Now(TimeProvider.System) - TimeSpan.FromHours(2)).StartOfHour().Microseconds;
        await using ServiceFixture fixture = new();
        fixture.Environment["LABWATCH__Readings__Engine"] = options.Engine.ToString().ToLowerInvariant();
        fixture.Environment[place.Name] = place.Value;
        fixture.Environment["LABWATCH__Readings__InfluxDb__WritePath"] = options.InfluxDb.WritePath;
        fixture.Environment["LABWATCH__Readings__InfluxDb__Database"] = options.InfluxDb.Database;
        fixture.Environment["LABWATCH__Readings__InfluxDb__RequestTimeout"] = "00:00:03";
        fixture.Environment["LABWATCH__Readings__QuietPeriod"] = "00:00:01";
        await fixture.StartAsync(Token);
        await using PersistentDevice device = new(fixture.BrokerPort, "lab/sample/fir", "well-1", first);
        device.Start();
        foreach ((_, Func<Task> begin, Func<Task> end) in faults)
        {
            await MoreAsync("before the fault", 200);
            await begin();
            try
            {
                long since = TimeProvider.System.GetTimestamp();
                await MoreAsync("while the database is away", 50);
                await Task.Delay(TimeSpan.FromTicks(Math.Max(0, (Down - TimeProvider.System.GetElapsedTime(since)).Ticks)), TimeProvider.System, Token);
            }
            finally
            {
                await end();
            }

            await StoredAsync(device.Acknowledged.Keys.Max());
        }

        await device.FinishAsync(Patience);
        await Poll.UntilAsync("the spool is empty", () => IsSpoolEmptyAsync(fixture), Patience, Token, () => fixture.Service.Output);
        await Poll.UntilAsync("the trail has the sealed hour", () => IsSealedAsync(fixture), Patience, Token, () => fixture.Service.Output);
        await fixture.Service.StopAsync(Token);
        (int lost, int doubled) = await CountAsync(options with { DataDirectory = fixture.Data }, device, first);
        foreach ((string name, _, _) in faults)
        {
            ReliabilityReport.Record(
                part, name, $"{Down.TotalSeconds:F0} s while a device sends as fast as it is acknowledged",
                "the device was acknowledged all the while; the database had everything afterwards, without a restart", device.Acknowledged.Count, lost, doubled);
        }

        Assert.Equal((0, 0), (lost, doubled));
        await SucceedsAsync(fixture, "verify");
        await SucceedsAsync(fixture, "transfer", "--from", options.Engine.ToString().ToLowerInvariant(), "--to", "sqlite");
        fixture.Environment["LABWATCH__Readings__Engine"] = "sqlite";
        (lost, doubled) = await CountAsync(options with { DataDirectory = fixture.Data, Engine = ReadingsEngine.Sqlite }, device, first);
        Assert.Equal((0, 0), (lost, doubled));

        async Task MoreAsync(string when, int count)
        {
            int before = device.Acknowledged.Count;
            await Poll.UntilAsync($"the device is acknowledged {when}", () => Task.FromResult(device.Acknowledged.Count >= before + count), Patience, Token, () => fixture.Service.Output);
        }

        async Task StoredAsync(long time) =>
            await Poll.UntilAsync("the readings are in the database", async () => await IsStoredAsync(fixture, time), Patience, Token, () => fixture.Service.Output);
    }

    private static async Task SucceedsAsync(ServiceFixture fixture, params string[] command)
    {
        (int code, string output) = await LabWatchProcess.RunAsync([.. command, "--data", fixture.Data], Token, fixture.Environment);
        Assert.True(code == 0, output);
    }

    private static async Task<bool> IsSealedAsync(ServiceFixture fixture)
    {
        using HttpResponseMessage answer = await fixture.Service.Client.GetAsync(new Uri("api/v1/audit?action=hour-sealed&count=1", UriKind.Relative), Token);
        return (await answer.Content.ReadAsStringAsync(Token)).Contains("hour/fir/", StringComparison.Ordinal);
    }

    private static async Task<bool> IsSpoolEmptyAsync(ServiceFixture fixture)
    {
        using HttpResponseMessage answer = await fixture.Service.Client.GetAsync(new Uri("health/ready", UriKind.Relative), Token);
        return (await answer.Content.ReadAsStringAsync(Token)).Contains("; 0 messages in the spool.", StringComparison.Ordinal);
    }

    private static async Task<bool> IsStoredAsync(ServiceFixture fixture, long time)
    {
        try
        {
            return (await fixture.ReadAsync("well-1", time, time + 1, Token)).Count > 0;
        }
        catch (HttpRequestException)
        {
            // The store does not answer yet.
            return false;
        }
    }

    /// <summary>Compares what was acknowledged with what lies in the database, asked without the service.</summary>
    private static async Task<(int Lost, int Doubled)> CountAsync(ReadingsOptions options, PersistentDevice device, long first)
    {
        await using ReadingEngine engine = ReadingEngine.Create(options, TimeProvider.System, NullLoggerFactory.Instance);
        TimeWindow window = new(new Instant(first), new Instant(device.Acknowledged.Keys.Max() + 1));
        ReadingSeries series = (await engine.Store.ReadAsync(Fir, ["well-1"], window, Token)).Find("well-1")!;
        Dictionary<long, double> stored = [];
        for (int i = 0; i < series.Count; i++)
        {
            stored[series.TimeMicroseconds.Span[i]] = series.Values.Span[i];
        }

        return (device.Acknowledged.Count(sent => !stored.TryGetValue(sent.Key, out double value) || value != sent.Value), series.Count - stored.Count);
    }
}
