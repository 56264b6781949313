using LabWatch.Intake.Spool;
using LabWatch.Lab.Findings;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Time;
using LabWatch.Readings.Quarantine;

namespace LabWatch.Tests.Intake;

public sealed class SpoolTests : IDisposable
{
    private const long Limit = 1 << 20;
    private readonly TemporaryDirectory _directory = new();

    public void Dispose() => _directory.Dispose();

    [Fact]
    public void Entries_come_back_bit_for_bit_and_in_order()
    {
        SpoolEntry[] entries = [Pack(1), Refusal(2), Pack(3), new SpoolEntry(Pack(4).Pack, Refusal(4).Refused)];
        using IntakeSpool spool = Open();
        Assert.True(spool.TryAppend(entries[..2]));
        Assert.True(spool.TryAppend(entries[2..]));
        SpoolChunk chunk = spool.ReadOldest()!;
        Assert.Equal(
            [Text(entries[0]), Text(entries[1]), Text(entries[2]), Text(new(entries[3].Pack, null)), Text(new(null, entries[3].Refused))],
            chunk.File.Entries.Select(Text));
        Assert.Equal((0, false), (chunk.File.Damaged, chunk.File.TornTail));
    }

    [Fact]
    public void A_file_cut_at_any_byte_gives_the_entries_before_the_cut()
    {
        (byte[] bytes, List<int> ends) = WrittenFile();
        for (int length = 0; length <= bytes.Length; length++)
        {
            SpoolFile file = SpoolFile.Parse(bytes.AsSpan(0, length));
            Assert.Equal(ends.Count(end => end <= length), file.Entries.Count);
            Assert.Equal(0, file.Damaged);
            Assert.Equal(length != 8 && !ends.Contains(length) && length > 0, file.TornTail && length > 0);
        }
    }

    [Fact]
    public void A_restart_after_a_crash_at_any_byte_keeps_what_was_acknowledged_and_goes_on()
    {
        (byte[] bytes, List<int> ends) = WrittenFile();
        string path = Path.Combine(_directory.Path, "0000000000000001.spool");
        for (int length = 0; length <= bytes.Length; length++)
        {
            File.WriteAllBytes(path, bytes[..length]);
            using IntakeSpool spool = Open();
            Assert.False(spool.IsEmpty);
            Assert.True(spool.TryAppend([Pack(99)]));
            var seen = new List<SpoolEntry>();
            while (spool.ReadOldest() is { } chunk)
            {
                seen.AddRange(chunk.File.Entries);
                spool.Remove(chunk);
            }

            Assert.Equal(ends.Count(end => end <= length) + 1, seen.Count);
            Assert.Equal(Text(Pack(99)), Text(seen[^1]));
            Assert.True(spool.IsEmpty);
            Assert.Empty(Directory.GetFiles(_directory.Path));
        }
    }

    [Fact]
    public void Damage_to_any_byte_costs_at_most_the_entry_it_lies_in()
    {
        (byte[] bytes, List<int> ends) = WrittenFile();
        for (int at = 8; at < bytes.Length; at++)
        {
            byte[] damaged = [.. bytes];
            damaged[at] ^= 0x40;
            SpoolFile file = SpoolFile.Parse(damaged);
            Assert.Equal(ends.Count - 1, file.Entries.Count);
            bool last = at >= ends[^2];
            Assert.Equal((last ? 0 : 1, last), (file.Damaged, file.TornTail));
        }
    }

    [Fact]
    public void Random_bytes_are_no_entries()
    {
        var random = new Random(7);
        for (int i = 0; i < 2_000; i++)
        {
            byte[] bytes = new byte[random.Next(400)];
            random.NextBytes(bytes);
            for (int j = 0; j + 12 < bytes.Length; j += random.Next(12, 60))
            {
                SpoolCodec.Marker.CopyTo(bytes.AsSpan(j));
                bytes[j + 4] = (byte)random.Next(64);
                bytes[j + 5] = bytes[j + 6] = bytes[j + 7] = 0;
            }

            Assert.Empty(SpoolFile.Parse(bytes).Entries);
        }
    }

