using LabWatch.Lab.Assessments;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Time;
using LabWatch.Readings;

namespace LabWatch.Tests.Readings;

/// <summary>What every engine does. An engine's test class inherits these and says how to open, reopen and seal.</summary>
public abstract class ReadingStoreContract : IAsyncLifetime
{
    protected static readonly SourceKey Fir = new("hollin-vale", "fir");
    protected static readonly SourceKey Yew = new("hollin-vale", "yew");
    protected static readonly Instant Noon = Instant.FromUnixSeconds(1_764_590_400);

    protected static CancellationToken Token => TestContext.Current.CancellationToken;

    protected IReadingStore Store { get; private set; } = null!;

    /// <summary>Whether the engine seals hours.</summary>
    protected virtual bool Seals => true;

    public async ValueTask InitializeAsync() => Store = await OpenAsync();

    public virtual async ValueTask DisposeAsync()
    {
        // There is none where the test was skipped.
        await ((IReadingStore?)Store is { } store ? store.DisposeAsync() : ValueTask.CompletedTask);
        GC.SuppressFinalize(this);
    }

    protected abstract ValueTask<IReadingStore> OpenAsync();

    /// <summary>Seals everything, so that reads come from blocks.</summary>
    protected abstract ValueTask SealAsync();

    protected async ValueTask ReopenAsync()
    {
        await Store.DisposeAsync();
        Store = await OpenAsync();
    }

    protected static Reading At(string channel, double seconds, double value, ReadingQuality quality = ReadingQuality.None) =>
        new(channel, Noon + TimeSpan.FromSeconds(seconds), value, quality);

    protected static ReadingPack Pack(SourceKey source, params Reading[] readings) => new(source, Noon, readings);

    protected async ValueTask<AppendResult> AppendAsync(params Reading[] readings) => await Store.AppendAsync([Pack(Fir, readings)], Token);

    protected async ValueTask<ReadingWindow> ReadAsync(double fromSeconds, double toSeconds, params string[] channels) => await Store.ReadAsync(
        Fir, channels.Length == 0 ? null : channels, new TimeWindow(Noon + TimeSpan.FromSeconds(fromSeconds), Noon + TimeSpan.FromSeconds(toSeconds)), Token);

    protected static double[] Values(ReadingWindow window, string channel) => window.Find(channel)?.Values.ToArray() ?? [];

    [Theory]
    [InlineData(false, false)]
    [InlineData(false, true)]
    [InlineData(true, false)]
    [InlineData(true, true)]
    public async Task Readings_come_back_bit_for_bit_open_sealed_and_after_a_restart(bool seal, bool reopen)
    {
        double[] values = [20.125, -0.0, 1e-310, double.NaN, 1.0 / 3.0, 20.126];
        await AppendAsync([.. values.Select((value, i) => At("t1", i, value, double.IsNaN(value) ? ReadingQuality.NoValue : ReadingQuality.None))]);
        if (seal)
        {
            await SealAsync();
        }

        if (reopen)
        {
            await ReopenAsync();
        }

        ReadingWindow window = await ReadAsync(0, 10);
        ReadingSeries series = Assert.Single(window.Series);
        Assert.Equal(values.Select(BitConverter.DoubleToInt64Bits), series.Values.ToArray().Select(BitConverter.DoubleToInt64Bits));
        Assert.Equal(Enumerable.Range(0, 6).Select(i => Noon.Microseconds + (i * 1_000_000L)), series.TimeMicroseconds.ToArray());
        Assert.Equal(ReadingQuality.NoValue, series.Qualities.Span[3]);
        Assert.Equal([new SourceHourRead(Noon, 6)], window.Hours);
    }

    [Theory]
    [InlineData(false, false)]
    [InlineData(true, false)]
    [InlineData(true, true)]
    [InlineData(false, true)]
    public async Task The_first_value_stays_repeats_are_counted_and_conflicts_returned(bool seal, bool reopen)
    {
        AppendResult first = await AppendAsync(At("t1", 0, 20), At("t1", 1, double.NaN, ReadingQuality.NoValue), At("t2", 0, 30));
        Assert.Equal(3, first.Accepted);
        if (seal)
        {
            await SealAsync();
        }

        if (reopen)
        {
            await ReopenAsync();
        }

        AppendResult again = await AppendAsync(
            At("t1", 0, 20), At("t1", 1, double.NaN, ReadingQuality.NoValue), At("t2", 0, 31), At("t2", 1, 32));
        Assert.Equal((1, 2), (again.Accepted, again.Duplicates));
        ReadingConflict conflict = Assert.Single(again.Conflicts);
        Assert.Equal((Fir, 31.0, 30.0, "t2"), (conflict.Source, conflict.Refused.Value, conflict.StoredValue, conflict.Refused.Channel));
        Assert.Equal((double[])[30.0, 32.0], Values(await ReadAsync(0, 10), "t2"));
    }

