using LabWatch.Lab.Readings;
using LabWatch.Lab.Time;
using LabWatch.Readings;
using static LabWatch.Tests.Readings.StoreBench;

namespace LabWatch.Tests.Readings;

/// <summary>The files as a kill would leave them, at every step: nothing that was committed is gone, nothing is doubled, and damage is set aside and said.</summary>
public sealed class CrashTests
{
    [Fact]
    public async Task After_a_kill_between_any_two_steps_everything_committed_is_there_once()
    {
        await using StoreBench bench = new();
        Random random = new(11);
        SortedDictionary<double, double> expected = [];
        for (int step = 0; step < 60; step++)
        {
            double seconds = random.Next(0, 4 * 3600);
            if (expected.TryAdd(seconds, step))
            {
                AppendResult result = await bench.AppendAsync(seconds, step);
                Assert.Equal(1, result.Accepted);
            }

            if (step % 7 == 3)
            {
                await bench.Store.SealEverythingAsync(Token);
            }

            if (step % 3 == 1)
            {
                await bench.CrashAsync();
                Assert.Equal(expected.Values, await bench.ValuesAsync());
                Assert.Empty(bench.Store.Findings);
            }
        }

        AppendResult again = await bench.Store.AppendAsync([.. expected.Select(one => Pack(Fir, Noon + TimeSpan.FromSeconds(one.Key), one.Value))], Token);
        Assert.Equal((0, expected.Count), (again.Accepted, again.Duplicates));
    }

    [Fact]
    public async Task Revisions_and_change_numbers_survive_a_kill()
    {
        await using StoreBench bench = new();
        await bench.AppendAsync(0, 1, 2);
        await bench.AppendAsync(3600, 1);
        TimeWindow window = new(Noon, Noon + TimeSpan.FromHours(2));
        var hours = await bench.Store.HoursAsync(Fir, window, Token);
        ChangedHours changes = await bench.Store.ChangesAsync(1, Token);
        await bench.CrashAsync();
        Assert.Equal(hours, await bench.Store.HoursAsync(Fir, window, Token));
        ChangedHours after = await bench.Store.ChangesAsync(1, Token);
        Assert.Equal(changes.Change, after.Change);
        Assert.Equal(changes.Hours, after.Hours);
    }

    [Fact]
    public async Task A_kill_between_sealing_and_dropping_the_journal_doubles_nothing()
    {
        await using StoreBench bench = new();
        await bench.AppendAsync(0, 1);
        await bench.AppendAsync(3600, 2);
        byte[][] rows = JournalRows(bench);
        await bench.Store.SealEverythingAsync(Token);
        await bench.Store.DisposeAsync();
        using (var connection = bench.Connect())
        {
            for (int i = 0; i < rows.Length; i++)
            {
                using var command = connection.CreateCommand();
                command.CommandText = "INSERT INTO journal(seq, data) VALUES ($seq, $data); UPDATE state SET value = 0 WHERE name = 'journal_floor'";
                command.Parameters.AddWithValue("$seq", i + 1);
                command.Parameters.AddWithValue("$data", rows[i]);
                command.ExecuteNonQuery();
            }
        }

        await bench.ReopenAsync();
        Assert.Equal((double[])[1, 2], await bench.ValuesAsync());
        Assert.Equal(0, await bench.Store.SealEverythingAsync(Token));
    }

    [Theory]
    [InlineData("UPDATE journal SET data = substr(data, 1, length(data) - 3) WHERE seq = 2")]
    [InlineData("UPDATE journal SET data = zeroblob(length(data)) WHERE seq = 2")]
    [InlineData("UPDATE journal SET data = x'' WHERE seq = 2")]
    public async Task A_damaged_journal_row_is_set_aside_with_its_bytes_and_the_rest_is_there(string damage)
    {
        await using StoreBench bench = new();
        for (int i = 0; i < 3; i++)
        {
            await bench.AppendAsync(i, i);
        }

        await bench.Store.DisposeAsync();
        bench.Sql(damage);
        for (int round = 0; round < 2; round++)
        {
            await bench.ReopenAsync();
            Assert.Equal((double[])[0, 2], await bench.ValuesAsync());
            Assert.Equal("set-aside-journal", Assert.Single(bench.Store.Findings).Code);
        }

        await bench.Store.DisposeAsync();
        Assert.Equal(1, bench.Number("SELECT COUNT(*) FROM set_aside WHERE kind = 'journal' AND reference = 2 AND data IS NOT NULL"));
        await bench.ReopenAsync();
        Assert.Equal(1, (await bench.AppendAsync(1, 1)).Accepted);
        Assert.Equal((double[])[0, 1, 2], await bench.ValuesAsync());
    }

    [Fact]
    public async Task Commits_gone_from_the_end_or_the_middle_are_noticed_and_their_numbers_never_used_again()
    {
        await using StoreBench bench = new();
        for (int i = 0; i < 5; i++)
        {
            await bench.AppendAsync(i, i);
        }

        await bench.Store.DisposeAsync();
        bench.Sql("DELETE FROM journal WHERE seq IN (2, 5)");
        await bench.ReopenAsync();
        Assert.Equal((double[])[0, 2, 3], await bench.ValuesAsync());
        Assert.Equal(["set-aside-missing", "set-aside-missing"], bench.Store.Findings.Select(one => one.Code));
        Assert.Contains("Commits 5 to 5", bench.Store.Findings[1].Message, StringComparison.Ordinal);
        await bench.AppendAsync(9, 9);
        Assert.Equal(6, (await bench.Store.ChangesAsync(0, Token)).Change);
        await bench.ReopenAsync();
        await bench.Store.OpenAsync(Token);
        Assert.Equal(2, bench.Store.Findings.Count);
    }

