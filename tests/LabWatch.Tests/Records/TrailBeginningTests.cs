using LabWatch.Records.Audit;
using LabWatch.Tests.Records.Contract;
using Microsoft.Data.Sqlite;

namespace LabWatch.Tests.Records;

public sealed class TrailBeginningTests
{
    private static CancellationToken Token => TestContext.Current.CancellationToken;

    [Fact]
    public async Task Records_from_before_the_trail_are_chained_at_the_upgrade_and_marked_so()
    {
        await using SqliteRecords before = await SqliteRecords.CopyAsync();
        await before.Assessments.RecordAsync([Sample.Assessment(Sample.Fir, 0), Sample.Assessment(Sample.Yew, 0)], Token);
        await before.Alerts.RecordAsync(Sample.Raised(Sample.Alert(Sample.Fir, Guid.CreateVersion7(), Sample.Noon)), [], Token);
        IReadOnlyList<AuditEntry> written = await EntriesAsync(before);
        await ForgetTrailAsync(before);
        await using SqliteRecords after = new(before.Directory);
        IReadOnlyList<AuditEntry> entries = await EntriesAsync(after);
        Assert.Equal(["chain-begun", "chained-later", "chained-later", "chain-begun", "chained-later", "chain-begun", "chained-later"], entries.Select(entry => entry.Action));
        Assert.Equal(
            written.Select(entry => (entry.Subject, entry.RecordDigest)).Order(),
            entries.Where(entry => entry.Action == "chained-later").Select(entry => (entry.Subject, entry.RecordDigest)).Order());
        await using SqliteRecords again = new(before.Directory);
        Assert.Equal(7, (await EntriesAsync(again)).Count);
    }

    [Fact]
    public async Task Rows_that_are_only_added_refuse_to_be_changed_by_mistake()
    {
        await using SqliteRecords records = await SqliteRecords.CopyAsync();
        await records.Assessments.RecordAsync(Sample.Assessment(Sample.Fir, 0), Token);
        foreach (string change in (string[])["UPDATE assessments SET decision = 'pass'", "DELETE FROM assessments", "UPDATE audit_entries SET actor = 'x'", "DELETE FROM audit_entries"])
        {
            SqliteException refused = await Assert.ThrowsAsync<SqliteException>(() => ExecuteAsync(records, change));
            Assert.Contains("only ever added", refused.Message, StringComparison.Ordinal);
        }
    }

    [Fact]
    public async Task A_chain_that_no_longer_holds_the_noted_end_is_entered_in_the_chain()
    {
        await using SqliteRecords before = await SqliteRecords.CopyAsync();
        await before.Assessments.RecordAsync([Sample.Assessment(Sample.Fir, 0), Sample.Assessment(Sample.Fir, 1)], Token);
        AuditHead noted = (await before.Audit.HeadAsync("hollin-vale", Token))!;
        TrailHeadFile.Write(before.Directory, new Dictionary<string, AuditHead> { ["hollin-vale"] = noted }, Sample.Noon);
        await using (SqliteRecords same = new(before.Directory))
        {
            Assert.Equal(2, (await EntriesAsync(same)).Count);
        }

        await ExecuteAsync(before, "DROP TRIGGER audit_entries_refuse_delete; DELETE FROM audit_entries WHERE sequence = 2");
        await using SqliteRecords cut = new(before.Directory);
        AuditEntry last = (await EntriesAsync(cut))[^1];
        Assert.Equal("head-differs", last.Action);
        Assert.Equal(2, (long)last.Content["notedSequence"]!);
        Assert.Equal(noted.Digest, (string)last.Content["notedDigest"]!);
        Assert.True(File.Exists(Path.Combine(before.Directory, (string)last.Content["keptAs"]!)));
    }

    private static async Task<IReadOnlyList<AuditEntry>> EntriesAsync(SqliteRecords records) =>
        [.. (await records.Audit.ListAsync(new AuditQuery("hollin-vale", 100), Token)).Items.Reverse()];

    private static Task ForgetTrailAsync(SqliteRecords records) => ExecuteAsync(
        records, "DROP TRIGGER audit_entries_refuse_delete; DELETE FROM audit_entries; DELETE FROM positions WHERE reader LIKE 'trail/%'");

    private static async Task ExecuteAsync(SqliteRecords records, string sql)
    {
        await using SqliteConnection connection = records.Connect();
        await connection.OpenAsync(Token);
        await using SqliteCommand command = connection.CreateCommand();
        command.CommandText = sql;
        await command.ExecuteNonQueryAsync(Token);
    }
}
