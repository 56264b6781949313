using LabWatch.Records;
using LabWatch.Records.Audit;
using LabWatch.Tests.Records.Contract;
using Microsoft.Data.Sqlite;
using Microsoft.Extensions.DependencyInjection;
using Microsoft.Extensions.Hosting;

namespace LabWatch.Tests.Records;

public sealed class RecordsStartTests : IDisposable
{
    private readonly string _directory = Directory.CreateTempSubdirectory("labwatch-records-").FullName;

    private static CancellationToken Token => TestContext.Current.CancellationToken;

    private string FilePath => Path.Combine(_directory, RecordsOptions.FileName);

    public void Dispose()
    {
        SqliteConnection.ClearAllPools();
        Directory.Delete(_directory, recursive: true);
    }

    [Fact]
    public async Task Records_survive_a_restart()
    {
        await using (SqliteRecords first = new(_directory))
        {
            await first.Assessments.RecordAsync(Sample.Assessment(Sample.Fir, 0), Token);
        }

        await using SqliteRecords second = new(_directory);
        Assert.Single(await second.Assessments.LatestAsync(Token));
        Assert.Equal(Sample.Window(0).End, await second.Assessments.WatermarkAsync(Sample.Fir, "stability", Token));
    }

    [Fact]
    public async Task The_file_uses_a_write_ahead_log_and_every_table_but_the_history_has_the_site()
    {
        await using SqliteRecords records = new(_directory);
        await records.Assessments.LatestAsync(Token);
        Assert.Equal("wal", await ScalarAsync("PRAGMA journal_mode;"));
        Assert.Equal(
            "__EFMigrationsHistory,__EFMigrationsLock",
            await ScalarAsync(
                """
                SELECT group_concat(name, ',') FROM (SELECT name FROM sqlite_master AS t WHERE type = 'table'
                AND NOT EXISTS (SELECT 1 FROM pragma_table_info(t.name) WHERE name = 'site') ORDER BY name);
                """));
    }

    [Fact]
    public async Task A_database_of_a_newer_program_is_refused_with_a_clear_message_and_left_alone()
    {
        await using (SqliteRecords records = new(_directory))
        {
            await records.Assessments.LatestAsync(Token);
        }

        await ScalarAsync("INSERT INTO \"__EFMigrationsHistory\" VALUES ('29990101000000_Future', '99.0.0');");
        await using SqliteRecords newer = new(_directory);
        RecordsVersionException refusal = await Assert.ThrowsAsync<RecordsVersionException>(async () => await newer.Assessments.LatestAsync(Token));
        Assert.Contains("29990101000000_Future", refusal.Message, StringComparison.Ordinal);
        Assert.Contains("newer version", refusal.Message, StringComparison.Ordinal);
        Assert.Equal([RecordsOptions.FileName], DatabaseFiles());
    }

    [Fact]
    public async Task The_file_is_copied_before_its_schema_changes()
    {
        await ScalarAsync(
            """
            CREATE TABLE "__EFMigrationsHistory" ("MigrationId" TEXT PRIMARY KEY, "ProductVersion" TEXT NOT NULL);
            CREATE TABLE kept (text TEXT); INSERT INTO kept VALUES ('before');
            """);
        await using SqliteRecords records = new(_directory);
        await records.Assessments.LatestAsync(Token);
        string copy = Assert.Single(Directory.GetFiles(_directory, "records.before-upgrade-*.db"));
        Assert.Equal("before", await ScalarAsync("SELECT text FROM kept;", copy));
        Assert.Equal(0L, await ScalarAsync("SELECT count(*) FROM sqlite_master WHERE name = 'assessments';", copy));
    }

    [Fact]
    public async Task A_migration_that_was_killed_does_not_block_the_next_start()
    {
        // What the ORM leaves behind when its process dies inside a migration.
        await ScalarAsync(
            """
            CREATE TABLE "__EFMigrationsLock" ("Id" INTEGER NOT NULL CONSTRAINT "PK___EFMigrationsLock" PRIMARY KEY, "Timestamp" TEXT NOT NULL);
            INSERT INTO "__EFMigrationsLock" VALUES (1, '2026-12-01 00:00:00+00:00');
            """);
        await using SqliteRecords records = new(_directory);
        Assert.Empty(await records.Assessments.LatestAsync(Token));
    }