    [Fact]
    public async Task A_torn_write_ahead_log_opens_with_what_is_whole_and_says_what_is_missing()
    {
        await using StoreBench bench = new();
        for (int i = 0; i < 20; i++)
        {
            await bench.AppendAsync(i, i);
        }

        await bench.CrashAsync(folder =>
        {
            using FileStream log = new(Path.Combine(folder, SqliteReadingStore.FileName + "-wal"), FileMode.Open, FileAccess.ReadWrite);
            log.SetLength(log.Length * 3 / 4);
        });
        double[] values = await bench.ValuesAsync();
        Assert.InRange(values.Length, 1, 19);
        Assert.Equal(Enumerable.Range(0, values.Length).Select(i => (double)i), values);
        Assert.Equal("set-aside-missing", Assert.Single(bench.Store.Findings).Code);
    }

    [Fact]
    public async Task A_damaged_block_is_passed_over_and_said_and_its_readings_can_come_again()
    {
        await using StoreBench bench = new();
        await bench.AppendAsync(0, 1);
        await bench.AppendAsync(3600, 2);
        await bench.Store.SealEverythingAsync(Token);
        await bench.Store.DisposeAsync();
        bench.Sql("UPDATE block SET data = zeroblob(length(data)) WHERE id = 1");
        await bench.ReopenAsync();
        Assert.Equal((double[])[2], await bench.ValuesAsync());
        Assert.Equal("set-aside-block", Assert.Single(bench.Store.Findings).Code);
        TimeWindow window = new(Noon, Noon + TimeSpan.FromHours(2));
        Assert.Single(await bench.Store.HoursAsync(Fir, window, Token));
        Assert.Equal(1, (await bench.AppendAsync(0, 1)).Accepted);
        await bench.Store.SealEverythingAsync(Token);
        await bench.ReopenAsync();
        Assert.Equal((double[])[1, 2], await bench.ValuesAsync());
        Assert.Single(bench.Store.Findings);
        await bench.Store.DisposeAsync();
        Assert.Equal(3, bench.Number("SELECT COUNT(*) FROM block"));
    }

    [Fact]
    public async Task A_damaged_summary_costs_nothing_but_time()
    {
        await using StoreBench bench = new();
        for (int i = 0; i < 100; i++)
        {
            await bench.AppendAsync(i * 36, i);
        }

        await bench.Store.SealEverythingAsync(Token);
        await bench.Store.DisposeAsync();
        bench.Sql("UPDATE summary SET data = zeroblob(length(data))");
        await bench.ReopenAsync();
        IReadOnlyList<ReadingSummary> rows = await bench.Store.ReduceAsync(
            new(Fir, "t0"), new TimeWindow(Noon, Noon + TimeSpan.FromHours(1)), TimeSpan.FromHours(1), Token);
        Assert.Equal((100, 49.5), (Assert.Single(rows).Count, rows[0].Mean));
    }

    [Fact]
    public async Task A_file_that_is_no_database_is_moved_aside_and_a_new_store_takes_readings()
    {
        await using StoreBench bench = new();
        await File.WriteAllTextAsync(bench.Database, new string('x', 10_000), Token);
        Assert.Equal(1, (await bench.AppendAsync(0, 1)).Accepted);
        Assert.Equal("set-aside-file", Assert.Single(bench.Store.Findings).Code);
        Assert.Single(Directory.GetFiles(bench.Folder, "*.set-aside-*"));
    }

    [Fact]
    public async Task A_second_process_is_refused()
    {
        await using StoreBench bench = new();
        await bench.AppendAsync(0, 1);
        await using SqliteReadingStore second = new(bench.Options, bench.Clock, Microsoft.Extensions.Logging.Abstractions.NullLogger<SqliteReadingStore>.Instance);
        await Assert.ThrowsAsync<StoreUnavailableException>(async () => await second.AppendAsync([Pack(Fir, Noon, 1)], Token));
    }

    [Fact]
    public async Task The_quality_and_the_newest_reading_survive_a_kill()
    {
        await using StoreBench bench = new();
        Reading last = new("t0", Noon + TimeSpan.FromSeconds(1), double.NaN, ReadingQuality.NoValue | ReadingQuality.Late);
        await bench.Store.AppendAsync([new ReadingPack(Fir, Noon, [new Reading("t0", Noon, 1), last])], Token);
        await bench.CrashAsync();
        Assert.Equal([last], await bench.Store.NewestAsync(Fir, Token));
    }

    private static byte[][] JournalRows(StoreBench bench)
    {
        using var connection = bench.Connect();
        using var command = connection.CreateCommand();
        command.CommandText = "SELECT data FROM journal ORDER BY seq";
        using var reader = command.ExecuteReader();
        List<byte[]> rows = [];
        while (reader.Read())
        {
            rows.Add(reader.GetFieldValue<byte[]>(0));
        }

        return [.. rows];
    }
}
