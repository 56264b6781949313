using Microsoft.Data.Sqlite;

namespace LabWatch.SystemTests.Service;

public sealed class StoreStoppedTests
{
    [Fact]
    public async Task A_hazard_is_told_at_once_while_both_databases_are_stopped_and_nothing_is_lost()
    {
        CancellationToken token = TestContext.Current.CancellationToken;
        await using WebhookReceiver receiver = WebhookReceiver.Start();
        await using ServiceFixture fixture = new(text => text.Replace("https://messages.example/labwatch", receiver.Address.ToString(), StringComparison.Ordinal).Replace(", \"secretName\": \"gateway-key\"", string.Empty, StringComparison.Ordinal));
        await fixture.StartAsync(token);
        await using SurfaceDevice device = await SurfaceDevice.ConnectAsync(fixture.BrokerPort, token);
        await device.PublishAsync(24, token);

        long time;
        using (Stop(Path.Combine(fixture.Data, "readings.db")))
        using (Stop(Path.Combine(fixture.Data, "records.db")))
        {
            time = await device.PublishAsync(186, token);
            await Poll.UntilAsync("the message about the hot surface has arrived", () => Task.FromResult(receiver.Bodies.Any(body => body.Contains("hot-surface", StringComparison.Ordinal))), TimeSpan.FromSeconds(10), token, () => fixture.Service.Output);
            Assert.Single(await fixture.OpenAlertsAsync("hot-surface", token));
        }

        await Poll.UntilAsync(
            "the reading that came in meanwhile is stored",
            async () => (await fixture.ReadAsync("case", time, time + 1, token)).Count == 1,
            TimeSpan.FromSeconds(120), token, () => fixture.Service.Output);
        await Poll.UntilAsync(
            "the alert is on the record",
            async () => (await CountAsync(Path.Combine(fixture.Data, "records.db"), token)) > 0,
            TimeSpan.FromSeconds(120), token, () => fixture.Service.Output);
        Assert.Single(receiver.Bodies, body => body.Contains("hot-surface", StringComparison.Ordinal));
    }

    // A second writer that holds the lock stops every commit of the service, as a hung disk or a stray program would.
    private static SqliteConnection Stop(string database)
    {
        SqliteConnection connection = new(new SqliteConnectionStringBuilder { DataSource = database, Pooling = false }.ToString());
        connection.Open();
        using SqliteCommand begin = connection.CreateCommand();
        begin.CommandText = "BEGIN IMMEDIATE";
        begin.ExecuteNonQuery();
        return connection;
    }

    private static async Task<long> CountAsync(string database, CancellationToken token)
    {
        await using SqliteConnection connection = new(new SqliteConnectionStringBuilder { DataSource = database, Mode = SqliteOpenMode.ReadOnly, Pooling = false }.ToString());
        await connection.OpenAsync(token);
        await using SqliteCommand command = connection.CreateCommand();
        command.CommandText = "SELECT count(*) FROM alerts WHERE code = 'hot-surface'";
        return (long)(await command.ExecuteScalarAsync(token))!;
    }
}