    [Fact]
    public async Task A_locked_database_is_unavailable_and_answers_again_when_the_lock_is_gone()
    {
        await using SqliteRecords records = new(_directory);
        await records.Assessments.LatestAsync(Token);
        await using (SqliteConnection other = records.Connect())
        {
            await other.OpenAsync(Token);
            await using SqliteCommand command = other.CreateCommand();
            command.CommandText = "BEGIN EXCLUSIVE;";
            await command.ExecuteNonQueryAsync(Token);
            await Assert.ThrowsAsync<RecordsUnavailableException>(
                async () => await records.Assessments.RecordAsync(Sample.Assessment(Sample.Fir, 0), Token));
        }

        await records.Assessments.RecordAsync(Sample.Assessment(Sample.Fir, 0), Token);
        Assert.Single(await records.Assessments.LatestAsync(Token));
    }

    [Fact]
    public async Task A_start_goes_on_where_the_database_cannot_be_opened_and_every_use_says_so()
    {
        Directory.CreateDirectory(FilePath);
        await using ServiceProvider services = new ServiceCollection().AddLabWatchRecords(RecordsOptions.InDirectory(_directory)).BuildServiceProvider();
        IHostedService startup = Assert.Single(services.GetServices<IHostedService>(), service => service is not TrailHeadKeeper);
        await startup.StartAsync(Token);
        IPositionLedger positions = services.GetRequiredService<IPositionLedger>();
        await Assert.ThrowsAsync<RecordsUnavailableException>(async () => await positions.PositionAsync("any", Token));
        Directory.Delete(FilePath);
        Assert.Equal(0, await positions.PositionAsync("any", Token));
    }

    [Fact]
    public async Task A_start_does_not_wait_for_a_database_that_is_locked()
    {
        await using (SqliteRecords first = new(_directory))
        {
            await first.Assessments.LatestAsync(Token);
        }

        await using SqliteConnection other = new($"Data Source={FilePath};Pooling=False");
        await other.OpenAsync(Token);
        await using SqliteCommand command = other.CreateCommand();
        command.CommandText = "PRAGMA locking_mode = EXCLUSIVE; BEGIN EXCLUSIVE;";
        await command.ExecuteNonQueryAsync(Token);
        await using ServiceProvider services = new ServiceCollection()
            .AddLabWatchRecords(RecordsOptions.InDirectory(_directory) with { BusyTimeout = TimeSpan.FromMinutes(10) }).BuildServiceProvider();
        IHostedService[] startup = [.. services.GetServices<IHostedService>()];
        Assert.NotEmpty(startup);

        // Were the start to wait for the lock, this would not return before the busy time-out of ten minutes.
        Assert.All(startup, part => Assert.True(part.StartAsync(Token).IsCompletedSuccessfully));

        command.CommandText = "ROLLBACK;";
        await command.ExecuteNonQueryAsync(Token);
        await other.CloseAsync();
        Assert.Equal(0, await services.GetRequiredService<IPositionLedger>().PositionAsync("any", Token));
        foreach (IHostedService part in startup)
        {
            await part.StopAsync(Token);
        }
    }

    [Fact]
    public void Registering_twice_adds_nothing()
    {
        IServiceCollection services = new ServiceCollection().AddLabWatchRecords(RecordsOptions.InDirectory(_directory));
        int count = services.Count;
        Assert.Equal(count, services.AddLabWatchRecords(RecordsOptions.InDirectory(_directory)).Count);
    }

    [Fact]
    public void Options_are_checked_all_at_once() =>
        Assert.Equal(
            ["path-not-absolute", "out-of-range"],
            new RecordsOptions(RecordsProvider.Sqlite, "data") { BusyTimeout = TimeSpan.Zero }.Validate().Select(finding => finding.Code));

    [Fact]
    public void PostgreSql_needs_a_connection_string() =>
        Assert.Equal("connection-missing", Assert.Single(new RecordsOptions(RecordsProvider.PostgreSql, _directory).Validate()).Code);

    private string[] DatabaseFiles() => [.. Directory.GetFiles(_directory, "*.db").Select(path => Path.GetFileName(path))];

    private async Task<object?> ScalarAsync(string sql, string? path = null)
    {
        await using SqliteConnection connection = new($"Data Source={path ?? FilePath};Pooling=False");
        await connection.OpenAsync(Token);
        await using SqliteCommand command = connection.CreateCommand();
        command.CommandText = sql;
        return await command.ExecuteScalarAsync(Token);
    }
}