    [Fact]
    public async Task A_repeat_inside_one_commit_is_a_duplicate()
    {
        AppendResult result = await Store.AppendAsync([Pack(Fir, At("t1", 0, 20), At("t1", 0, 20)), Pack(Fir, At("t1", 0, 20), At("t1", 0, 21))], Token);
        Assert.Equal((1, 2, 1), (result.Accepted, result.Duplicates, result.Conflicts.Count));
    }

    [Theory]
    [InlineData(false)]
    [InlineData(true)]
    public async Task Readings_out_of_order_come_back_in_order(bool seal)
    {
        await AppendAsync(At("t1", 3, 3), At("t1", 1, 1), At("t1", 2, 2));
        await AppendAsync(At("t1", 0, 0), At("t1", 5, 5), At("t1", 4, 4));
        if (seal)
        {
            await SealAsync();
        }

        AppendResult again = await AppendAsync(At("t1", 2, 2), At("t1", 4, 4.5));
        Assert.Equal((0, 1, 1), (again.Accepted, again.Duplicates, again.Conflicts.Count));
        Assert.Equal((double[])[0.0, 1, 2, 3, 4, 5], Values(await ReadAsync(0, 10), "t1"));
    }

    [Fact]
    public async Task Late_readings_of_a_sealed_hour_join_it_and_change_its_revision()
    {
        await AppendAsync(At("t1", 0, 0), At("t1", 2, 2));
        await SealAsync();
        long before = (await Store.ChangesAsync(0, Token)).Change;
        await AppendAsync(At("t1", 1, 1), At("t2", 1, 7));
        for (int round = 0; round < 3; round++)
        {
            ReadingWindow window = await ReadAsync(0, 10);
            Assert.Equal((double[])[0, 1, 2], Values(window, "t1"));
            Assert.Equal([new SourceHourRead(Noon, 4)], window.Hours);
            Assert.Equal(window.Hours, await Store.HoursAsync(Fir, window.Window, Token));
            Assert.Equal([(Fir, Noon)], (await Store.ChangesAsync(before, Token)).Hours);
            await (round == 0 ? SealAsync() : ReopenAsync());
        }
    }

    [Fact]
    public async Task Reads_are_cut_to_the_window_and_to_the_channels()
    {
        await AppendAsync([.. Enumerable.Range(0, 20).SelectMany(i => new[] { At("t1", i * 600, i), At("t2", i * 600, -i), At("t3", i * 600, 0) })]);
        for (int round = 0; round < 2; round++)
        {
            ReadingWindow window = await ReadAsync(3_000, 4_800, "t2", "absent");
            Assert.Equal(["t2"], window.Series.Select(one => one.Channel));
            Assert.Equal((double[])[-5, -6, -7], Values(window, "t2"));
            Assert.Equal(2, window.Hours.Count);
            await SealAsync();
        }

        Assert.Empty((await ReadAsync(20_000, 30_000)).Series);
        Assert.Empty((await Store.ReadAsync(Yew, null, new TimeWindow(Noon, Noon + TimeSpan.FromHours(1)), Token)).Series);
    }

    [Fact]
    public async Task Newest_is_the_latest_by_device_time_also_after_sealing_and_restart()
    {
        await AppendAsync(At("t1", 5, 5), At("t1", 2, 2), At("t2", 1, 1));
        for (int round = 0; round < 3; round++)
        {
            IReadOnlyList<Reading> newest = await Store.NewestAsync(Fir, Token);
            Assert.Equal([At("t1", 5, 5), At("t2", 1, 1)], newest);
            await (round == 0 ? SealAsync() : ReopenAsync());
        }

        Assert.Empty(await Store.NewestAsync(Yew, Token));
    }

