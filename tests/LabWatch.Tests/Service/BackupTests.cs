using System.Formats.Tar;
using LabWatch.Lab.Findings;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Time;
using LabWatch.Readings;
using LabWatch.Service.Backup;
using Microsoft.Extensions.Logging.Abstractions;
using TemporaryDirectory = LabWatch.Tests.Readings.TemporaryDirectory;

namespace LabWatch.Tests.Service;

/// <summary>A backup holds what the directory holds, and a restore accepts nothing but what was backed up.</summary>
public sealed class BackupTests : IDisposable
{
    private static readonly SourceKey Fir = new("hollin-vale", "fir");
    private static readonly Instant Noon = Instant.FromUnixSeconds(1_764_590_400);

    private readonly TemporaryDirectory _folder = new();

    private static CancellationToken Token => TestContext.Current.CancellationToken;

    private string Data => At("data");

    public void Dispose() => _folder.Dispose();

    [Theory]
    [InlineData("copy")]
    [InlineData("copy.tar")]
    public async Task What_is_backed_up_beside_an_open_store_comes_back(string name)
    {
        await using SqliteReadingStore store = await FillAsync();
        (BackupManifest manifest, string digest) = Back(At(name));
        Assert.Equal(64, digest.Length);
        Assert.Equal(["alerts.journal", "cavities/a.bin", "readings.db", "readings.mark", "spool/0000000000000001.spool"], manifest.Files.Select(file => file.Path).Order(StringComparer.Ordinal));
        Assert.Equal(["readings.mark", "readings.db"], (string[])[manifest.Files[0].Path, manifest.Files[^1].Path]);
        await AppendAsync(store, 100);

        Assert.Empty(Restore(At(name), At("restored")));
        Assert.Equal("x", await File.ReadAllTextAsync(Path.Combine(At("restored"), "cavities", "a.bin"), Token));
        await using SqliteReadingStore restored = Open(At("restored"));
        Assert.Equal(50, await CountAsync(restored));
        Assert.Empty(restored.Findings);
        Assert.False(Directory.Exists(At(name) + ".partial"));
    }

    [Fact]
    public async Task A_changed_a_missing_and_a_foreign_file_are_found()
    {
        await using SqliteReadingStore store = await FillAsync();
        Back(At("copy"));
        await File.AppendAllTextAsync(Path.Combine(At("copy"), "alerts.journal"), "y", Token);
        File.Delete(Path.Combine(At("copy"), "cavities", "a.bin"));
        Assert.Equal(["backup-differs", "backup-incomplete"], Restore(At("copy"), At("restored")).Select(finding => finding.Code).Order(StringComparer.Ordinal));
    }

    [Fact]
    public async Task A_cut_or_altered_archive_is_found()
    {
        await using SqliteReadingStore store = await FillAsync();
        Back(At("copy.tar"));
        byte[] whole = await File.ReadAllBytesAsync(At("copy.tar"), Token);
        await File.WriteAllBytesAsync(At("cut.tar"), whole[..(whole.Length / 2)], Token);
        Assert.NotEmpty(Restore(At("cut.tar"), At("cut")));
        int at = whole.AsSpan().IndexOf("SQLite format 3"u8);
        whole[at + 2000] ^= 1;
        await File.WriteAllBytesAsync(At("altered.tar"), whole, Token);
        Assert.Equal(["backup-differs"], Restore(At("altered.tar"), At("altered")).Select(finding => finding.Code));
    }

    [Theory]
    [InlineData("../outside")]
    [InlineData("/outside")]
    [InlineData("a/../../outside")]
    [InlineData("c:outside")]
    [InlineData("a\\..\\outside")]
    [InlineData("")]
    public void A_manifest_that_leads_outside_is_none(string path)
    {
        BackupManifest manifest = new(BackupManifest.CurrentFormat, "1", "2026-12-01T00:00:00Z", new Dictionary<string, LabWatch.Records.Audit.AuditHead>(), [new BackupFile(path, 0, "")], []);
        Assert.Null(BackupManifest.Read(manifest.ToBytes()));
        Directory.CreateDirectory(At("bad"));
        File.WriteAllBytes(Path.Combine(At("bad"), BackupManifest.FileName), manifest.ToBytes());
        Assert.Equal("no-manifest", Assert.Single(Restore(At("bad"), At("restored"))).Code);
    }

