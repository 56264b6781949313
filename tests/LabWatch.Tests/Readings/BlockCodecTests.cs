using FsCheck;
using FsCheck.Xunit;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Time;
using LabWatch.Readings;
using LabWatch.Readings.Blocks;

namespace LabWatch.Tests.Readings;

/// <summary>Every encoding of a sealed block gives back the very bits that went in.</summary>
public sealed class BlockCodecTests
{
    private const long Hour = 1_764_590_400L * Instant.MicrosecondsPerSecond;
    private static readonly BlockHeader SampleHeader = new(new SourceKey("hollin-vale", "fir"), Hour, 0, new byte[32]);

    [Property(MaxTest = 300)]
    public void Any_bit_patterns_come_back(long[] bits) => RoundTrip([.. bits.Select(BitConverter.Int64BitsToDouble)]);

    [Property(MaxTest = 300)]
    public void Decimal_values_come_back(int[] wholes, byte exponent) =>
        RoundTrip([.. wholes.Select(whole => whole / Math.Pow(10, exponent % 13))]);

    [Property(MaxTest = 300)]
    public void Decimal_values_with_strangers_among_them_come_back(int[] wholes, PositiveInt place, double stranger) =>
        RoundTrip([.. wholes.Select((whole, i) => i % (16 + place.Get) == 3 ? stranger : whole / 1e3)]);

    [Property(MaxTest = 200)]
    public void Any_times_of_several_channels_come_back(uint[][] offsets, byte unit)
    {
        long step = (long)Math.Pow(10, unit % 7);
        List<ReadingSeries> series = [];
        foreach (uint[] one in offsets)
        {
            long[] times = [.. one.Select(offset => Hour + (offset * step % Instant.MicrosecondsPerHour)).Distinct().Order()];
            if (times.Length > 0)
            {
                series.Add(Series($"c{series.Count:D3}", times, [.. times.Select(time => time % 977 / 10.0)]));
            }
        }

        AssertRoundTrip(series);
    }

    [Fact]
    public void Every_way_to_write_a_column_is_reached_and_comes_back()
    {
        double[][] columns =
        [
            [.. Enumerable.Repeat(37.25, 500)],
            [.. Enumerable.Range(0, 500).Select(i => Math.Round(100 + (0.001 * i), 3))],
            [.. Enumerable.Range(0, 500).Select(i => (double)(i * (long)i * 1000))],
            [.. Enumerable.Range(0, 500).Select(i => Math.Round(20 + (i % 2 * 7.5), 2))],
            [.. Enumerable.Range(0, 500).Select(i => Math.Sin(i))],
            [.. Enumerable.Range(0, 500).Select(i => (double)(float)Math.Sin(i))],
            [.. Enumerable.Range(0, 500).Select(i => i % 100 == 7 ? double.NaN : i % 100 == 9 ? -0.0 : i / 10.0)],
            [.. Enumerable.Repeat(double.NaN, 500)],
            [.. Enumerable.Range(0, 500).Select(i => double.Epsilon * i)],
            [.. Enumerable.Range(0, 500).Select(i => i % 2 == 0 ? double.MaxValue : double.MinValue)],
            [.. Enumerable.Range(0, 500).Select(i => 9007199254740992.0 + (2 * i))],
            [.. Enumerable.Range(0, 500).Select(i => i % 2 == 0 ? 9007199254740991.0 : -9007199254740991.0)],
            [.. Enumerable.Range(0, 500).Select(i => i % 50 == 0 ? 1e300 : 0.1)],
        ];
        HashSet<(int, int)> ways = [];
        foreach (double[] column in columns)
        {
            ByteWriter writer = new();
            ValueColumn.Write(writer, column);
            int at = writer.Written[0] == 0 ? 3 : 1;
            bool plain = writer.Written[0] == 1 || writer.Written[2] == 0;
            ways.Add((writer.Written[0], plain ? writer.Written[at] : -1));
            RoundTrip(column);
        }

        Assert.Superset(new HashSet<(int, int)> { (0, 0), (0, 1), (0, 2), (0, -1), (1, 0xFF), (1, 0xF8) }, ways);
    }

    [Fact]
    public void Not_a_number_keeps_its_payload_bits() =>
        RoundTrip([BitConverter.Int64BitsToDouble(0x7FF8_0000_0000_1234), BitConverter.Int64BitsToDouble(unchecked((long)0xFFF0_0000_0000_0001)), 1]);

    [Fact]
    public void Values_of_one_instant_in_many_channels_share_their_times()
    {
        long[] times = [.. Enumerable.Range(0, 3600).Select(i => Hour + (i * 1_000_000L) + (i * 7919L % 2000))];
        byte[] one = new BlockEncoder().Encode(SampleHeader, [Series("a", times, new double[3600])]);
        byte[] twelve = new BlockEncoder().Encode(SampleHeader, [.. Enumerable.Range(0, 12).Select(i => Series($"c{i:D2}", [.. times], new double[3600]))]);
        Assert.InRange(twelve.Length, one.Length, one.Length + 600);
    }

    [Fact]
    public void The_header_and_directory_say_what_is_inside()
    {
        byte[] previous = [.. Enumerable.Range(0, 32).Select(i => (byte)i)];
        BlockHeader header = SampleHeader with { Part = 3, PreviousDigest = previous };
        SealedBlock block = SealedBlock.Open(new BlockEncoder().Encode(header, [Series("a", [Hour + 5], [1]), Series("b", [Hour + 5, Hour + 3_599_999_999], [1, 2])]));
        Assert.Equal((header.Source, Hour, 3, 3), (block.Header.Source, block.Header.Hour, block.Header.Part, block.Readings));
        Assert.Equal(previous, block.Header.PreviousDigest.ToArray());
        Assert.Equal(Hour + 3_599_999_999, block.LastTime(block.Find("b")));
        Assert.Equal(-1, block.Find("c"));
    }

    [Fact]
    public void The_same_readings_give_the_same_bytes()
    {
        ReadingSeries[] series = [Series("a", [Hour, Hour + 1], [0.5, 0.25])];
        BlockEncoder encoder = new();
        Assert.Equal(encoder.Encode(SampleHeader, series), encoder.Encode(SampleHeader, series));
    }

    private static void RoundTrip(double[] values)
    {
        if (values.Length > 0)
        {
            AssertRoundTrip([Series("t1", [.. Enumerable.Range(0, values.Length).Select(i => Hour + (i * 1_000_000L))], values)]);
        }
    }

    private static void AssertRoundTrip(List<ReadingSeries> series)
    {
        if (series.Count == 0)
        {
            return;
        }

        SealedBlock block = SealedBlock.Open(new BlockEncoder().Encode(SampleHeader, series));
        Assert.Equal(series.Select(one => one.Channel), block.Channels.Select(one => one.Name));
        for (int i = series.Count - 1; i >= 0; i--)
        {
            ReadingSeries back = block.Decode(i);
            Assert.Equal(series[i].TimeMicroseconds.ToArray(), back.TimeMicroseconds.ToArray());
            Assert.Equal(series[i].Values.ToArray().Select(BitConverter.DoubleToInt64Bits), back.Values.ToArray().Select(BitConverter.DoubleToInt64Bits));
            Assert.Equal(series[i].Qualities.ToArray(), back.Qualities.ToArray());
        }
    }

    private static ReadingSeries Series(string channel, long[] times, double[] values) =>
        new(channel, times, values, values.Select((value, i) => double.IsNaN(value) ? ReadingQuality.NoValue : (ReadingQuality)(i / 50 % 4 * 2)).ToArray());
}
