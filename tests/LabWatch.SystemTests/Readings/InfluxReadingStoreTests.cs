using LabWatch.Lab.Findings;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Time;
using LabWatch.Readings;
using LabWatch.Readings.Influx;
using LabWatch.Readings.Quarantine;
using LabWatch.Tests.Readings;
using Microsoft.Extensions.Logging.Abstractions;

namespace LabWatch.SystemTests.Readings;

/// <summary>The contract on InfluxDB 1.x, and what is its own.</summary>
[Collection(InfluxCollection.Name)]
public sealed class InfluxReadingStoreTests(InfluxServer server) : ReadingStoreContract
{
    private readonly TemporaryDirectory _directory = new();
    private ReadingsOptions? _options;
    private SqliteQuarantine? _quarantine;

    public override async ValueTask DisposeAsync()
    {
        await base.DisposeAsync();
        _quarantine?.Dispose();
        _directory.Dispose();
    }

    protected override ValueTask<IReadingStore> OpenAsync()
    {
        _options ??= new ReadingsOptions { DataDirectory = _directory.Path, Engine = ReadingsEngine.InfluxDb, InfluxDb = server.NewDatabase() };
        _quarantine ??= new SqliteQuarantine(_options);
        return ValueTask.FromResult<IReadingStore>(Make(_options));
    }

    protected override async ValueTask SealAsync() => await ((IReadingSealer)Store).SealEverythingAsync(Token);

    [Fact]
    public async Task Every_double_comes_back_bit_for_bit_from_the_server()
    {
        Random random = new(11);
        double[] values = [0, -0.0, double.Epsilon, -double.Epsilon, 2.2250738585072009e-308, double.MaxValue, double.MinValue, 1e16, 1e21, 123456789012345680000.0,
            .. Enumerable.Range(0, 5_000).Select(_ => BitConverter.Int64BitsToDouble(random.NextInt64(long.MinValue, long.MaxValue))).Where(double.IsFinite)];
        await AppendAsync([.. values.Select((value, i) => At("t1", i * 0.001, value))]);
        await ReopenAsync();
        Assert.Equal(values.Select(BitConverter.DoubleToInt64Bits), Values(await ReadAsync(0, 10), "t1").Select(BitConverter.DoubleToInt64Bits));
    }

    [Fact]
    public async Task A_reading_that_the_server_refuses_is_quarantined_and_the_others_are_stored()
    {
        await AppendAsync(At("t1", 0, 0));
        using (HttpClient http = new())
        {
            // Somebody else wrote a text where the value belongs, in the shard of another week.
            using StringContent line = new($"reading,channel=t1,site={Fir.Site},source={Fir.Source} v=\"text\" {(Noon + TimeSpan.FromDays(70)).Microseconds}");
            (await http.PostAsync(new Uri($"http://127.0.0.1:{server.Port}/write?db={_options!.InfluxDb.Database}&precision=u"), line, Token)).EnsureSuccessStatusCode();
        }

        Reading refused = At("t1", 70 * 86_400 + 1, 7);
        AppendResult result = await AppendAsync(At("t1", 1, 1), refused, At("t1", 2, 2));
        Assert.Equal((2, 0, 0), (result.Accepted, result.Duplicates, result.Conflicts.Count));
        Assert.Equal((double[])[0, 1, 2], Values(await ReadAsync(0, 10), "t1"));
        QuarantinedMessage kept = Assert.Single(await _quarantine!.NewestAsync(10, Token));
        Finding finding = Assert.Single(kept.Findings);
        Assert.Equal(("refused-by-store", "7"), (finding.Code, finding.Value));
        AppendResult again = await AppendAsync(At("t1", 1, 1), refused);
        Assert.Equal((0, 1), (again.Accepted, again.Duplicates));
        Assert.Single(await _quarantine!.NewestAsync(10, Token));
    }

    [Fact]
    public async Task A_reading_of_a_time_that_the_server_cannot_hold_is_quarantined()
    {
        AppendResult result = await AppendAsync(At("t1", 1, 1), new Reading("t1", Instant.MaxValue, 2));
        Assert.Equal(1, result.Accepted);
        Assert.Single(await _quarantine!.NewestAsync(10, Token));
    }

    [Fact]
    public async Task A_second_writer_is_refused_until_the_first_is_gone()
    {
        await AppendAsync(At("t1", 0, 20));
        using TemporaryDirectory elsewhere = new();
        await using InfluxReadingStore second = Make(_options! with { DataDirectory = elsewhere.Path });
        StoreUnavailableException refused = await Assert.ThrowsAsync<StoreUnavailableException>(async () => await second.AppendAsync([Pack(Fir, At("t1", 1, 21))], Token));
        Assert.Contains("another service", refused.Message, StringComparison.Ordinal);
        await Store.DisposeAsync();
        Assert.Equal(1, (await second.AppendAsync([Pack(Fir, At("t1", 1, 21))], Token)).Accepted);
    }

    [Fact]
    public async Task Commits_that_are_gone_from_the_database_are_noticed()
    {
        await AppendAsync(At("t1", 0, 20));
        await AppendAsync(At("t1", 3600, 20));
        await Store.DisposeAsync();
        using (HttpClient http = new())
        {
            using FormUrlEncodedContent drop = new([new("q", "DROP MEASUREMENT \"hour\"")]);
            (await http.PostAsync(new Uri($"http://127.0.0.1:{server.Port}/query?db={_options!.InfluxDb.Database}"), drop, Token)).EnsureSuccessStatusCode();
        }

        await using InfluxReadingStore again = Make(_options);
        await again.OpenAsync(Token);
        Assert.Equal("set-aside-missing", Assert.Single(again.Findings).Code);
    }

    [Fact]
    public async Task A_server_that_is_killed_is_unavailable_and_goes_on_when_it_is_back()
    {
        await AppendAsync(At("t1", 0, 0));
        await server.KillAsync();
        await Assert.ThrowsAsync<StoreUnavailableException>(async () => await AppendAsync(At("t1", 1, 1)));
        Assert.NotNull(((IReadingStoreHealth)Store).Trouble);
        await server.StartAsync();
        await AppendAsync(At("t1", 1, 1));
        Assert.Null(((IReadingStoreHealth)Store).Trouble);
        await ReopenAsync();
        Assert.Equal((double[])[0, 1], Values(await ReadAsync(0, 10), "t1"));
    }

    [Fact]
    public async Task The_digest_of_a_sealed_hour_is_that_of_its_canonical_readings_chained()
    {
        await AppendAsync(At("t1", 0, 0), At("t2", 0, double.NaN, ReadingQuality.NoValue));
        await SealAsync();
        byte[] first = InfluxSealer.Digest(Fir, (await ReadAsync(0, 3600)).Series, []);
        await AppendAsync(At("t1", 1, 1));
        await SealAsync();
        await ReopenAsync();
        IReadOnlyList<SealedHour> seals = await Store.SealedHoursAsync(0, 10, Token);
        Assert.Equal([Convert.ToHexString(first), Convert.ToHexString(InfluxSealer.Digest(Fir, (await ReadAsync(0, 3600)).Series, first))], seals.Select(one => Convert.ToHexString(one.Digest.Span)));
        Assert.Equal([2, 1], seals.Select(one => one.Readings));
    }

    private InfluxReadingStore Make(ReadingsOptions options) => new(options, _quarantine!, TimeProvider.System, NullLogger.Instance);
}