    [Fact]
    public void An_archive_without_a_manifest_at_its_head_is_refused()
    {
        using (TarWriter tar = new(File.Create(At("other.tar"))))
        {
            tar.WriteEntry(new PaxTarEntry(TarEntryType.RegularFile, "readings.db") { DataStream = new MemoryStream([1]) });
        }

        Assert.Equal("no-manifest", Assert.Single(Restore(At("other.tar"), At("restored"))).Code);
    }

    [Fact]
    public async Task Nothing_is_overwritten_and_nothing_goes_into_the_data()
    {
        await using SqliteReadingStore store = await FillAsync();
        Directory.CreateDirectory(At("full"));
        await File.WriteAllTextAsync(Path.Combine(At("full"), "a"), "a", Token);
        Assert.Equal("target-exists", Assert.Single(new BackupWriter(Data, At("full"), [], TimeProvider.System).Check()).Code);
        Assert.Equal("target-inside-data", Assert.Single(new BackupWriter(Data, Path.Combine(Data, "copy"), [], TimeProvider.System).Check()).Code);
    }

    [Fact]
    public async Task What_an_interrupted_backup_left_is_replaced_by_the_next_one()
    {
        await using SqliteReadingStore store = await FillAsync();
        Directory.CreateDirectory(At("copy.partial"));
        await File.WriteAllTextAsync(Path.Combine(At("copy.partial"), "readings.db"), "half", Token);
        Back(At("copy"));
        Assert.Empty(Restore(At("copy"), At("restored")));
    }

    private async Task<SqliteReadingStore> FillAsync()
    {
        Directory.CreateDirectory(Path.Combine(Data, "spool"));
        Directory.CreateDirectory(Path.Combine(Data, "cavities"));
        Directory.CreateDirectory(Path.Combine(Data, "keys"));
        await File.WriteAllTextAsync(Path.Combine(Data, "spool", "0000000000000001.spool"), "LWSPOOL1", Token);
        await File.WriteAllTextAsync(Path.Combine(Data, "cavities", "a.bin"), "x", Token);
        await File.WriteAllTextAsync(Path.Combine(Data, "keys", "web.pfx"), "secret", Token);
        Directory.CreateDirectory(Path.Combine(Data, "secrets"));
        await File.WriteAllTextAsync(Path.Combine(Data, "secrets", "broker"), "secret", Token);
        await File.WriteAllTextAsync(Path.Combine(Data, "set-up-code"), "secret", Token);
        await File.WriteAllTextAsync(Path.Combine(Data, "alerts.journal"), "labwatch alert journal 1\n", Token);
        SqliteReadingStore store = Open(Data);
        await AppendAsync(store, 0);
        await store.SealEverythingAsync(Token);
        await AppendAsync(store, 25);
        return store;
    }

    private static async Task AppendAsync(SqliteReadingStore store, int first) => await store.AppendAsync(
        [.. Enumerable.Range(first, 25).Select(i => new ReadingPack(Fir, Noon, [new Reading("t1", Noon + TimeSpan.FromMinutes(i * 3), i)]))], Token);

    private static async Task<int> CountAsync(SqliteReadingStore store) =>
        (await store.ReadAsync(Fir, null, new TimeWindow(Noon, Noon + TimeSpan.FromDays(1)), Token)).Series.Sum(series => series.Count);

    private static SqliteReadingStore Open(string folder) => new(new ReadingsOptions { DataDirectory = folder }, TimeProvider.System, NullLogger<SqliteReadingStore>.Instance);

    private (BackupManifest, string) Back(string target) => new BackupWriter(Data, target, [], TimeProvider.System).Run(Token);

    private static IReadOnlyList<Finding> Restore(string from, string to)
    {
        Directory.CreateDirectory(to);
        return new BackupReader(from, to).Run(Token);
    }

    private string At(string name) => Path.Combine(_folder.Path, name);
}
