using LabWatch.Lab.Findings;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Time;
using LabWatch.Readings;
using LabWatch.Readings.Quarantine;
using LabWatch.Readings.Transfer;
using LabWatch.SystemTests.Records;
using Microsoft.Extensions.Logging.Abstractions;

namespace LabWatch.SystemTests.Readings;

/// <summary>All readings go from each engine to each other one, whole and exact; interrupted, the transfer goes on.</summary>
[Collection(PostgreSqlCollection.Name)]
public sealed class TransferTests(PostgreSqlServer postgres, InfluxServer influx) : IClassFixture<InfluxServer>, IDisposable
{
    private static readonly Instant Start = Instant.FromUnixSeconds(1_764_590_400);
    private static readonly SourceKey Fir = new("hollin-vale", "fir");
    private static readonly SourceKey Yew = new("hollin-vale", "yew");
    private readonly TemporaryDirectory _directory = new();

    private static CancellationToken Token => TestContext.Current.CancellationToken;

    public void Dispose() => _directory.Dispose();

    [Theory]
    [InlineData(ReadingsEngine.Sqlite, ReadingsEngine.PostgreSql)]
    [InlineData(ReadingsEngine.Sqlite, ReadingsEngine.InfluxDb)]
    [InlineData(ReadingsEngine.PostgreSql, ReadingsEngine.InfluxDb)]
    [InlineData(ReadingsEngine.PostgreSql, ReadingsEngine.Sqlite)]
    [InlineData(ReadingsEngine.InfluxDb, ReadingsEngine.Sqlite)]
    [InlineData(ReadingsEngine.InfluxDb, ReadingsEngine.PostgreSql)]
    public async Task Everything_arrives_exactly_and_a_second_transfer_has_nothing_to_do(ReadingsEngine one, ReadingsEngine other)
    {
        ReadingsOptions options = await OptionsAsync();
        (ReadingsOptions from, ReadingsOptions to) = (options with { Engine = one }, options with { Engine = other });
        long readings = await FillAsync(from);
        await using (ReadingEngine source = Open(from), target = Open(to))
        {
            using CancellationTokenSource interrupt = CancellationTokenSource.CreateLinkedTokenSource(Token);
            await Assert.ThrowsAnyAsync<OperationCanceledException>(async () => await ReadingTransfer.CopyAsync(source, target, (_, _) => interrupt.Cancel(), interrupt.Token));
        }

        await using (ReadingEngine source = Open(from), target = Open(to))
        {
            TransferCopy copy = await ReadingTransfer.CopyAsync(source, target, null, Token);
            Assert.Equal((6, 1, 0), (copy.Hours, copy.HoursThereAlready, copy.Conflicts.Count));
            int messages = await ReadingTransfer.CopyQuarantineAsync(source.Quarantine, target.Quarantine, Token);
            Assert.Equal(ReadingEngine.ShareQuarantine(one, other) ? 0 : 2, messages);
            Assert.Equal(2, await target.Quarantine.TotalAsync(Token));
        }

        await using (ReadingEngine source = Open(from), target = Open(to))
        {
            TransferCheck check = await ReadingTransfer.VerifyAsync(source.Store, target.Store, null, Token);
            Assert.Equal((6, readings, 0, 0), (check.Hours, check.Readings, check.Different.Count, check.OthersHours));
            TransferCopy again = await ReadingTransfer.CopyAsync(source, target, null, Token);
            Assert.Equal((6, 0), (again.HoursThereAlready, again.Readings));
            Assert.Equal(0, await ReadingTransfer.CopyQuarantineAsync(source.Quarantine, target.Quarantine, Token));
        }
    }

    [Theory]
    [InlineData(ReadingsEngine.Sqlite, ReadingsEngine.PostgreSql)]
    [InlineData(ReadingsEngine.PostgreSql, ReadingsEngine.Sqlite)]
    public async Task Sealed_hours_keep_their_digests_between_a_file_and_PostgreSql_and_both_go_on(ReadingsEngine one, ReadingsEngine other)
    {
        ReadingsOptions options = await OptionsAsync();
        (ReadingsOptions from, ReadingsOptions to) = (options with { Engine = one }, options with { Engine = other });
        await FillAsync(from);
        Assert.Equal(6, ReadingTransfer.CopyBlocks(from, to, null, Token));
        Assert.Equal(0, ReadingTransfer.CopyBlocks(from, to, null, Token));
        await using (ReadingEngine source = Open(from), target = Open(to))
        {
            Assert.Equal((6, 0, 0), await CheckAsync(source, target));
            Assert.Equal(await SealsAsync(source), await SealsAsync(target));
            Assert.Equal(await source.Store.NewestAsync(Fir, Token), await target.Store.NewestAsync(Fir, Token));
            Assert.Equal((await source.Store.ChangesAsync(0, Token)).Change, (await target.Store.ChangesAsync(0, Token)).Change);
            Reading late = new("late", Start + TimeSpan.FromSeconds(5), 5);
            await source.Store.AppendAsync([new ReadingPack(Fir, Start, [late])], Token);
            await source.Sealer.SealEverythingAsync(Token);
        }

        Assert.Equal(1, ReadingTransfer.CopyBlocks(from, to, null, Token));
        await using (ReadingEngine source = Open(from), target = Open(to))
        {
            Assert.Equal((6, 0, 0), await CheckAsync(source, target));
            await target.Store.AppendAsync([new ReadingPack(Yew, Start, [new Reading("own", Start, 1)])], Token);
        }

        Assert.Null(ReadingTransfer.CopyBlocks(from, to, null, Token));
    }

