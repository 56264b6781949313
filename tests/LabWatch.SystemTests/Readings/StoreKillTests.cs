using System.Diagnostics;
using System.Globalization;
using LabWatch.Lab.Time;
using LabWatch.Readings;
using LabWatch.SystemTests.Reliability;

namespace LabWatch.SystemTests.Readings;

/// <summary>A real process is killed while it appends and seals: every commit that it had said is there, once, with its values.</summary>
public sealed class StoreKillTests
{
    private static CancellationToken Token => TestContext.Current.CancellationToken;

    [Fact]
    public async Task Nothing_that_was_durable_is_lost_or_doubled_by_kills_at_random_moments()
    {
        using TemporaryDirectory folder = new();
        Random random = new(20);
        int said = -1;
        for (int round = 0; round < Rounds(); round++)
        {
            said = await KillAfterAsync(folder.Path, said + 1, random.Next(100, 900), random.Next(0, 20));
            await using SqliteReadingStore store = StoreWriterProcess.Open(folder.Path);
            int stored = await CheckAsync(store, said);
            AppendResult again = await store.AppendAsync([.. Enumerable.Range(0, stored).Select(StoreWriterProcess.Pack)], Token);
            Assert.Equal((0, stored * StoreWriterProcess.PackWidth), (again.Accepted, again.Duplicates));
            Assert.Empty(store.Findings);
            said = stored - 1;
        }

        long readings = (said + 1L) * StoreWriterProcess.PackWidth;
        ReliabilityReport.Record(
            "store of readings", "writing process killed (kill -9) at random moments while it appends and seals", $"{Rounds()} kills",
            "after each kill the whole store was read back, compared, and everything appended again", readings, 0, 0);
    }

    private static int Rounds() => TestLength.Of(shortForm: 4, longForm: 100);

    private static async Task<int> KillAfterAsync(string folder, int from, int commits, int milliseconds)
    {
        using Process child = StoreWriterProcess.StartChild(folder, from);
        try
        {
            return await KillAfterAsync(child, from, commits, milliseconds);
        }
        finally
        {
            child.Kill();
        }
    }

    private static async Task<int> KillAfterAsync(Process child, int from, int commits, int milliseconds)
    {
        int last = from - 1;
        while (last < from + commits && await child.StandardOutput.ReadLineAsync(Token) is { } line)
        {
            last = int.Parse(line, CultureInfo.InvariantCulture);
        }

        await Task.Delay(TimeSpan.FromMilliseconds(milliseconds), TimeProvider.System, Token);
        child.Kill();
        while (await child.StandardOutput.ReadLineAsync(Token) is { } line)
        {
            last = int.TryParse(line, CultureInfo.InvariantCulture, out int number) && number == last + 1 ? number : last;
        }

        await child.WaitForExitAsync(Token);
        Assert.True(last >= from, "the writer said no commit");
        return last;
    }

    /// <summary>Checks that packs 0 to at least the last one said are there whole; gives how many packs are.</summary>
    private static async Task<int> CheckAsync(SqliteReadingStore store, int said)
    {
        TimeWindow all = new(StoreWriterProcess.Start, StoreWriterProcess.Start + TimeSpan.FromDays(3650));
        ReadingWindow window = await store.ReadAsync(StoreWriterProcess.Source, null, all, Token);
        Assert.Equal(StoreWriterProcess.PackWidth, window.Series.Count);
        int stored = window.Series[0].Count;
        Assert.InRange(stored, said + 1, said + 2);
        foreach (ReadingSeries series in window.Series)
        {
            int channel = int.Parse(series.Channel.AsSpan(1), CultureInfo.InvariantCulture);
            Assert.Equal(Enumerable.Range(0, stored).Select(number => StoreWriterProcess.Pack(number).Readings[channel].Value), series.Values.ToArray());
            Assert.Equal(Enumerable.Range(0, stored).Select(number => StoreWriterProcess.Pack(number).Arrival.Microseconds), series.TimeMicroseconds.ToArray());
        }

        return stored;
    }
}
