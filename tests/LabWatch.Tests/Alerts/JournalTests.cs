using System.Text;
using LabWatch.Alerts.Journal;
using LabWatch.Alerts.LifeCycle;
using LabWatch.Lab.Alerts;

namespace LabWatch.Tests.Alerts;

/// <summary>The alert journal: every damage costs no more than what was damaged.</summary>
public sealed class JournalTests : IDisposable
{
    private readonly string _folder = Directory.CreateTempSubdirectory("labwatch-journal-").FullName;

    [Fact]
    public void The_checksum_is_crc32c_of_the_published_examples()
    {
        // RFC 3720 (iSCSI), appendix B.4: 32 bytes of zeros, of ones, of 00..1f. The nine digits: catalogue check value of CRC-32C.
        Assert.Equal(0x8a9136aau, JournalLine.Crc32C(new byte[32]));
        Assert.Equal(0x62a8ab43u, JournalLine.Crc32C([.. Enumerable.Repeat((byte)0xff, 32)]));
        Assert.Equal(0x46dd794eu, JournalLine.Crc32C([.. Enumerable.Range(0, 32).Select(i => (byte)i)]));
        Assert.Equal(0xe3069283u, JournalLine.Crc32C("123456789"u8));
    }

    [Fact]
    public void What_was_appended_is_read_back()
    {
        List<JournalEntry> entries = Entries(5);
        Write(entries);
        (JournalFile file, JournalContent content, string? copy) = JournalFile.Open(_folder);
        file.Dispose();
        Assert.Null(copy);
        Assert.Equal(entries.Select(entry => entry.Transition!.Alert), content.Entries.Select(entry => entry.Transition!.Alert));
    }

    [Fact]
    public void Cut_at_any_byte_it_opens_with_all_whole_lines_and_takes_more()
    {
        Write(Entries(3));
        string path = Path.Combine(_folder, JournalFile.FileName);
        byte[] whole = File.ReadAllBytes(path);
        for (int length = 0; length <= whole.Length; length += 7)
        {
            File.WriteAllBytes(path, whole[..length]);
            int lines = whole.AsSpan(0, length).Count((byte)'\n');
            (JournalFile file, JournalContent content, string? copy) = JournalFile.Open(_folder);
            Assert.Null(copy);
            Assert.Equal(Math.Max(0, lines - 1), content.Entries.Count);
            file.Append(Entries(1));
            file.Dispose();
            Assert.Equal(content.Entries.Count + 1, JournalContent.Parse(File.ReadAllBytes(path)).Entries.Count);
        }
    }

    [Fact]
    public void A_flipped_bit_costs_one_line_and_the_damaged_file_is_kept()
    {
        Write(Entries(3));
        string path = Path.Combine(_folder, JournalFile.FileName);
        byte[] bytes = File.ReadAllBytes(path);
        for (int at = 30; at < bytes.Length - 1; at += 13)
        {
            byte[] damaged = [.. bytes];
            damaged[at] ^= 1;
            JournalContent content = JournalContent.Parse(damaged);
            Assert.InRange(content.Entries.Count, 1, 2);
        }

        bytes[^20] ^= 1;
        File.WriteAllBytes(path, bytes);
        (JournalFile file, JournalContent kept, string? copy) = JournalFile.Open(_folder);
        file.Dispose();
        Assert.Equal((2, 1), (kept.Entries.Count, kept.DamagedLines));
        Assert.Equal(bytes, File.ReadAllBytes(copy!));
    }

    [Fact]
    public void Any_bytes_at_all_open_without_an_exception()
    {
        Random random = new(20261201);
        for (int i = 0; i < 200; i++)
        {
            byte[] noise = new byte[random.Next(0, 400)];
            random.NextBytes(noise);
            Assert.NotNull(JournalContent.Parse(noise));
        }

        Assert.Empty(JournalContent.Parse(Encoding.UTF8.GetBytes("00000000 {}\nxxxxxxxx {}\n")).Entries);
    }

    [Fact]
    public void A_second_service_on_the_folder_is_refused()
    {
        (JournalFile file, _, _) = JournalFile.Open(_folder);
        Assert.ThrowsAny<IOException>(() => JournalFile.Open(_folder));
        file.Dispose();
    }

    [Fact]
    public void A_rewritten_journal_holds_the_same_state()
    {
        JournalState state = new();
        foreach (JournalEntry entry in Entries(4))
        {
            state.Apply(entry);
        }

        (JournalFile file, _, _) = JournalFile.Open(_folder);
        file.Append(Entries(1));
        file.Rewrite(state.Snapshot());
        file.Append([new JournalEntry(0) { RecordedUpTo = 2 }]);
        file.Dispose();
        JournalState restored = new();
        foreach (JournalEntry entry in JournalContent.Parse(File.ReadAllBytes(Path.Combine(_folder, JournalFile.FileName))).Entries)
        {
            restored.Apply(entry);
        }

        Assert.Equal(state.Open.Values, restored.Open.Values);
        Assert.Equal(state.NextNumber, restored.NextNumber);
        Assert.Equal([3, 4], restored.Unrecorded.Select(entry => entry.Number));
    }

    public void Dispose() => Directory.Delete(_folder, recursive: true);

    private void Write(IReadOnlyList<JournalEntry> entries)
    {
        (JournalFile file, _, _) = JournalFile.Open(_folder);
        file.Append(entries);
        file.Dispose();
    }

    private static List<JournalEntry> Entries(int count) =>
    [
        .. Enumerable.Range(1, count).Select(number => new JournalEntry(number)
        {
            Transition = AlertLifeCycle.Next(null, new AlertCondition(
                new AlertKey(TestSite.Rowan, HazardCode.HotSurface, $"case-{number}"), true, TestSite.Start, AlertPriority.High, "headline\nü", "detail", 60.1, 48, "Cel")),
            Messages = [],
        }),
    ];
}
