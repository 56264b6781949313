using LabWatch.Lab.Alerts;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;

namespace LabWatch.Tests.Alerts;

/// <summary>A hazard channel from which nothing valid comes is itself a hazard.</summary>
public sealed class HazardSilentTests
{
    private static readonly (string, bool) Silent = (HazardCode.HazardSilent, true);
    private static readonly (string, bool) Heard = (HazardCode.HazardSilent, false);

    [Fact]
    public void Silence_of_several_intervals_raises_and_the_first_valid_reading_ends_it()
    {
        WatchBench bench = new(TestSite.OneSurface());
        bench.Pass(30, 25);
        bench.Pass(9);
        Assert.Empty(bench.Edges);
        bench.Pass(1);
        Assert.Equal([Silent], bench.Edges);
        bench.Pass(100);
        Assert.Equal([Silent], bench.Edges);
        bench.Pass(1, 25);
        Assert.Equal([Silent, Heard], bench.Edges);
    }

    [Fact]
    public void Readings_that_are_not_valid_are_silence()
    {
        WatchBench bench = new(TestSite.OneSurface());
        bench.Pass(20, 25);
        bench.Pass(5, double.NaN);
        bench.Pass(5, 5000);
        Assert.Equal([Silent], bench.Edges);
    }

    [Fact]
    public void A_slow_channel_is_judged_by_its_own_interval()
    {
        WatchBench bench = new(TestSite.Lab(TestSite.Source(TestSite.Rowan, TestSite.Surface(TestSite.Rowan, seconds: 30))));
        bench.Pass(1, 25);
        bench.Pass(149);
        Assert.Empty(bench.Edges);
        bench.Pass(1);
        Assert.Equal([Silent], bench.Edges);
    }

    [Fact]
    public void A_step_of_the_wall_clock_makes_no_silence()
    {
        WatchBench bench = new(TestSite.OneSurface());
        bench.Pass(30, 25);
        bench.Clock.Step = TimeSpan.FromHours(3);
        bench.Watch.Tick();
        Assert.Empty(bench.Edges);
        bench.Clock.Step = TimeSpan.FromHours(-3);
        bench.Pass(9);
        Assert.Empty(bench.Edges);
        bench.Pass(1);
        Assert.Equal([Silent], bench.Edges);
    }

    [Fact]
    public void After_a_restart_the_silence_before_it_counts_once_devices_had_time_to_connect()
    {
        Dictionary<ChannelKey, Instant> heard = new() { [new ChannelKey(TestSite.Rowan, "case")] = TestSite.Start - TimeSpan.FromMinutes(47) };
        WatchBench bench = new(TestSite.OneSurface(), heard: heard);
        bench.Pass(14);
        Assert.Empty(bench.Edges);
        bench.Pass(1);
        Assert.Equal([Silent], bench.Edges);
        Assert.Contains("silent for 47 min", bench.Conditions.Found[0].Headline, StringComparison.Ordinal);
    }

    [Fact]
    public void A_channel_never_heard_is_silent_from_the_start()
    {
        WatchBench bench = new(TestSite.OneSurface());
        bench.Pass(15);
        Assert.Equal([Silent], bench.Edges);
        Assert.Contains("No valid reading is known", bench.Conditions.Found[0].Detail, StringComparison.Ordinal);
    }

    [Fact]
    public void An_old_reading_ends_a_silence()
    {
        WatchBench bench = new(TestSite.OneSurface());
        bench.Pass(15);
        bench.Send(25, age: TimeSpan.FromHours(2));
        Assert.Equal([Silent, Heard], bench.Edges);
    }

    [Fact]
    public void A_sensor_that_sends_nothing_but_old_readings_is_a_hazard_until_a_fresh_one_comes()
    {
        WatchBench bench = new(TestSite.OneSurface());
        bench.Pass(20, 25);
        for (int i = 0; i < 90; i++)
        {
            bench.Pass(1);
            bench.Send(25, age: TimeSpan.FromMinutes(5));
        }

        Assert.Equal([Silent], bench.Edges);
        Assert.Contains("only old readings", bench.Conditions.Found[0].Headline, StringComparison.Ordinal);
        bench.Send(25);
        Assert.Equal([Silent, Heard], bench.Edges);
    }

    [Fact]
    public void A_backlog_followed_by_fresh_readings_raises_nothing()
    {
        WatchBench bench = new(TestSite.OneSurface());
        bench.Pass(20, 25);
        for (int i = 0; i < 5000; i++)
        {
            bench.Send(25, age: TimeSpan.FromMinutes(90) - TimeSpan.FromSeconds(i));
        }

        bench.Pass(100, 25);
        Assert.Empty(bench.Edges);
    }

    [Fact]
    public void A_channel_that_is_no_surface_can_be_a_hazard_channel()
    {
        Channel oxygen = new(new ChannelKey(TestSite.Rowan, "oxygen"), "Room oxygen", ChannelQuantity.RoomOxygen, "%", TimeSpan.FromSeconds(2))
        {
            IsHazardChannel = true,
        };
        WatchBench bench = new(TestSite.Lab(TestSite.Source(TestSite.Rowan, oxygen)));
        bench.Pass(5);
        bench.Send(20.9, channel: "oxygen");
        bench.Pass(9);
        Assert.Empty(bench.Edges);
        bench.Pass(1);
        Assert.Equal([Silent], bench.Edges);
    }
}
