using LabWatch.Lab.Alerts;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Time;

namespace LabWatch.Tests.Alerts;

/// <summary>What must hold for the hazard watch whatever comes in; random streams with fixed seeds.</summary>
public sealed class HazardProperties
{
    private const double Limit = 48;

    public static TheoryData<int> Seeds => [.. Enumerable.Range(1, 40)];

    [Theory]
    [MemberData(nameof(Seeds))]
    public void A_fresh_valid_reading_at_or_above_the_limit_leaves_the_hazard_standing(int seed)
    {
        Random random = new(seed);
        WatchBench bench = new(TestSite.OneSurface());
        HashSet<(Instant, double)> seen = [];
        for (int i = 0; i < 600; i++)
        {
            bench.Clock.Advance(TimeSpan.FromSeconds(random.NextDouble() * 20));
            Reading reading = Draw(random, bench.Now);
            bench.Watch.OnPack(new ReadingPack(TestSite.Rowan, bench.Now, [reading]));
            bool fresh = bench.Now - reading.Time <= TimeSpan.FromSeconds(60) && seen.Add((reading.Time, reading.Value));
            if (fresh && reading.Value is >= Limit and <= 400)
            {
                Assert.True(Standing(bench), $"seed {seed}, reading {i}: {reading}");
            }

            bench.Watch.Tick();
        }
    }

    [Theory]
    [MemberData(nameof(Seeds))]
    public void Raised_and_returned_alternate_for_each_hazard(int seed)
    {
        Random random = new(seed);
        WatchBench bench = new(TestSite.OneSurface());
        for (int i = 0; i < 600; i++)
        {
            bench.Clock.Advance(TimeSpan.FromSeconds(random.NextDouble() * 20));
            bench.Watch.OnPack(new ReadingPack(TestSite.Rowan, bench.Now, [Draw(random, bench.Now)]));
            bench.Watch.Tick();
        }

        foreach (IGrouping<string, (string Code, bool Present)> hazard in bench.Edges.GroupBy(edge => edge.Code))
        {
            Assert.All(hazard.Select((edge, index) => (edge.Present, index)), edge => Assert.Equal(edge.index % 2 == 0, edge.Present));
        }
    }

    [Theory]
    [MemberData(nameof(Seeds))]
    public void Redelivering_what_came_within_the_last_minute_changes_nothing(int seed)
    {
        IReadOnlyList<(string, bool)> once = Run(seed, redeliver: false);
        Assert.Equal(once, Run(seed, redeliver: true));
    }

    [Theory]
    [MemberData(nameof(Seeds))]
    public void The_order_of_packs_across_sources_does_not_matter(int seed)
    {
        Assert.Equal(RunTwoSources(seed, swap: false), RunTwoSources(seed, swap: true));
    }

    private static List<(string, bool)> Run(int seed, bool redeliver)
    {
        Random random = new(seed);
        Random choice = new(seed + 1000);
        WatchBench bench = new(TestSite.OneSurface());
        Queue<ReadingPack> sent = [];
        for (int i = 0; i < 400; i++)
        {
            bench.Clock.Advance(TimeSpan.FromSeconds(1));
            ReadingPack pack = new(TestSite.Rowan, bench.Now, [new Reading("case", bench.Now, 30 + (random.NextDouble() * 30))]);
            bench.Watch.OnPack(pack);
            sent.Enqueue(pack);
            if (sent.Count > 50)
            {
                sent.Dequeue();
            }

            if (redeliver)
            {
                bench.Watch.OnPack(sent.ElementAt(choice.Next(sent.Count)) with { Arrival = bench.Now });
            }

            bench.Watch.Tick();
        }

        return [.. bench.Edges];
    }

    private static List<string> RunTwoSources(int seed, bool swap)
    {
        Random random = new(seed);
        SourceKey[] sources = [TestSite.Rowan, TestSite.Yew];
        WatchBench bench = new(TestSite.Lab([.. sources.Select(source => TestSite.Source(source, TestSite.Surface(source)))]));
        for (int i = 0; i < 300; i++)
        {
            bench.Clock.Advance(TimeSpan.FromSeconds(1));
            ReadingPack[] packs = [.. sources.Select(source => new ReadingPack(source, bench.Now, [new Reading("case", bench.Now, 30 + (random.NextDouble() * 30))]))];
            foreach (ReadingPack pack in swap ? packs.Reverse() : packs)
            {
                bench.Watch.OnPack(pack);
            }
        }

        return [.. bench.Conditions.Found.Select(found => $"{found.Key} {found.Present} {found.At} {found.Headline}").Order(StringComparer.Ordinal)];
    }

    private static bool Standing(WatchBench bench) =>
        bench.Edges.LastOrDefault(edge => edge.Code == HazardCode.HotSurface) is { Present: true };

    private static Reading Draw(Random random, Instant now)
    {
        Instant time = now - TimeSpan.FromSeconds((random.NextDouble() * 100) - 15);
        double value = random.Next(10) switch
        {
            0 => double.NaN,
            1 => 5000,
            2 => -300,
            < 6 => 48 + (random.NextDouble() * 100),
            _ => 20 + (random.NextDouble() * 30),
        };
        return new Reading("case", time, value, double.IsNaN(value) ? ReadingQuality.NoValue : ReadingQuality.None);
    }
}
