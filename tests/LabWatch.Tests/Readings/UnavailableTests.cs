using LabWatch.Lab.Time;
using LabWatch.Readings;
using Microsoft.Data.Sqlite;
using static LabWatch.Tests.Readings.StoreBench;

namespace LabWatch.Tests.Readings;

/// <summary>A store that cannot write says so, shows nothing half, keeps answering reads, and goes on by itself when it can.</summary>
public sealed class UnavailableTests
{
    [Fact]
    public async Task While_another_process_holds_the_file_appends_fail_and_reads_go_on()
    {
        await using StoreBench bench = new();
        await bench.AppendAsync(0, 1);
        using (SqliteConnection other = bench.Connect())
        {
            using SqliteTransaction hold = other.BeginTransaction(deferred: false);
            await Assert.ThrowsAsync<StoreUnavailableException>(async () => await bench.AppendAsync(1, 2, 3));
            Assert.Equal((double[])[1], await bench.ValuesAsync());
            Assert.Empty(await bench.ValuesAsync("t1"));
            await Assert.ThrowsAsync<StoreUnavailableException>(async () => await bench.Store.SealEverythingAsync(Token));
            Assert.Equal((double[])[1], await bench.ValuesAsync());
        }

        Assert.Equal(2, (await bench.AppendAsync(1, 2, 3)).Accepted);
        Assert.Equal(1, await bench.Store.SealEverythingAsync(Token));
        await bench.CrashAsync();
        Assert.Equal((double[])[1, 2], await bench.ValuesAsync());
    }

    [Fact]
    public async Task A_full_disk_refuses_whole_appends_and_sealing_until_there_is_room()
    {
        await using StoreBench bench = new();
        await bench.AppendAsync(0, 0);
        bool full = true;
        bench.OnWriterOpened = connection => Limit(connection, full);
        await bench.ReopenAsync();
        int stored = 1;
        StoreUnavailableException? refused = null;
        while (refused is null)
        {
            try
            {
                await bench.AppendAsync(stored, [.. Enumerable.Repeat((double)stored, 500)]);
                stored++;
            }
            catch (StoreUnavailableException error)
            {
                refused = error;
            }
        }

        Assert.InRange(stored, 2, 1000);
        Assert.Equal(stored, (await bench.ValuesAsync()).Length);
        full = false;
        Assert.Equal(500, (await bench.AppendAsync(stored, [.. Enumerable.Repeat((double)stored, 500)])).Accepted);
        Assert.Equal(stored + 1, (await bench.ValuesAsync("t0")).Length);
        await bench.CrashAsync();
        Assert.Equal(stored, (await bench.ValuesAsync("t499")).Length);
        Assert.Empty(bench.Store.Findings);
    }

    [Fact]
    public async Task A_read_only_database_refuses_appends_until_it_can_be_written()
    {
        await using StoreBench bench = new();
        await bench.AppendAsync(0, 0);
        bool readOnly = true;
        bench.OnWriterOpened = connection => Run(connection, $"PRAGMA query_only = {(readOnly ? 1 : 0)}");
        await bench.ReopenAsync();
        await Assert.ThrowsAsync<StoreUnavailableException>(async () => await bench.AppendAsync(1, 1));
        Assert.Equal((double[])[0], await bench.ValuesAsync());
        readOnly = false;
        Assert.Equal(1, (await bench.AppendAsync(1, 1)).Accepted);
    }

    [Fact]
    public async Task A_commit_that_became_durable_although_it_reported_a_failure_is_found_and_the_repeat_is_a_duplicate()
    {
        await using StoreBench bench = new();
        await bench.AppendAsync(0, 0);
        SqliteConnection? writer = null;
        bench.OnWriterOpened = connection => writer = connection;
        await bench.ReopenAsync();
        await bench.AppendAsync(1, 1);
        // The row of the commit appears behind the back of the store, as when the disk answers an error after the log was written.
        using (SqliteConnection other = bench.Connect())
        {
            LabWatch.Readings.Journal.JournalRow row = new();
            row.Begin();
            row.BeginPack(1);
            row.Add(0, (Noon + TimeSpan.FromSeconds(2)).Microseconds, 2, default);
            using SqliteCommand command = other.CreateCommand();
            command.CommandText = "INSERT INTO journal(seq, data) VALUES (3, $data)";
            command.Parameters.AddWithValue("$data", row.Finish(3));
            command.ExecuteNonQuery();
        }

        await Assert.ThrowsAsync<StoreUnavailableException>(async () => await bench.AppendAsync(2, 2));
        LabWatch.Readings.AppendResult again = await bench.AppendAsync(2, 2);
        Assert.Equal((0, 1), (again.Accepted, again.Duplicates));
        Assert.Equal((double[])[0, 1, 2], await bench.ValuesAsync());
        Assert.Equal(3, (await bench.Store.ChangesAsync(0, Token)).Change);
        Assert.NotNull(writer);
    }

    [Fact]
    public async Task New_channels_of_a_refused_append_are_forgotten_with_it()
    {
        await using StoreBench bench = new();
        await bench.AppendAsync(0, 0);
        using (SqliteConnection other = bench.Connect())
        {
            using SqliteTransaction hold = other.BeginTransaction(deferred: false);
            await Assert.ThrowsAsync<StoreUnavailableException>(async () => await bench.Store.AppendAsync([Pack(Yew, Noon, 1, 2), Pack(Fir, Noon, 0, 1)], Token));
        }

        await bench.Store.AppendAsync([Pack(Fir, Noon + TimeSpan.FromSeconds(1), 5, 6, 7)], Token);
        await bench.Store.AppendAsync([Pack(Yew, Noon, 8)], Token);
        await bench.CrashAsync();
        Assert.Equal((double[])[6], await bench.ValuesAsync("t1"));
        ReadingWindow yew = await bench.Store.ReadAsync(Yew, null, new TimeWindow(Noon, Noon + TimeSpan.FromHours(1)), Token);
        Assert.Equal(8, Assert.Single(yew.Series).Values.Span[0]);
    }

    [Fact]
    public async Task A_folder_that_cannot_be_made_is_unavailable_until_it_can()
    {
        await using StoreBench bench = new();
        string blocked = Path.Combine(bench.Folder, "blocked");
        await File.WriteAllTextAsync(blocked, "", Token);
        await using SqliteReadingStore store = new(
            bench.Options with { DataDirectory = Path.Combine(blocked, "data") }, bench.Clock,
            Microsoft.Extensions.Logging.Abstractions.NullLogger<SqliteReadingStore>.Instance);
        await Assert.ThrowsAsync<StoreUnavailableException>(async () => await store.AppendAsync([Pack(Fir, Noon, 1)], Token));
        File.Delete(blocked);
        Assert.Equal(1, (await store.AppendAsync([Pack(Fir, Noon, 1)], Token)).Accepted);
    }

    private static void Limit(SqliteConnection connection, bool full)
    {
        using SqliteCommand command = connection.CreateCommand();
        command.CommandText = "PRAGMA page_count";
        long pages = (long)command.ExecuteScalar()!;
        Run(connection, $"PRAGMA max_page_count = {(full ? pages + 40 : 1_000_000)}");
    }

    private static void Run(SqliteConnection connection, string sql)
    {
        using SqliteCommand command = connection.CreateCommand();
        command.CommandText = sql;
        command.ExecuteNonQuery();
    }
}
