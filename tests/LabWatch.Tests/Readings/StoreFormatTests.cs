using LabWatch.Lab.Identity;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Time;
using LabWatch.Readings;
using LabWatch.Readings.Blocks;

namespace LabWatch.Tests.Readings;

/// <summary>The description of the format is enough to read it: a second reader, written from the page alone, gives the same readings.</summary>
public sealed class StoreFormatTests
{
    private const long Hour = 1_764_590_400L * Instant.MicrosecondsPerSecond;

    [Fact]
    public void A_reader_written_from_the_description_gives_the_same_readings()
    {
        Random random = new(2);
        List<ReadingSeries> series = [];
        for (int channel = 0; channel < 9; channel++)
        {
            long[] times = [.. Enumerable.Range(0, 700).Where(_ => channel < 5 || random.Next(9) > 0).Select(i => Hour + (i * 5_000_000L) + (channel == 8 ? random.Next(1000) : 0))];
            double[] values = [.. times.Select((_, i) => Value(channel, i, random))];
            ReadingQuality[] qualities = [.. values.Select((value, i) => double.IsNaN(value) ? ReadingQuality.NoValue : (ReadingQuality)(i / 100 % 2 * 32))];
            series.Add(new ReadingSeries($"c{channel}", times, values, qualities));
        }

        byte[] block = new BlockEncoder().Encode(new BlockHeader(new SourceKey("hollin-vale", "fir"), Hour, 0, new byte[32]), series);
        var expected = series.SelectMany(one => Enumerable.Range(0, one.Count).Select(i =>
            (one.Channel, one.TimeMicroseconds.Span[i], BitConverter.DoubleToInt64Bits(one.Values.Span[i]), (byte)one.Qualities.Span[i])));
        Assert.Equal(expected, StoreFormatReader.Read(block).Select(one => (one.Channel, one.Time, BitConverter.DoubleToInt64Bits(one.Value), one.Quality)));
    }

    [Fact]
    public void The_page_shows_the_reader_that_is_tested()
    {
        string code = File.ReadAllText(RepositoryFiles.PathOf("tests", "LabWatch.Tests", "Readings", "StoreFormatReader.cs"));
        string shown = code[code.IndexOf("internal static class", StringComparison.Ordinal)..].Trim();
        Assert.Contains(shown, File.ReadAllText(RepositoryFiles.PathOf("docs", "reference", "store-format.md")), StringComparison.Ordinal);
    }

    private static double Value(int channel, int i, Random random) => channel switch
    {
        0 => 37.25,
        1 => Math.Round(138.5 + (random.NextDouble() / 1000), 4),
        2 => i * (double)i,
        3 => Math.Round(20 + (i % 2 * 7.5), 1),
        4 => random.NextDouble(),
        5 => i % 90 == 7 ? double.NaN : i % 90 == 50 ? -0.0 : i / 10.0,
        6 => (float)random.NextDouble(),
        7 => double.NaN,
        _ => random.Next(),
    };
}
