using LabWatch.Lab.Identity;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Time;
using LabWatch.Readings;
using static LabWatch.Tests.Readings.StoreBench;

namespace LabWatch.Tests.Readings;

/// <summary>Hours are sealed when they are over and quiet, earlier only where memory or journal are at their limit, and never rewritten.</summary>
public sealed class SealingTests
{
    [Fact]
    public async Task An_hour_is_sealed_when_it_is_over_and_has_been_quiet()
    {
        await using StoreBench bench = new();
        await bench.AppendAsync(0, 1);
        bench.Clock.Advance(TimeSpan.FromMinutes(59));
        Assert.Equal(0, await bench.Store.SealDueAsync(Token));
        await bench.AppendAsync(3_599, 2);
        bench.Clock.Advance(TimeSpan.FromSeconds(61));
        Assert.Equal(0, await bench.Store.SealDueAsync(Token));
        bench.Clock.Advance(TimeSpan.FromMinutes(2));
        Assert.Equal(1, await bench.Store.SealDueAsync(Token));
        Assert.Equal(0, await bench.Store.SealDueAsync(Token));
        await bench.Store.DisposeAsync();
        Assert.Equal(0, bench.Number("SELECT COUNT(*) FROM journal"));
    }

    [Fact]
    public async Task Late_readings_wait_longer_and_share_a_supplement_that_chains_to_the_block_before()
    {
        await using StoreBench bench = new();
        await bench.AppendAsync(-7_200, 1);
        await bench.Store.SealEverythingAsync(Token);
        for (int i = 1; i <= 5; i++)
        {
            await bench.AppendAsync(-7_200 + i, i);
            bench.Clock.Advance(TimeSpan.FromMinutes(3));
            Assert.Equal(0, await bench.Store.SealDueAsync(Token));
        }

        bench.Clock.Advance(TimeSpan.FromMinutes(10));
        Assert.Equal(1, await bench.Store.SealDueAsync(Token));
        IReadOnlyList<SealedHour> seals = await bench.Store.SealedHoursAsync(0, 10, Token);
        Assert.Equal([1, 5], seals.Select(one => one.Readings));
        await bench.Store.DisposeAsync();
        byte[] first = Blob(bench, 1);
        byte[] second = Blob(bench, 2);
        Assert.Equal(seals[0].Digest.ToArray(), System.Security.Cryptography.SHA256.HashData(first));
        Assert.Equal(seals[0].Digest.ToArray(), LabWatch.Readings.Blocks.SealedBlock.Open(second).Header.PreviousDigest.ToArray());
    }

    [Fact]
    public async Task Space_of_sealed_readings_goes_back_to_the_disk_but_for_a_reserve()
    {
        const long Reserve = 4096;
        await using StoreBench bench = new();
        Random random = new(7);
        for (int second = 0; second < 1_600; second++)
        {
            await bench.AppendAsync(second, [.. Enumerable.Range(0, 1_000).Select(_ => random.NextDouble())]);
        }

        Assert.True(bench.Number("SELECT SUM(LENGTH(data)) FROM journal") > Reserve * 2048 * 1.2);
        await bench.Store.SealEverythingAsync(Token);
        await bench.Store.SealDueAsync(Token);
        double[] values = await bench.ValuesAsync("t999");
        await bench.Store.DisposeAsync();

        Assert.Equal(1_600, values.Length);
        Assert.InRange(bench.Number("SELECT freelist_count FROM pragma_freelist_count"), 1, Reserve);
        Assert.Equal(0, bench.Number("SELECT COUNT(*) FROM pragma_integrity_check WHERE integrity_check <> 'ok'"));
    }

