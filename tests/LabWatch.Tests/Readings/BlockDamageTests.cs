using System.Buffers.Binary;
using System.IO.Hashing;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Time;
using LabWatch.Readings;
using LabWatch.Readings.Blocks;
using LabWatch.Readings.Journal;
using LabWatch.Readings.Summaries;

namespace LabWatch.Tests.Readings;

/// <summary>Damaged bytes are refused: no crash, no endless work, no memory beyond a bound, whether the check sum gives them away or not.</summary>
public sealed class BlockDamageTests
{
    private const long Hour = 1_764_590_400L * Instant.MicrosecondsPerSecond;
    private const long MemoryBound = 1L << 30;

    [Fact]
    public void A_flipped_bit_anywhere_is_noticed()
    {
        byte[] block = Block();
        for (int bit = 0; bit < block.Length * 8; bit += 3)
        {
            byte[] damaged = [.. block];
            damaged[bit / 8] ^= (byte)(1 << (bit % 8));
            Assert.Throws<DamagedDataException>(() => SealedBlock.Open(damaged));
        }
    }

    [Fact]
    public void A_block_cut_anywhere_is_noticed()
    {
        byte[] block = Block();
        for (int length = 0; length < block.Length; length += 7)
        {
            Assert.Throws<DamagedDataException>(() => SealedBlock.Open(block.AsMemory(0, length)));
        }
    }

    [Theory]
    [InlineData(1)]
    [InlineData(2)]
    [InlineData(3)]
    [InlineData(4)]
    public void Blocks_damaged_behind_a_right_check_sum_are_refused_or_read_as_something(int seed)
    {
        Random random = new(seed);
        byte[] block = Block();
        long before = GC.GetAllocatedBytesForCurrentThread();
        for (int round = 0; round < 3_000; round++)
        {
            byte[] damaged = Mutate(block, random);
            BinaryPrimitives.WriteUInt32LittleEndian(damaged.AsSpan(damaged.Length - 4), Crc32.HashToUInt32(damaged.AsSpan(0, damaged.Length - 4)));
            long start = GC.GetAllocatedBytesForCurrentThread();
            ReadAll(damaged);
            Assert.InRange(GC.GetAllocatedBytesForCurrentThread() - start, 0, MemoryBound);
        }

        Assert.True(GC.GetAllocatedBytesForCurrentThread() > before);
    }

    [Theory]
    [InlineData(1)]
    [InlineData(2)]
    public void Columns_of_random_bytes_are_refused_or_read_as_something(int seed)
    {
        Random random = new(seed);
        double[] values = new double[50];
        long[] times = new long[50];
        ReadingQuality[] qualities = new ReadingQuality[50];
        for (int round = 0; round < 20_000; round++)
        {
            byte[] bytes = new byte[random.Next(0, 500)];
            random.NextBytes(bytes);
            for (int i = 0; i < Math.Min(6, bytes.Length); i++)
            {
                bytes[i] = (byte)random.Next(10);
            }

            Refusing(() => ReadValues(bytes, values));
            Refusing(() => ReadTimes(bytes, times));
            Refusing(() => ReadQualities(bytes, qualities));
        }
    }

    [Fact]
    public void Journal_rows_damaged_or_moved_are_noticed()
    {
        JournalRow row = new();
        row.Begin();
        row.BeginPack(1);
        row.Add(0, Hour, 20.5, ReadingQuality.None);
        row.Add(3, Hour + 1, double.NaN, ReadingQuality.NoValue);
        byte[] bytes = row.Finish(17);
        List<JournalReading> readings = [];
        JournalRow.Read(17, bytes, readings);
        Assert.Equal([new JournalReading(1, 0, Hour, 20.5, ReadingQuality.None), new JournalReading(1, 3, Hour + 1, double.NaN, ReadingQuality.NoValue)], readings);
        Assert.Throws<DamagedDataException>(() => JournalRow.Read(18, bytes, readings));
        for (int bit = 0; bit < bytes.Length * 8; bit++)
        {
            byte[] damaged = [.. bytes];
            damaged[bit / 8] ^= (byte)(1 << (bit % 8));
            Assert.Throws<DamagedDataException>(() => JournalRow.Read(17, damaged, readings));
        }
    }

    [Fact]
    public void Summaries_damaged_behind_a_right_check_sum_are_refused_or_read_as_something()
    {
        Random random = new(5);
        byte[] summary = SummaryCodec.Encode(Series(), Hour);
        Assert.Equal(4, SummaryCodec.Decode(summary, Hour).Channels.Count);
        for (int round = 0; round < 3_000; round++)
        {
            byte[] damaged = Mutate(summary, random);
            BinaryPrimitives.WriteUInt32LittleEndian(damaged, Crc32.HashToUInt32(damaged.AsSpan(4)));
            try
            {
                SummaryCodec.Decode(damaged, Hour);
            }
            catch (DamagedDataException)
            {
                // The refusal that is wanted; anything else fails the test.
            }
        }
    }

    private static void Refusing(Action read)
    {
        try
        {
            read();
        }
        catch (DamagedDataException)
        {
            // The refusal that is wanted; anything else fails the test.
        }
    }

    private static void ReadValues(byte[] bytes, double[] values)
    {
        ByteReader reader = new(bytes);
        ValueColumn.Read(ref reader, values);
    }

    private static void ReadTimes(byte[] bytes, long[] times)
    {
        ByteReader reader = new(bytes);
        TimeColumn.Read(ref reader, times, Hour);
    }

    private static void ReadQualities(byte[] bytes, ReadingQuality[] qualities)
    {
        ByteReader reader = new(bytes);
        QualityRuns.Read(ref reader, qualities);
    }

    private static void ReadAll(byte[] damaged)
    {
        try
        {
            SealedBlock block = SealedBlock.Open(damaged);
            for (int channel = 0; channel < Math.Min(block.Channels.Count, 20); channel++)
            {
                block.Decode(channel);
            }
        }
        catch (DamagedDataException)
        {
            // The refusal that is wanted; anything else fails the test.
        }
    }

    private static byte[] Mutate(byte[] bytes, Random random)
    {
        byte[] damaged = [.. bytes];
        for (int i = random.Next(1, 5); i > 0; i--)
        {
            int at = random.Next(4) == 0 ? random.Next(Math.Min(160, damaged.Length)) : random.Next(damaged.Length);
            damaged[at] = random.Next(3) switch { 0 => 0xFF, 1 => 0, _ => (byte)random.Next(256) };
        }

        return random.Next(8) == 0 ? damaged[..random.Next(8, damaged.Length)] : damaged;
    }

    private static byte[] Block() => new BlockEncoder().Encode(new BlockHeader(new SourceKey("s", "x"), Hour, 0, new byte[32]), Series());

    private static ReadingSeries[] Series()
    {
        Random random = new(1);
        long[] times = [.. Enumerable.Range(0, 400).Select(i => Hour + (i * 1_000_000L))];
        double[][] columns =
        [
            [.. times.Select(_ => Math.Round(random.NextDouble(), 3))],
            [.. times.Select(_ => random.NextDouble())],
            [.. times.Select((_, i) => i % 50 == 3 ? double.NaN : i)],
            [.. times.Select(_ => 5.0)],
        ];
        return [.. columns.Select((values, i) => new ReadingSeries($"c{i}", times, values, new ReadingQuality[400]))];
    }
}