    [Theory]
    [InlineData(60, 1)]
    [InlineData(600, 1)]
    [InlineData(3600, 1)]
    [InlineData(10, 1)]
    [InlineData(60, 10)]
    [InlineData(3600, 10)]
    public async Task Reduced_buckets_agree_with_the_raw_readings(int bucketSeconds, int stepSeconds)
    {
        Random random = new(7);
        Reading[] readings = [.. Enumerable.Range(0, 9_000 / stepSeconds).Select(i => i % 97 == 5
            ? At("t1", i * stepSeconds, double.NaN, ReadingQuality.NoValue)
            : At("t1", i * stepSeconds, Math.Round(500 + random.NextDouble(), 3)))];
        await AppendAsync(readings);
        TimeWindow window = new(Noon + TimeSpan.FromSeconds(125), Noon + TimeSpan.FromSeconds(8_000));
        for (int round = 0; round < 2; round++)
        {
            IReadOnlyList<ReadingSummary> rows = await Store.ReduceAsync(new ChannelKey(Fir, "t1"), window, TimeSpan.FromSeconds(bucketSeconds), Token);
            AssertRows(rows, readings.Where(one => window.Contains(one.Time) && !double.IsNaN(one.Value)), bucketSeconds);
            await SealAsync();
        }
    }

    [Fact]
    public async Task Changes_name_the_hours_since_a_number_once()
    {
        await AppendAsync(At("t1", 0, 0));
        ChangedHours first = await Store.ChangesAsync(0, Token);
        Assert.Equal([(Fir, Noon)], first.Hours);
        Assert.Empty((await Store.ChangesAsync(first.Change, Token)).Hours);
        await Store.AppendAsync([Pack(Yew, At("t1", 4_000, 1)), Pack(Yew, At("t1", 4_001, 1))], Token);
        ChangedHours second = await Store.ChangesAsync(first.Change, Token);
        Assert.Equal([(Yew, Noon + TimeSpan.FromHours(1))], second.Hours);
        await SealAsync();
        await ReopenAsync();
        Assert.Equal(second.Hours, (await Store.ChangesAsync(first.Change, Token)).Hours);
        Assert.Equal(2, (await Store.ChangesAsync(0, Token)).Hours.Count);
        Assert.Empty((await Store.ChangesAsync(second.Change, Token)).Hours);
    }

    [Fact]
    public async Task Repeats_alone_change_nothing()
    {
        await AppendAsync(At("t1", 0, 0));
        long change = (await Store.ChangesAsync(0, Token)).Change;
        await AppendAsync(At("t1", 0, 0));
        Assert.Equal(change, (await Store.ChangesAsync(0, Token)).Change);
    }

    [Fact]
    public async Task Sealed_hours_are_numbered_in_order_with_their_digest()
    {
        Assert.SkipUnless(Seals, "This engine does not seal hours.");
        await AppendAsync(At("t1", 0, 0), At("t1", 3_600, 1));
        await SealAsync();
        await AppendAsync(At("t1", 1, 1));
        await SealAsync();
        IReadOnlyList<SealedHour> all = await Store.SealedHoursAsync(0, 100, Token);
        Assert.Equal([(1L, 0), (2, 0), (3, 1)], all.Select(one => (one.Seal, one.Part)));
        Assert.All(all, one => Assert.Equal(32, one.Digest.Length));
        Assert.Equal(3, all.Select(one => Convert.ToHexString(one.Digest.Span)).Distinct().Count());
        Assert.Equal([2L], (await Store.SealedHoursAsync(1, 1, Token)).Select(one => one.Seal));
    }

    private static void AssertRows(IReadOnlyList<ReadingSummary> rows, IEnumerable<Reading> readings, int bucketSeconds)
    {
        IGrouping<Instant, Reading>[] expected = [.. readings.GroupBy(one => one.Time.Floor(bucketSeconds * Instant.MicrosecondsPerSecond))];
        Assert.Equal(expected.Select(one => one.Key), rows.Select(row => row.Start));
        for (int i = 0; i < rows.Count; i++)
        {
            double[] values = [.. expected[i].Select(one => one.Value)];
            double mean = values.Average();
            ReadingSummary row = rows[i];
            Assert.Equal(
                (values.Length, values[0], values[^1], values.Min(), values.Max()), (row.Count, row.First, row.Last, row.Minimum, row.Maximum));
            Assert.Equal(mean, row.Mean, 1e-12 * 500);
            Assert.Equal(values.Sum(value => (value - mean) * (value - mean)), row.SumOfSquaredDeviations, 1e-9);
        }
    }
}