    [Fact]
    public async Task History_in_order_beside_live_packs_makes_one_part_an_hour_and_a_bounded_head()
    {
        await using StoreBench bench = new(new ReadingsOptions { DataDirectory = "", UnsealedReadingsLimit = 10_000, JournalBytesLimit = 1 << 20 });
        const int Hours = 48;
        SourceKey[] sources = [Fir, Yew];
        long live = 0;
        for (int hour = 0; hour < Hours; hour++)
        {
            for (int minute = 0; minute < 60; minute++)
            {
                Instant time = Noon + TimeSpan.FromHours(hour - Hours) + TimeSpan.FromMinutes(minute);
                List<ReadingPack> packs = [.. sources.Select(source => Pack(source, time, Enumerable.Range(0, 12).Select(i => minute + (0.1 * i)).ToArray()))];
                if (minute % 10 == 0)
                {
                    packs.Add(Pack(Fir, Noon + TimeSpan.FromSeconds(live++), 1, 2, 3));
                }

                Assert.Equal(packs.Sum(pack => pack.Readings.Count), (await bench.Store.AppendAsync(packs, Token)).Accepted);
                bench.Clock.Advance(TimeSpan.FromMilliseconds(500));
                if (bench.Store.NeedsSealing)
                {
                    await bench.Store.SealDueAsync(Token);
                    Assert.False(bench.Store.NeedsSealing);
                }
            }
        }

        await bench.CrashAsync();
        ReadingWindow window = await bench.Store.ReadAsync(Yew, null, new TimeWindow(Noon - TimeSpan.FromHours(Hours), Noon), Token);
        Assert.Equal(12, window.Series.Count);
        Assert.All(window.Series, series => Assert.Equal(Hours * 60, series.Count));
        Assert.Equal(live, (await bench.ValuesAsync("t0", 0)).Length);
        IReadOnlyList<SealedHour> seals = await bench.Store.SealedHoursAsync(0, 1000, Token);
        Assert.InRange(seals.Count, 40, (2 * Hours) + 10);
        Assert.True(seals.Count(one => one.Part > 0) <= 4, "history that comes in order must not fall apart into supplements");
    }

    [Fact]
    public async Task A_long_journal_is_shortened_by_sealing_what_holds_its_oldest_rows()
    {
        await using StoreBench bench = new(new ReadingsOptions { DataDirectory = "", JournalBytesLimit = 1 << 20 });
        double[] values = [.. Enumerable.Repeat(1.5, 1000)];
        for (int i = 0; !bench.Store.NeedsSealing; i++)
        {
            await bench.AppendAsync(i, values);
        }

        Assert.InRange(await bench.Store.SealDueAsync(Token), 1, 2);
        Assert.False(bench.Store.NeedsSealing);
        await bench.AppendAsync(1_000_000, 1);
        await bench.CrashAsync();
        Assert.InRange((await bench.ValuesAsync()).Length, 90, 110);
    }

    [Fact]
    public async Task Readings_go_on_while_an_hour_is_being_sealed()
    {
        await using StoreBench bench = new();
        Task sealing = Task.CompletedTask;
        for (int i = 0; i < 400; i++)
        {
            await bench.AppendAsync(i, i, -i);
            if (sealing.IsCompleted)
            {
                await sealing;
                sealing = bench.Store.SealEverythingAsync(Token);
            }

            double[] values = await bench.ValuesAsync();
            Assert.Equal(i + 1, values.Length);
            Assert.Equal(i, values[^1]);
        }

        await sealing;
        AppendResult again = await bench.AppendAsync(7, 7, 7);
        Assert.Equal((0, 1, 1), (again.Accepted, again.Duplicates, again.Conflicts.Count));
        await bench.CrashAsync();
        Assert.Equal(400, (await bench.ValuesAsync()).Length);
    }

    [Fact]
    public async Task Many_hours_in_one_commit_are_kept_and_forgotten_from_memory_once_sealed()
    {
        await using StoreBench bench = new();
        ReadingPack[] packs = [.. Enumerable.Range(0, 500).Select(hour => Pack(Fir, Noon + TimeSpan.FromHours(-hour), hour))];
        Assert.Equal(500, (await bench.Store.AppendAsync(packs, Token)).Accepted);
        await bench.Store.SealEverythingAsync(Token);
        AppendResult again = await bench.Store.AppendAsync(packs, Token);
        Assert.Equal((0, 500), (again.Accepted, again.Duplicates));
        Assert.Equal(500, (await bench.ValuesAsync()).Length);
    }

    private static byte[] Blob(StoreBench bench, long id)
    {
        using var connection = bench.Connect();
        using var command = connection.CreateCommand();
        command.CommandText = "SELECT data FROM block WHERE id = $id";
        command.Parameters.AddWithValue("$id", id);
        return (byte[])command.ExecuteScalar()!;
    }
}
