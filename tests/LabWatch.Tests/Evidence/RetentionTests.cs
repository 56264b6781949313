using System.CommandLine;
using LabWatch.Evidence.Recording;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Time;
using LabWatch.Readings;
using LabWatch.Readings.Retention;
using LabWatch.Records.Audit;
using LabWatch.Service.Commands;
using LabWatch.Tests.Records;
using Microsoft.Data.Sqlite;
using Microsoft.Extensions.Logging.Abstractions;

namespace LabWatch.Tests.Evidence;

/// <summary>Old raw readings go only when told to, on the record; what stays is still verified.</summary>
public sealed class RetentionTests
{
    private static readonly SourceKey Fir = new("hollin-vale", "fir");
    private static readonly Instant Old = (Instant.Now(TimeProvider.System) - TimeSpan.FromDays(12 * 366)).StartOfHour();
    private static readonly Instant Recent = (Instant.Now(TimeProvider.System) - TimeSpan.FromDays(30)).StartOfHour();

    private static CancellationToken Token => TestContext.Current.CancellationToken;

    [Fact]
    public async Task A_dry_run_lists_and_changes_nothing_and_removal_is_on_the_record()
    {
        await using SqliteRecords records = await FilledAsync();
        (int code, string output) = Run(records, RetentionCommand.Create(), "retention");
        Assert.Equal(ExitCode.Success, code);
        Assert.Contains("240 raw readings are older than they must be kept. Nothing was changed", output, StringComparison.Ordinal);
        (code, output) = Run(records, VerifyCommand.Create(), "verify");
        Assert.True(code == ExitCode.Success, output);
        Assert.DoesNotContain("rules of retention", output, StringComparison.Ordinal);
        Assert.NotEqual(ExitCode.Success, Run(records, RetentionCommand.Create(), "retention", "--apply").Code);

        (code, output) = Run(records, RetentionCommand.Create(), "retention", "--apply", "--by", "kim", "--reason", "QM 4.2: ten years");
        Assert.Equal(ExitCode.Success, code);
        Assert.Contains("Removed 240 raw readings", output, StringComparison.Ordinal);
        (code, output) = Run(records, VerifyCommand.Create(), "verify");
        Assert.True(code == ExitCode.Success, output);
        Assert.Contains("Readings of 2 sealed parts were removed by the rules of retention", output, StringComparison.Ordinal);
        AuditEntry entry = Assert.Single((await records.Audit.ListAsync(new AuditQuery("hollin-vale", 20), Token)).Items, one => one.Action == AuditActions.ReadingsRemoved);
        Assert.Equal("kim", (string?)entry.Content["by"]);
        (code, output) = Run(records, RetentionCommand.Create(), "retention");
        Assert.Contains("No raw readings are older", output, StringComparison.Ordinal);
    }

    [Fact]
    public async Task Summaries_revisions_and_what_is_younger_stay()
    {
        await using SqliteRecords records = await FilledAsync();
        TimeWindow old = new(Old, Old + TimeSpan.FromHours(3));
        IReadOnlyList<ReadingSummary> minutes;
        await using (SqliteReadingStore store = Open(records))
        {
            minutes = await store.ReduceAsync(new ChannelKey(Fir, "a"), old, TimeSpan.FromHours(1), Token);
        }

        Run(records, RetentionCommand.Create(), "retention", "--apply", "--by", "kim", "--reason", "ten years");
        await using SqliteReadingStore after = Open(records);
        ReadingWindow window = await after.ReadAsync(Fir, null, old, Token);
        Assert.Empty(window.Series);
        Assert.Equal([120L, 120L], window.Hours.Select(hour => hour.Revision));
        Assert.Equal(minutes, await after.ReduceAsync(new ChannelKey(Fir, "a"), old, TimeSpan.FromHours(1), Token));
        Assert.Equal(120, (await after.ReadAsync(Fir, null, new TimeWindow(Recent, Recent + TimeSpan.FromHours(1)), Token)).Series.Sum(one => one.Count));
        Assert.Equal(new IntegrityBatch(3, 3, 0), await after.CheckSealedAsync(0, 100, Token));
        Assert.Equal(1, (await after.AppendAsync([new ReadingPack(Fir, Recent, [new Reading("a", Old + TimeSpan.FromSeconds(1), 5)])], Token)).Accepted);
        await after.SealEverythingAsync(Token);
        Assert.Empty(after.Findings);
    }

