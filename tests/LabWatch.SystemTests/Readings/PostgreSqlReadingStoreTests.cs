using LabWatch.Readings;
using LabWatch.Readings.Engine;
using LabWatch.SystemTests.Records;
using LabWatch.Tests.Readings;
using Microsoft.Extensions.Logging.Abstractions;
using Npgsql;

namespace LabWatch.SystemTests.Readings;

/// <summary>The contract on PostgreSQL, and what is its own: one writer, a newer format, a server that goes away.</summary>
[Collection(PostgreSqlCollection.Name)]
public sealed class PostgreSqlReadingStoreTests(PostgreSqlServer server) : ReadingStoreContract
{
    private readonly TemporaryDirectory _directory = new();
    private string? _database;

    public override async ValueTask DisposeAsync()
    {
        await base.DisposeAsync();
        _directory.Dispose();
    }

    protected override async ValueTask<IReadingStore> OpenAsync() => Make(_database ??= await server.NewDatabaseAsync(Token), _directory.Path);

    protected override async ValueTask SealAsync() => await ((IReadingSealer)Store).SealEverythingAsync(Token);

    [Fact]
    public async Task A_second_writer_is_refused_until_the_first_is_gone()
    {
        await AppendAsync(At("t1", 0, 20));
        using TemporaryDirectory elsewhere = new();
        await using BlockReadingStore second = Make(_database!, elsewhere.Path);
        StoreUnavailableException refused = await Assert.ThrowsAsync<StoreUnavailableException>(async () => await second.AppendAsync([Pack(Fir, At("t1", 1, 21))], Token));
        Assert.Contains("in use by another process", refused.Message, StringComparison.Ordinal);
        await Store.DisposeAsync();
        Assert.Equal(1, (await second.AppendAsync([Pack(Fir, At("t1", 1, 21))], Token)).Accepted);
    }

    [Fact]
    public async Task A_schema_of_a_newer_program_is_refused()
    {
        await AppendAsync(At("t1", 0, 20));
        await Store.DisposeAsync();
        await SqlAsync("UPDATE labwatch_readings.state SET value = 99 WHERE name = 'schema_version'");
        await using BlockReadingStore again = Make(_database!, _directory.Path);
        StoreUnavailableException refused = await Assert.ThrowsAsync<StoreUnavailableException>(async () => await again.AppendAsync([Pack(Fir, At("t1", 1, 21))], Token));
        Assert.Contains("newer program", refused.Message, StringComparison.Ordinal);
    }

    [Fact]
    public async Task A_connection_that_is_ended_in_the_middle_loses_and_doubles_nothing()
    {
        await AppendAsync(At("t1", 0, 0));
        int failures = 0;
        for (int i = 1; i <= 40; i++)
        {
            Task ending = i % 4 == 0 ? SqlAsync("SELECT pg_terminate_backend(pid) FROM pg_stat_activity WHERE application_name LIKE 'labwatch-readings-%'") : Task.CompletedTask;
            for (bool done = false; !done;)
            {
                try
                {
                    AppendResult result = await AppendAsync(At("t1", i, i));
                    Assert.Equal(1, result.Accepted + result.Duplicates);
                    done = true;
                }
                catch (StoreUnavailableException)
                {
                    failures++;
                }
            }

            await ending;
        }

        Assert.InRange(failures, 1, 1000);
        Assert.Equal(Enumerable.Range(0, 41).Select(i => (double)i), Values(await ReadAsync(0, 100), "t1"));
        await ReopenAsync();
        Assert.Equal(Enumerable.Range(0, 41).Select(i => (double)i), Values(await ReadAsync(0, 100), "t1"));
        Assert.Equal(41, (await Store.ChangesAsync(0, Token)).Change);
        Assert.Empty(((IReadingStoreHealth)Store).Findings);
    }

    [Fact]
    public async Task A_server_that_stops_is_unavailable_and_goes_on_when_it_is_back()
    {
        await AppendAsync(At("t1", 0, 0));
        await SealAsync();
        await server.ControlAsync("stop");
        await Assert.ThrowsAsync<StoreUnavailableException>(async () => await AppendAsync(At("t1", 1, 1)));
        await Assert.ThrowsAsync<StoreUnavailableException>(async () => await ReadAsync(0, 10));
        await server.ControlAsync("start");
        await AppendAsync(At("t1", 1, 1));
        Assert.Equal((double[])[0, 1], Values(await ReadAsync(0, 10), "t1"));
    }

    private static BlockReadingStore Make(string database, string directory) => PostgreSqlReadingStore.Create(
        new ReadingsOptions { DataDirectory = directory, Engine = ReadingsEngine.PostgreSql, PostgreSql = new PostgreSqlReadingsOptions { ConnectionString = database } },
        TimeProvider.System,
        NullLogger.Instance);

    private async Task SqlAsync(string sql)
    {
        await using NpgsqlConnection connection = new(_database);
        await connection.OpenAsync(Token);
        await using NpgsqlCommand command = new(sql, connection);
        await command.ExecuteNonQueryAsync(Token);
    }
}
