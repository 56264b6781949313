using System.Buffers.Binary;
using System.IO.Hashing;
using LabWatch.Lab.Time;
using LabWatch.Readings;
using LabWatch.Readings.Blocks;
using LabWatch.Readings.Summaries;

namespace LabWatch.Tests.Readings;

/// <summary>Rows of hours come back bit for bit, and damaged bytes are refused, never believed and never a crash.</summary>
public sealed class HourlyCodecTests
{
    private const long Day = 20_423 * HourlyCodec.Day;

    [Fact]
    public void Any_rows_come_back()
    {
        Random random = new(11);
        for (int trial = 0; trial < 500; trial++)
        {
            ReadingSummary[] rows = Rows(random);
            Assert.Equal(rows, HourlyCodec.Decode(HourlyCodec.Encode(rows, Day), Day));
        }
    }

    [Fact]
    public void Every_flipped_bit_and_every_cut_is_found()
    {
        byte[] bytes = HourlyCodec.Encode(Rows(new Random(12)), Day);
        for (int bit = 0; bit < bytes.Length * 8; bit++)
        {
            byte[] flipped = [.. bytes];
            flipped[bit / 8] ^= (byte)(1 << (bit % 8));
            Assert.Throws<DamagedDataException>(() => HourlyCodec.Decode(flipped, Day));
        }

        for (int length = 0; length < bytes.Length; length++)
        {
            Assert.Throws<DamagedDataException>(() => HourlyCodec.Decode(bytes.AsSpan(0, length), Day));
        }
    }

    [Fact]
    public void Bytes_with_a_right_check_sum_but_without_sense_are_refused_or_read_never_worse()
    {
        Random random = new(13);
        for (int trial = 0; trial < 20_000; trial++)
        {
            byte[] bytes = trial % 2 == 0 ? new byte[random.Next(5, 200)] : HourlyCodec.Encode(Rows(random), Day);
            random.NextBytes(trial % 2 == 0 ? bytes.AsSpan(5) : bytes.AsSpan(random.Next(5, bytes.Length)));
            bytes[4] = 1;
            BinaryPrimitives.WriteUInt32LittleEndian(bytes, Crc32.HashToUInt32(bytes.AsSpan(4)));
            try
            {
                Assert.InRange(HourlyCodec.Decode(bytes, Day).Length, 0, 24);
            }
            catch (DamagedDataException)
            {
                // Refused.
            }
        }
    }

    private static ReadingSummary[] Rows(Random random) =>
    [
        .. Enumerable.Range(0, 24).Where(_ => random.Next(4) > 0).Select(hour => new ReadingSummary(
            new Instant(Day + (hour * Instant.MicrosecondsPerHour)), random.Next(1, 3601), Value(random), Value(random), Value(random), Value(random), random.NextDouble(), random.NextDouble())),
    ];

    private static double Value(Random random) => random.Next(5) == 0 ? random.NextDouble() * 1e300 : Math.Round(random.NextDouble() * 100, 3);
}