    [Fact]
    public async Task Channels_that_must_be_kept_longer_stay_in_the_part()
    {
        await using SqliteRecords records = await FilledAsync();
        using (ReadingRemover remover = ReadingRemover.Open(records.Directory))
        {
            List<RemovablePart> parts = [.. remover.Find(channel => channel.Channel == "a" ? Recent : null, Recent, Token)];
            Assert.Equal([(1L, 60L), (2, 60)], parts.Select(part => (part.Seal, part.Readings)));
            await records.Audit.AppendAsync(RemovalNote.Of(parts, Recent, "kim", "why"), Token);
            remover.Remove(parts, Recent);
        }

        (int code, string output) = Run(records, VerifyCommand.Create(), "verify");
        Assert.True(code == ExitCode.Success, output);
        await using SqliteReadingStore store = Open(records);
        ReadingWindow window = await store.ReadAsync(Fir, null, new TimeWindow(Old, Old + TimeSpan.FromHours(3)), Token);
        Assert.Equal(["b"], window.Series.Select(series => series.Channel));
        Assert.Equal(120, window.Series[0].Count);
    }

    [Theory]
    [InlineData("UPDATE block SET data = x'' WHERE id = 3; INSERT INTO thinned VALUES (3, 0, x'e3b0c44298fc1c149afbf4c8996fb92427ae41e4649b934ca495991b7852b855')")]
    [InlineData("UPDATE block SET digest = zeroblob(32) WHERE id = 1")]
    [InlineData("UPDATE block SET readings = 7 WHERE id = 1")]
    public async Task What_was_removed_or_altered_without_the_trail_is_found(string sql)
    {
        await using SqliteRecords records = await FilledAsync();
        Run(records, RetentionCommand.Create(), "retention", "--apply", "--by", "kim", "--reason", "ten years");
        await using (SqliteConnection connection = new($"Data Source={Path.Combine(records.Directory, SqliteReadingStore.FileName)};Pooling=False"))
        {
            await connection.OpenAsync(Token);
            await using SqliteCommand command = connection.CreateCommand();
            command.CommandText = sql;
            await command.ExecuteNonQueryAsync(Token);
        }

        Assert.Equal(ExitCode.TamperingFound, Run(records, VerifyCommand.Create(), "verify").Code);
    }

    [Fact]
    public async Task The_comparison_with_the_digests_finds_a_changed_byte()
    {
        await using SqliteRecords records = await FilledAsync();
        await using SqliteReadingStore store = Open(records);
        Assert.Equal(new IntegrityBatch(2, 2, 0), await store.CheckSealedAsync(0, 2, Token));
        await using (SqliteConnection connection = new($"Data Source={Path.Combine(records.Directory, SqliteReadingStore.FileName)};Pooling=False"))
        {
            await connection.OpenAsync(Token);
            await using SqliteCommand command = connection.CreateCommand();
            command.CommandText = "UPDATE block SET data = substr(data, 1, 99) || x'00' || substr(data, 101) WHERE id = 3";
            await command.ExecuteNonQueryAsync(Token);
        }

        Assert.Equal(new IntegrityBatch(3, 1, 1), await store.CheckSealedAsync(2, 100, Token));
        Assert.Contains(store.Findings, finding => finding.Code == "set-aside-digest");
        Assert.Equal(new IntegrityBatch(3, 0, 0), await store.CheckSealedAsync(3, 100, Token));
    }

    private static async Task<SqliteRecords> FilledAsync()
    {
        SqliteRecords records = await SqliteRecords.CopyAsync();
        await using SqliteReadingStore store = Open(records);
        foreach (Instant hour in (Instant[])[Old, Old + TimeSpan.FromHours(1), Recent])
        {
            await store.AppendAsync(
                [.. Enumerable.Range(0, 60).Select(i => new ReadingPack(Fir, hour, [new Reading("a", hour + TimeSpan.FromMinutes(i), i), new Reading("b", hour + TimeSpan.FromMinutes(i), -i)]))], Token);
        }

        await store.SealEverythingAsync(Token);
        await new SealedHourRecorder(store, records.Audit, records.Positions, NullLogger<SealedHourRecorder>.Instance).RecordAsync(Token);
        return records;
    }

    private static SqliteReadingStore Open(SqliteRecords records) =>
        new(new ReadingsOptions { DataDirectory = records.Directory }, TimeProvider.System, NullLogger<SqliteReadingStore>.Instance);

    private static (int Code, string Output) Run(SqliteRecords records, Command command, string name, params string[] options)
    {
        string config = Path.Combine(records.Directory, "options.json");
        File.WriteAllText(config, """{ "Readings": { "Retention": [ { "Years": 10 } ] } }""");
        using StringWriter output = new();
        RootCommand root = new() { command };
        int code = root.Parse([name, "--data", records.Directory, "--config", config, .. options]).InvokeAsync(new InvocationConfiguration { Output = output, Error = output }, Token).GetAwaiter().GetResult();
        return (code, output.ToString());
    }
}