    [Fact]
    public async Task Another_value_in_the_target_stays_and_is_reported()
    {
        ReadingsOptions options = await OptionsAsync();
        ReadingsOptions to = options with { Engine = ReadingsEngine.PostgreSql };
        await FillAsync(options);
        await using ReadingEngine source = Open(options), target = Open(to);
        await target.Store.AppendAsync([new ReadingPack(Fir, Start, [new Reading("t1", Start, 99)])], Token);
        TransferCopy copy = await ReadingTransfer.CopyAsync(source, target, null, Token);
        Assert.Equal(99, Assert.Single(copy.Conflicts).StoredValue);
        TransferCheck check = await ReadingTransfer.VerifyAsync(source.Store, target.Store, null, Token);
        Assert.Equal([(Fir, Start)], check.Different);
    }

    [Fact]
    public async Task A_target_that_a_service_writes_is_refused()
    {
        ReadingsOptions options = await OptionsAsync();
        await FillAsync(options);
        using TemporaryDirectory elsewhere = new();
        foreach (ReadingsEngine engine in (ReadingsEngine[])[ReadingsEngine.PostgreSql, ReadingsEngine.InfluxDb])
        {
            await using ReadingEngine service = Open(options with { Engine = engine, DataDirectory = elsewhere.Path });
            await service.Store.AppendAsync([new ReadingPack(Yew, Start, [new Reading("t1", Start, 1)])], Token);
            await using ReadingEngine source = Open(options), target = Open(options with { Engine = engine });
            await Assert.ThrowsAsync<StoreUnavailableException>(async () => await ReadingTransfer.CopyAsync(source, target, null, Token));
        }
    }

    private static async Task<(long Hours, int Different, long Others)> CheckAsync(ReadingEngine source, ReadingEngine target)
    {
        TransferCheck check = await ReadingTransfer.VerifyAsync(source.Store, target.Store, null, Token);
        return (check.Hours, check.Different.Count, check.OthersHours);
    }

    private static async Task<IEnumerable<(long Seal, string Digest)>> SealsAsync(ReadingEngine engine) =>
        (await engine.Store.SealedHoursAsync(0, 100, Token)).Select(one => (one.Seal, Convert.ToHexString(one.Digest.Span)));

    private static ReadingEngine Open(ReadingsOptions options) => ReadingEngine.Create(options, TimeProvider.System, NullLoggerFactory.Instance);

    private static async Task<long> FillAsync(ReadingsOptions options)
    {
        await using ReadingEngine engine = Open(options);
        Random random = new(5);
        long readings = 0;
        for (int hour = 0; hour < 3; hour++)
        {
            foreach (SourceKey source in (SourceKey[])[Fir, Yew])
            {
                Reading[] pack = [.. Enumerable.Range(0, 500).SelectMany(i => Enumerable.Range(1, 3).Select(channel => At(random, Start + TimeSpan.FromHours(hour) + TimeSpan.FromSeconds(i * 7), channel)))];
                readings += (await engine.Store.AppendAsync([new ReadingPack(source, Start, pack)], Token)).Accepted;
            }

            await engine.Sealer.SealEverythingAsync(Token);
        }

        readings += (await engine.Store.AppendAsync([new ReadingPack(Fir, Start, [new Reading("late", Start + TimeSpan.FromSeconds(3), -0.0, ReadingQuality.Late)])], Token)).Accepted;
        await engine.Quarantine.AddAsync([.. Enumerable.Range(0, 2).Select(i => new QuarantinedMessage(Start, "lab/hollin-vale/fir", new byte[] { (byte)i }, [new Finding("x", "/", "Wrong.", null, "Mend it.")]))], Token);
        return readings;
    }

    private static Reading At(Random random, Instant time, int channel) => random.Next(50) == 0
        ? new Reading($"t{channel}", time, double.NaN, ReadingQuality.NoValue)
        : new Reading($"t{channel}", time, channel == 1 ? Math.Round(500 + random.NextDouble(), 3) : random.NextDouble() * Math.Pow(10, random.Next(-300, 300)), random.Next(40) == 0 ? ReadingQuality.StampedOnArrival : ReadingQuality.None);

    private async Task<ReadingsOptions> OptionsAsync() => new()
    {
        DataDirectory = _directory.Path,
        PostgreSql = new PostgreSqlReadingsOptions { ConnectionString = await postgres.NewDatabaseAsync(Token) },
        InfluxDb = influx.NewDatabase(),
    };
}
