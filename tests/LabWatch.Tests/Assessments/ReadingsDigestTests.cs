using System.Buffers.Binary;
using System.Security.Cryptography;
using LabWatch.Assessments.Evaluation;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Time;
using LabWatch.Readings;

namespace LabWatch.Tests.Assessments;

public sealed class ReadingsDigestTests
{
    [Fact]
    public void The_digest_is_sha_256_over_the_documented_form()
    {
        List<byte> form = [.. "labwatch-readings-1\nhollin-vale.rowan\n"u8, .. "a\n"u8, 0, 0, 0, 2];
        Append(form, 1_000_000, 1.5, 0);
        form.AddRange([0, 0, 0, 0, 0, 0x1E, 0x84, 0x80, 0x7F, 0xF8, 0, 0, 0, 0, 0, 0, 1]);
        form.AddRange([.. "b\n"u8, 0, 0, 0, 1]);
        Append(form, 3_000_000, -0.0, 32);
        Assert.Equal(Convert.ToHexStringLower(SHA256.HashData(form.ToArray())), ReadingsDigest.Of(Window()));
    }

    [Fact]
    public void The_order_of_the_channels_does_not_matter_but_every_value_time_and_quality_does()
    {
        ReadingWindow window = Window();
        string digest = ReadingsDigest.Of(window);
        Assert.Equal(digest, ReadingsDigest.Of(window with { Series = [.. window.Series.Reverse()] }));
        ReadingSeries b = window.Series[1];
        ReadingSeries[] others =
        [
            b with { Values = new[] { 0.0 } }, b with { TimeMicroseconds = new[] { 3_000_001L } }, b with { Qualities = new[] { ReadingQuality.None } }, b with { Channel = "c" },
        ];
        Assert.All(others, other => Assert.NotEqual(digest, ReadingsDigest.Of(window with { Series = [window.Series[0], other] })));
    }

    [Fact]
    public void More_readings_than_one_block_are_all_in_it()
    {
        long[] times = [.. Enumerable.Range(0, 1000).Select(index => (long)index)];
        ReadingSeries series = new("a", times, new double[1000], new ReadingQuality[1000]);
        List<byte> form = [.. "labwatch-readings-1\nhollin-vale.rowan\n"u8, .. "a\n"u8, 0, 0, 3, 0xE8];
        foreach (long time in times)
        {
            Append(form, time, 0, 0);
        }

        Assert.Equal(
            Convert.ToHexStringLower(SHA256.HashData(form.ToArray())), ReadingsDigest.Of(new(TestLab.Rowan, default, [series], [])));
    }

    private static ReadingWindow Window() => new(
        TestLab.Rowan,
        new TimeWindow(default, TestLab.Noon),
        [
            new("a", new[] { 1_000_000L, 2_000_000L }, new[] { 1.5, -double.NaN }, new[] { ReadingQuality.None, ReadingQuality.NoValue }),
            new("b", new[] { 3_000_000L }, new[] { -0.0 }, new[] { ReadingQuality.Late }),
        ],
        []);

    private static void Append(List<byte> form, long time, double value, byte quality)
    {
        byte[] place = new byte[17];
        BinaryPrimitives.WriteInt64BigEndian(place, time);
        BinaryPrimitives.WriteDoubleBigEndian(place.AsSpan(8), value);
        place[16] = quality;
        form.AddRange(place);
    }
}