    [Fact]
    public void A_damaged_file_is_set_aside_with_its_intact_entries_read()
    {
        (byte[] bytes, List<int> ends) = WrittenFile();
        bytes[20] ^= 1;
        File.WriteAllBytes(Path.Combine(_directory.Path, "0000000000000007.spool"), bytes);
        using IntakeSpool spool = Open();
        SpoolChunk chunk = spool.ReadOldest()!;
        Assert.Equal(ends.Count - 1, chunk.File.Entries.Count);
        spool.Remove(chunk);
        Assert.True(spool.IsEmpty);
        Assert.Equal(["0000000000000007.spool.damaged"], Directory.GetFiles(_directory.Path).Select(Path.GetFileName));
    }

    [Fact]
    public void The_bound_holds_and_room_comes_back()
    {
        using var spool = new IntakeSpool(_directory.Path, 2_000, 500);
        int taken = 0;
        while (spool.TryAppend([Pack(taken)]))
        {
            taken++;
        }

        Assert.InRange(spool.Bytes, 1_500, 2_000);
        Assert.True(Directory.GetFiles(_directory.Path).Length > 2);
        Assert.Equal(taken, spool.Entries);
        spool.Remove(spool.ReadOldest()!);
        Assert.True(spool.TryAppend([Pack(taken)]));
    }

    [Fact]
    public void Foreign_files_are_left_alone()
    {
        File.WriteAllText(Path.Combine(_directory.Path, "notes.txt"), "x");
        File.WriteAllText(Path.Combine(_directory.Path, "abc.spool"), "x");
        using IntakeSpool spool = Open();
        Assert.True(spool.IsEmpty);
        Assert.Null(spool.ReadOldest());
    }

    private IntakeSpool Open() => new(_directory.Path, Limit, 4 << 10);

    private static (byte[] Bytes, List<int> Ends) WrittenFile()
    {
        var buffer = new System.Buffers.ArrayBufferWriter<byte>();
        System.Buffers.BuffersExtensions.Write(buffer, SpoolCodec.FileHeader);
        var ends = new List<int>();
        foreach (SpoolEntry entry in new[] { Pack(1), Refusal(2), Pack(3) })
        {
            SpoolCodec.Write(buffer, entry);
            ends.Add(buffer.WrittenCount);
        }

        return (buffer.WrittenSpan.ToArray(), ends);
    }

    private static SpoolEntry Pack(int number) => new(
        new ReadingPack(
            IntakeLab.Fir,
            new Instant(1_000 + number),
            [
                new Reading("well-1", new Instant(number), 100.1 + number),
                new Reading("power", new Instant(-number), double.NaN, ReadingQuality.NoValue | ReadingQuality.Late),
                new Reading("well-1", new Instant(long.MaxValue), double.Epsilon),
            ]),
        null);

    private static SpoolEntry Refusal(int number) => new(
        null,
        new QuarantinedMessage(
            new Instant(number),
            "lab/hollin-vale/fir",
            new byte[] { 0, 0xA5, 0x4C, 0x57, 0x52, 255 },
            [new Finding("code", "/0", "message \u00B5", null, "cure"), new Finding("code", "/1", "message", "value", "cure")]));

    private static string Text(SpoolEntry entry) =>
        entry.Pack is { } pack
            ? $"{pack.Source} {pack.Arrival.Microseconds} {string.Join(';', pack.Readings.Select(reading => $"{reading.Channel} {reading.Time.Microseconds} {BitConverter.DoubleToInt64Bits(reading.Value)} {reading.Quality}"))}"
            : $"{entry.Refused!.Arrival.Microseconds} {entry.Refused.Topic} {Convert.ToHexString(entry.Refused.Payload.Span)} {string.Join(';', entry.Refused.Findings)}";
}
