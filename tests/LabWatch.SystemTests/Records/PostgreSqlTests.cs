using LabWatch.Records;
using LabWatch.Tests.Records.Contract;
using Npgsql;

namespace LabWatch.SystemTests.Records;

[Collection(PostgreSqlCollection.Name)]
public sealed class PostgreSqlTests(PostgreSqlServer server)
{
    private static CancellationToken Token => TestContext.Current.CancellationToken;

    [Fact]
    public async Task Two_nodes_write_in_turns_and_number_without_gaps()
    {
        string database = await server.NewDatabaseAsync(Token);
        await using PostgreSqlRecords one = new(database), other = new(database);
        await Parallel.ForAsync(
            0, 40, Token, async (index, token) => await (index % 2 == 0 ? one : other).Assessments.RecordAsync(Sample.Assessment(Sample.Fir, index), token));
        Assert.Equal(Enumerable.Range(1, 40).Select(number => (long)number), (await one.Assessments.QueuedAsync(0, 100, Token)).Select(item => item.Sequence));
    }

    [Fact]
    public async Task A_server_that_goes_away_is_unavailable_and_answers_again_when_it_is_back()
    {
        await using PostgreSqlRecords records = new(await server.NewDatabaseAsync(Token));
        await records.Assessments.RecordAsync(Sample.Assessment(Sample.Fir, 0), Token);
        await server.ControlAsync("stop");
        await Assert.ThrowsAsync<RecordsUnavailableException>(async () => await records.Assessments.LatestAsync(Token));
        await Assert.ThrowsAsync<RecordsUnavailableException>(async () => await records.Assessments.RecordAsync(Sample.Assessment(Sample.Fir, 1), Token));
        await server.ControlAsync("start");
        NpgsqlConnection.ClearAllPools();
        await records.Assessments.RecordAsync(Sample.Assessment(Sample.Fir, 1), Token);
        Assert.Equal(2, (await records.Assessments.QueuedAsync(0, 10, Token)).Count);
    }

    [Fact]
    public async Task A_database_of_a_newer_program_is_refused()
    {
        string database = await server.NewDatabaseAsync(Token);
        await using (PostgreSqlRecords records = new(database))
        {
            await records.Assessments.LatestAsync(Token);
        }

        await using (NpgsqlConnection connection = new(database))
        {
            await connection.OpenAsync(Token);
            await using NpgsqlCommand insert = new("INSERT INTO \"__EFMigrationsHistory\" VALUES ('29990101000000_Future', '99.0.0')", connection);
            await insert.ExecuteNonQueryAsync(Token);
        }

        await using PostgreSqlRecords newer = new(database);
        Assert.Contains(
            "newer version",
            (await Assert.ThrowsAsync<RecordsVersionException>(async () => await newer.Assessments.LatestAsync(Token))).Message,
            StringComparison.Ordinal);
    }
}
