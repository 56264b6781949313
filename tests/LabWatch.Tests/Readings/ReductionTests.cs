using LabWatch.Lab.Identity;
using LabWatch.Lab.Time;
using LabWatch.Readings;
using LabWatch.Readings.Summaries;
using static LabWatch.Tests.Readings.StoreBench;

namespace LabWatch.Tests.Readings;

/// <summary>Reductions come from what was computed at sealing, and agree with the readings whatever state the hours are in.</summary>
public sealed class ReductionTests
{
    private const string GarbleBlocks = "UPDATE block SET data = zeroblob(length(data))";

    [Theory]
    [InlineData(60, true)]
    [InlineData(600, true)]
    [InlineData(3600, true)]
    [InlineData(86_400, true)]
    [InlineData(3600, false)]
    [InlineData(86_400, false)]
    public async Task Sealed_hours_are_reduced_without_decoding_their_readings(int bucketSeconds, bool hasHourly)
    {
        await using StoreBench bench = new();
        await FillAsync(bench, hours: 30, stepSeconds: 2);
        await bench.Store.SealEverythingAsync(Token);
        TimeWindow window = new(Noon, Noon + TimeSpan.FromHours(30));
        IReadOnlyList<ReadingSummary> before = await ReduceAsync(bench, window, bucketSeconds);
        bench.Sql(GarbleBlocks);
        if (!hasHourly)
        {
            bench.Sql("DELETE FROM hourly; UPDATE state SET value = 0 WHERE name = 'hourly_through'");
        }

        await bench.ReopenAsync();
        IReadOnlyList<ReadingSummary> after = await ReduceAsync(bench, window, bucketSeconds);
        Assert.Equal(before.Select(Exact), after.Select(Exact));
        Assert.All(before.Zip(after), pair => Assert.Equal(pair.First.Mean, pair.Second.Mean, 1e-9));
        Assert.Equal(30 * 1800, before.Sum(row => row.Count));
        Assert.Empty(bench.Store.Findings);
    }

    [Fact]
    public async Task A_chart_by_hour_reads_neither_blocks_nor_their_summaries()
    {
        await using StoreBench bench = new();
        await FillAsync(bench, hours: 50, stepSeconds: 20);
        await bench.Store.SealEverythingAsync(Token);
        TimeWindow window = new(Noon, Noon + TimeSpan.FromHours(50));
        IReadOnlyList<ReadingSummary> before = await ReduceAsync(bench, window, 3600);
        bench.Sql(GarbleBlocks + "; UPDATE summary SET data = zeroblob(length(data))");
        await bench.ReopenAsync();
        Assert.Equal(before, await ReduceAsync(bench, window, 3600));
        Assert.Equal(50, before.Count);
    }

    [Fact]
    public async Task Hours_in_memory_late_parts_and_cut_edges_agree_with_the_readings()
    {
        await using StoreBench bench = new();
        await FillAsync(bench, hours: 40, stepSeconds: 60);
        await bench.Store.SealEverythingAsync(Token);
        await bench.AppendAsync(5.5 * 3600 + 1, 400);
        await bench.AppendAsync(20.5 * 3600 + 1, 500);
        await bench.Store.SealEverythingAsync(Token);
        await bench.AppendAsync(10.5 * 3600 + 1, -400);
        await bench.AppendAsync(11.5 * 3600 + 1, -500);
        await bench.AppendAsync(45 * 3600, 7);
        for (int round = 0; round < 2; round++)
        {
            foreach (TimeWindow window in (TimeWindow[])[new(Noon, Noon + TimeSpan.FromHours(50)), new(Noon + TimeSpan.FromHours(5.25), Noon + TimeSpan.FromHours(33.1))])
            {
                ReadingWindow raw = await bench.Store.ReadAsync(Fir, ["t0"], window, Token);
                ReadingSeries series = raw.Series[0];
                foreach (int bucket in (int[])[3600, 7200, 86_400])
                {
                    List<ReadingSummary> expected = SummaryFold.Fold(series.TimeMicroseconds.Span, series.Values.Span, bucket * Instant.MicrosecondsPerSecond);
                    IReadOnlyList<ReadingSummary> found = await ReduceAsync(bench, window, bucket);
                    Assert.Equal(expected.Select(Exact), found.Select(Exact));
                    Assert.All(expected.Zip(found), pair => Assert.Equal(pair.First.Mean, pair.Second.Mean, 1e-9));
                }
            }

            await bench.ReopenAsync();
        }
    }

    [Fact]
    public async Task Damaged_rows_of_hours_are_passed_over()
    {
        await using StoreBench bench = new();
        await FillAsync(bench, hours: 30, stepSeconds: 60);
        await bench.Store.SealEverythingAsync(Token);
        TimeWindow window = new(Noon, Noon + TimeSpan.FromHours(30));
        IReadOnlyList<ReadingSummary> before = await ReduceAsync(bench, window, 3600);
        bench.Sql("UPDATE hourly SET data = zeroblob(length(data))");
        IReadOnlyList<ReadingSummary> after = await ReduceAsync(bench, window, 3600);
        Assert.Equal(before.Select(Exact), after.Select(Exact));
    }

    private static (Instant, int, double, double, double, double) Exact(ReadingSummary row) =>
        (row.Start, row.Count, row.First, row.Last, row.Minimum, row.Maximum);

    private static ValueTask<IReadOnlyList<ReadingSummary>> ReduceAsync(StoreBench bench, TimeWindow window, int bucketSeconds) =>
        bench.Store.ReduceAsync(new ChannelKey(Fir, "t0"), window, TimeSpan.FromSeconds(bucketSeconds), Token);

    private static async Task FillAsync(StoreBench bench, int hours, int stepSeconds)
    {
        Random random = new(3);
        for (int hour = 0; hour < hours; hour++)
        {
            int first = hour * 3600;
            await bench.Store.AppendAsync(
                [.. Enumerable.Range(0, 3600 / stepSeconds).Select(i => Pack(Fir, Noon + TimeSpan.FromSeconds(first + (i * stepSeconds)), Math.Round(100 + random.NextDouble(), 3), 1))],
                Token);
        }
    }
}
