using System.CommandLine;
using System.Text.Json;
using LabWatch.Records.Audit;
using LabWatch.Service.Commands;
using LabWatch.Tests.Records;
using LabWatch.Tests.Records.Contract;
using Microsoft.Data.Sqlite;

namespace LabWatch.Tests.Evidence;

/// <summary>The command beside records that are open, as beside a running service.</summary>
public sealed class VerifyCommandTests
{
    private static CancellationToken Token => TestContext.Current.CancellationToken;

    [Fact]
    public async Task Nothing_found_is_success_and_the_head_is_printed()
    {
        await using SqliteRecords records = await FilledAsync();
        AuditHead head = (await records.Audit.HeadAsync("hollin-vale", Token))!;
        (int code, string output, _) = Run("--data", records.Directory, "--head", $"{head.Sequence}:{head.Digest}", "--head", $"hollin-vale/{head.Sequence}:{head.Digest.ToUpperInvariant()}");
        Assert.Equal(ExitCode.Success, code);
        Assert.Contains($"Head of hollin-vale: {head.Sequence}:{head.Digest}", output, StringComparison.Ordinal);
        Assert.Contains("not sealed yet are not covered", output, StringComparison.Ordinal);
    }

    [Fact]
    public async Task An_altered_record_is_named_with_its_column_in_words_and_in_json()
    {
        await using SqliteRecords records = await FilledAsync();
        string id = Sample.Assessment(Sample.Fir, 1).Id;
        await ExecuteAsync(records, $"DROP TRIGGER assessments_refuse_update; UPDATE assessments SET decision = 'pass' WHERE id = '{id}'");
        string json = Path.Combine(records.Directory, "report.json");
        (int code, string output, _) = Run("--data", records.Directory, "--json", json);
        Assert.Equal(ExitCode.TamperingFound, code);
        Assert.Contains($"assessments assessment/{id}, column decision", output, StringComparison.Ordinal);
        using JsonDocument report = JsonDocument.Parse(await File.ReadAllBytesAsync(json, Token));
        Assert.Equal("row-altered", report.RootElement.GetProperty("findings")[0].GetProperty("code").GetString());
        Assert.False(report.RootElement.GetProperty("clean").GetBoolean());
    }

    [Fact]
    public async Task A_head_that_the_chain_does_not_hold_is_a_finding()
    {
        await using SqliteRecords records = await FilledAsync();
        (int code, string output, _) = Run("--data", records.Directory, "--head", "1:" + new string('a', 64), "--head", "900:" + new string('b', 64));
        Assert.Equal(ExitCode.TamperingFound, code);
        Assert.Contains("Entry 1 has another digest", output, StringComparison.Ordinal);
        Assert.Contains("before the end that was noted", output, StringComparison.Ordinal);
    }

    [Fact]
    public async Task An_alert_that_does_not_follow_from_its_steps_is_a_finding()
    {
        await using SqliteRecords records = await FilledAsync();
        await ExecuteAsync(records, "UPDATE alerts SET state = 'normal'");
        (int code, string output, _) = Run("--data", records.Directory);
        Assert.Equal(ExitCode.TamperingFound, code);
        Assert.Contains("column state", output, StringComparison.Ordinal);
    }

    [Fact]
    public async Task Many_findings_are_counted_and_printed_in_part()
    {
        await using SqliteRecords records = await SqliteRecords.CopyAsync();
        await records.Assessments.RecordAsync([.. Enumerable.Range(0, 1_100).Select(window => Sample.Assessment(Sample.Fir, window))], Token);
        await ExecuteAsync(records, "DROP TRIGGER assessments_refuse_update; UPDATE assessments SET explanation = 'fine'");
        (int code, string output, _) = Run("--data", records.Directory);
        Assert.Equal(ExitCode.TamperingFound, code);
        Assert.Contains("1100 finding(s)", output, StringComparison.Ordinal);
        Assert.Contains("... and 1050 more: row-altered 1100", output, StringComparison.Ordinal);
    }

    [Fact]
    public async Task Beside_a_service_that_goes_on_writing_nothing_is_found()
    {
        await using SqliteRecords records = await FilledAsync();
        using CancellationTokenSource stop = new();
        Task writing = Task.Run(
            async () =>
            {
                for (int window = 10; !stop.IsCancellationRequested; window++)
                {
                    await records.Assessments.RecordAsync(Sample.Assessment(Sample.Fir, window), Token);
                    records.Heads.Write();
                }
            },
            Token);
        for (int turn = 0; turn < 10; turn++)
        {
            (int code, string output, _) = Run("--data", records.Directory);
            Assert.True(code == ExitCode.Success, output);
        }

        await stop.CancelAsync();
        await writing;
    }

    [Theory]
    [InlineData("--data", "no-such-directory")]
    [InlineData("--data", ".")]
    [InlineData("--head", "12")]
    [InlineData("--head", "0:aaaa")]
    public void A_wrong_option_is_bad_input(params string[] options) => Assert.NotEqual(ExitCode.Success, Run(options).Code);

    [Fact]
    public async Task Bytes_that_are_no_database_are_a_finding()
    {
        string directory = Directory.CreateTempSubdirectory("labwatch-verify-").FullName;
        await File.WriteAllBytesAsync(Path.Combine(directory, "records.db"), [.. Enumerable.Range(0, 20_000).Select(i => (byte)(i * 7 % 251))], Token);
        (int code, string output, _) = Run("--data", directory);
        Assert.Equal(ExitCode.TamperingFound, code);
        Assert.Contains("unreadable", output, StringComparison.Ordinal);
        Directory.Delete(directory, recursive: true);
    }

    private static async Task<SqliteRecords> FilledAsync()
    {
        SqliteRecords records = await SqliteRecords.CopyAsync();
        await records.Assessments.RecordAsync([Sample.Assessment(Sample.Fir, 0), Sample.Assessment(Sample.Fir, 1), Sample.Assessment(Sample.Yew, 0)], Token);
        await records.Alerts.RecordAsync(Sample.Raised(Sample.Alert(Sample.Fir, Guid.CreateVersion7(), Sample.Noon)), [], Token);
        return records;
    }

    private static (int Code, string Output, string Error) Run(params string[] options)
    {
        using StringWriter output = new();
        using StringWriter error = new();
        RootCommand root = new() { VerifyCommand.Create() };
        int code = root.Parse(["verify", .. options]).Invoke(new InvocationConfiguration { Output = output, Error = error });
        return (code, output.ToString(), error.ToString());
    }

    private static async Task ExecuteAsync(SqliteRecords records, string sql)
    {
        await using SqliteConnection connection = records.Connect();
        await connection.OpenAsync(Token);
        await using SqliteCommand command = connection.CreateCommand();
        command.CommandText = sql;
        await command.ExecuteNonQueryAsync(Token);
    }
}
