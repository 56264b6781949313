using LabWatch.Lab.Time;
using LabWatch.Readings;
using static LabWatch.Tests.Readings.StoreBench;

namespace LabWatch.Tests.Readings;

/// <summary>Bytes of the database file itself are wrong: the store opens or says that it cannot, takes readings again where it can, and never gives a wrong value.</summary>
public sealed class FileDamageTests
{
    [Theory]
    [InlineData(1)]
    [InlineData(2)]
    [InlineData(3)]
    [InlineData(4)]
    [InlineData(5)]
    [InlineData(6)]
    [InlineData(7)]
    [InlineData(8)]
    public async Task Damaged_pages_never_give_a_wrong_value(int seed)
    {
        await using StoreBench bench = new();
        for (int i = 0; i < 40; i++)
        {
            await bench.AppendAsync(i * 600, [.. Enumerable.Range(0, 200).Select(channel => i + (channel / 1000.0))]);
            if (i == 25)
            {
                await bench.Store.SealEverythingAsync(Token);
            }
        }

        await bench.Store.DisposeAsync();
        await bench.ReopenAsync();
        await bench.CrashAsync(folder => Damage(Path.Combine(folder, SqliteReadingStore.FileName), new Random(seed)));
        try
        {
            ReadingWindow window = await bench.Store.ReadAsync(Fir, null, new TimeWindow(Noon, Noon + TimeSpan.FromHours(10)), Token);
            foreach (ReadingSeries series in window.Series)
            {
                for (int i = 0; i < series.Count; i++)
                {
                    double expected = ((series.TimeMicroseconds.Span[i] - Noon.Microseconds) / 600e6) + (int.Parse(series.Channel[1..], System.Globalization.CultureInfo.InvariantCulture) / 1000.0);
                    Assert.Equal(expected, series.Values.Span[i], 1e-9);
                }
            }

            await bench.AppendAsync(100_000, 1);
        }
        catch (StoreUnavailableException)
        {
            // Said aloud: what the design wants where the damage leaves no way to go on.
        }
    }

    private static void Damage(string path, Random random)
    {
        byte[] bytes = File.ReadAllBytes(path);
        for (int i = 0; i < 3; i++)
        {
            int at = 4096 * random.Next(1, bytes.Length / 4096);
            random.NextBytes(bytes.AsSpan(at + random.Next(4000), 64));
        }

        File.WriteAllBytes(path, bytes);
    }
}
