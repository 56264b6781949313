using System.Text;
using LabWatch.Lab.Findings;
using LabWatch.Lab.LabFile;
using LabWatch.Lab.Time;
using LabWatch.Records;
using LabWatch.Records.Revisions;
using LabWatch.Service.Hosting;
using LabWatch.Tests.Lab;
using LabWatch.Tests.Records;
using Microsoft.Data.Sqlite;
using Microsoft.Extensions.Logging.Abstractions;
using Microsoft.Extensions.Time.Testing;

namespace LabWatch.Tests.Service;

public sealed class LabStartTests : IDisposable
{
    private static readonly string Changed = LabFileSample.Text.Replace("\"name\": \"Fir\"", "\"name\": \"Fir, recoated\"", StringComparison.Ordinal);

    private readonly string _directory = Directory.CreateTempSubdirectory("labwatch-start-").FullName;
    private readonly FakeTimeProvider _clock = new(new DateTimeOffset(2026, 12, 1, 9, 0, 0, TimeSpan.Zero));

    private static CancellationToken Token => TestContext.Current.CancellationToken;

    private string Cache => LabSnapshotSource.CachePath(_directory);

    private string Database => Path.Combine(_directory, RecordsOptions.FileName);

    public void Dispose()
    {
        SqliteConnection.ClearAllPools();
        Directory.Delete(_directory, recursive: true);
    }

    [Fact]
    public async Task The_first_start_imports_its_file_and_the_next_one_goes_on_without_a_file()
    {
        LabSnapshotSource first = await StartAsync(LabFileSample.Text);
        Assert.Equal((12, "Fir"), (first.Sequence, first.Current.Sources[0].Name));
        LabSnapshotSource second = await StartAsync(null);
        Assert.Equal(first.Text.ToArray(), second.Text.ToArray());
        Assert.Null(second.Pending);
    }

    [Fact]
    public async Task The_same_file_again_asks_no_database_and_keeps_edits()
    {
        await StartAsync(LabFileSample.Text);
        await EditAsync();
        await StartAsync(null);
        await LookAsync(await StartAsync(null));
        BreakDatabase();
        LabSnapshotSource again = await StartAsync(LabFileSample.Text);
        Assert.Equal(13, again.Sequence);
        Assert.Null(again.Pending);
    }

    [Fact]
    public async Task A_start_without_a_database_uses_what_was_in_force_and_imports_when_it_answers()
    {
        await StartAsync(LabFileSample.Text);
        BreakDatabase();
        LabSnapshotSource lab = await StartAsync(Changed);
        Assert.Equal("Fir", lab.Current.Sources[0].Name);
        Assert.NotNull(lab.Pending);
        LabKeeper keeper = await LookFailsAsync(lab);
        MendDatabase();
        int changes = 0;
        lab.Changed += (_, _) => changes++;
        await using SqliteRecords records = new(_directory, busySeconds: 10);
        keeper = Keeper(lab, records);
        await keeper.LookAsync(Token);
        Assert.Empty(keeper.Refused);
        Assert.Equal(("Fir, recoated", 1), (lab.Current.Sources[0].Name, changes));
        Assert.Equal("Fir, recoated", (await StartAsync(null)).Current.Sources[0].Name);
    }

    [Fact]
    public async Task The_very_first_start_without_a_database_watches_by_the_file_itself()
    {
        BreakDatabase();
        LabSnapshotSource lab = await StartAsync(LabFileSample.Text);
        Assert.Equal((0, "Fir"), (lab.Sequence, lab.Current.Sources[0].Name));
        MendDatabase();
        await LookAsync(lab);
        Assert.Equal(12, lab.Sequence);
    }

    [Fact]
    public async Task A_file_that_was_kept_by_a_program_without_records_is_put_on_record()
    {
        await File.WriteAllTextAsync(Cache, LabFileSample.Text, Token);
        LabSnapshotSource lab = await StartAsync(null);
        Assert.Equal(0, lab.Sequence);
        await LookAsync(lab);
        Assert.Equal(12, lab.Sequence);
    }

    [Fact]
    public async Task A_kill_between_import_and_cache_is_made_good_by_the_next_start()
    {
        await StartAsync(LabFileSample.Text);
        byte[] before = await File.ReadAllBytesAsync(Cache, Token);
        await StartAsync(Changed);
        await File.WriteAllBytesAsync(Cache, before, Token);
        Assert.Equal("Fir, recoated", (await StartAsync(Changed)).Current.Sources[0].Name);

        await File.WriteAllBytesAsync(Cache, before, Token);
        LabSnapshotSource without = await StartAsync(null);
        Assert.Equal("Fir", without.Current.Sources[0].Name);
        await LookAsync(without);
        Assert.Equal("Fir, recoated", without.Current.Sources[0].Name);
    }

    [Fact]
    public async Task A_lost_cache_is_put_together_from_the_records()
    {
        await StartAsync(LabFileSample.Text);
        File.Delete(Cache);
        Assert.Equal(12, (await StartAsync(null)).Sequence);
        await File.WriteAllTextAsync(Cache, "{ spoilt", Token);
        Assert.Equal(12, (await StartAsync(null)).Sequence);
    }

    [Fact]
    public async Task A_file_that_would_take_an_edit_away_is_refused_until_accepted()
    {
        await StartAsync(LabFileSample.Text);
        await EditAsync("new-limit", 1);
        (LabSnapshotSource? refused, IReadOnlyList<Finding> findings) = await LoadAsync(Changed);
        Assert.Null(refused);
        Assert.Equal(("edit-withdrawn", "new-limit@1"), Assert.Single(findings.Select(finding => (finding.Code, finding.Value))));
        Assert.Contains("lee", findings[0].Message, StringComparison.Ordinal);
        LabSnapshotSource accepted = await StartAsync(Changed, accept: true);
        Assert.NotNull(accepted.Current.Limits.Single(limit => limit.Id == "new-limit").WithdrawnFrom);
    }

    [Fact]
    public async Task A_refusal_that_comes_after_the_start_is_told_and_the_former_lab_stays()
    {
        await StartAsync(LabFileSample.Text);
        BreakDatabase();
        LabSnapshotSource lab = await StartAsync(LabFileSample.Text.Replace("\"maximum\": 20", "\"maximum\": 25", StringComparison.Ordinal));
        MendDatabase();
        LabKeeper keeper = await LookAsync(lab);
        Assert.Equal("revision-changed", Assert.Single(keeper.Refused).Code);
        Assert.Equal(20, lab.Current.Limits[0].Maximum);
    }

    [Fact]
    public async Task A_start_that_cannot_be_made_for_another_reason_changes_nothing()
    {
        await StartAsync(LabFileSample.Text);
        await Start().LoadAsync(Order(Changed, false), lookOnly: true, Token);
        await using SqliteRecords records = new(_directory, busySeconds: 10);
        Assert.Equal(12, await records.LabRecords.HeadAsync("sample", Token));
    }

    [Fact]
    public async Task Without_a_file_and_without_anything_known_the_finding_says_so() =>
        Assert.Equal("no-lab-file", Assert.Single((await LoadAsync(null)).Findings).Code);

    [Fact]
    public async Task Records_of_a_newer_program_refuse_the_start_with_a_finding()
    {
        await StartAsync(LabFileSample.Text);
        await using (SqliteConnection connection = new($"Data Source={Database};Pooling=False"))
        {
            await connection.OpenAsync(Token);
            await using SqliteCommand command = connection.CreateCommand();
            command.CommandText = "INSERT INTO \"__EFMigrationsHistory\" VALUES ('29990101000000_Future', '99.0.0');";
            await command.ExecuteNonQueryAsync(Token);
        }

        Assert.Equal("records-newer", Assert.Single((await LoadAsync(Changed)).Findings).Code);
    }

    [Fact]
    public async Task What_another_node_recorded_comes_into_force()
    {
        LabSnapshotSource lab = await StartAsync(LabFileSample.Text);
        await EditAsync();
        await LookAsync(lab);
        Assert.Equal([1, 2], lab.Current.Limits.Select(limit => limit.Revision));
    }

    private async Task<LabSnapshotSource> StartAsync(string? file, bool accept = false)
    {
        (LabSnapshotSource? lab, IReadOnlyList<Finding> findings) = await LoadAsync(file, accept);
        Assert.Empty(findings);
        Assert.Null(lab!.Keep());
        return lab;
    }

    private Task<(LabSnapshotSource? Lab, IReadOnlyList<Finding> Findings)> LoadAsync(string? file, bool accept = false) =>
        Start().LoadAsync(file is null ? null : Order(file, accept), lookOnly: false, Token);

    private LabStart Start() => new(_directory, RecordsOptions.InDirectory(_directory), _clock) { Patience = TimeSpan.FromMinutes(5) };

    private static LabOrder Order(string file, bool accept) => new(Encoding.UTF8.GetBytes(file), "lab.json", "os/kim") { Accept = accept };

    private async Task EditAsync(string id = "fir-stability", int revision = 2)
    {
        await using SqliteRecords records = new(_directory, busySeconds: 10);
        RevisionOutcome outcome = await records.LabRecords.ReviseAsync(
            new RevisionOrder(
                "sample",
                LabRecordKind.Limit,
                LabDocument.Parse(Encoding.UTF8.GetBytes(FormattableString.Invariant(
                    $$"""{ "id": "{{id}}", "revision": {{revision}}, "source": "fir", "criterion": "stability", "maximum": 15, "unit": "mK", "rule": "guard-band", "effectiveFrom": "2026-06-01T00:00:00Z" }"""))),
                "lee",
                "Tightened",
                Instant.Now(_clock) + TimeSpan.FromSeconds(1)),
            Token);
        Assert.True(outcome.IsNew);
    }

    private async Task<LabKeeper> LookAsync(LabSnapshotSource lab)
    {
        await using SqliteRecords records = new(_directory, busySeconds: 10);
        LabKeeper keeper = Keeper(lab, records);
        await keeper.LookAsync(Token);
        return keeper;
    }

    private async Task<LabKeeper> LookFailsAsync(LabSnapshotSource lab)
    {
        await using SqliteRecords records = new(_directory, busySeconds: 10);
        LabKeeper keeper = Keeper(lab, records);
        await Assert.ThrowsAsync<RecordsUnavailableException>(() => keeper.LookAsync(Token));
        return keeper;
    }

    private LabKeeper Keeper(LabSnapshotSource lab, SqliteRecords records) => new(lab, records.LabRecords, _clock, NullLogger<LabKeeper>.Instance);

    /// <summary>A directory in the place of the file: the database cannot be opened, and says so at once.</summary>
    private void BreakDatabase()
    {
        SqliteConnection.ClearAllPools();
        if (File.Exists(Database))
        {
            File.Move(Database, Database + ".away");
        }

        Directory.CreateDirectory(Database);
    }

    private void MendDatabase()
    {
        Directory.Delete(Database);
        if (File.Exists(Database + ".away"))
        {
            File.Move(Database + ".away", Database);
        }
    }
}
