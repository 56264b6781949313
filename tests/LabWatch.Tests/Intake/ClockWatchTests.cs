using LabWatch.Intake.Diagnostics;
using LabWatch.Intake.Payloads;
using LabWatch.Intake.Pipeline;
using LabWatch.Lab.Time;

namespace LabWatch.Tests.Intake;

/// <summary>Clocks of devices that are off, scatter, leap and come back.</summary>
public class ClockWatchTests
{
    private readonly ClockWatch _watch = new(new ReadingTimeRule());
    private Instant _now = DecodingBench.Arrival;

    [Fact]
    public void The_offset_and_its_uncertainty_are_those_of_the_messages()
    {
        // The made scatter is normal with 0.1 s; the standard uncertainty of the median of 64 is 1.2533 * 0.1 s / 8 = 15.7 ms.
        var random = new Random(3);
        for (int i = 0; i < 200; i++)
        {
            double scatter = 0.1 * Math.Sqrt(-2 * Math.Log(1 - random.NextDouble())) * Math.Cos(2 * Math.PI * random.NextDouble());
            Assert.True(Send(-2 + scatter));
        }

        DeviceClock clock = _watch.Describe();
        Assert.Equal(DeviceClockState.Steady, clock.State);
        Assert.InRange(clock.OffsetSeconds, -2.06, -1.94);
        Assert.InRange(clock.StandardUncertaintySeconds, 0.008, 0.025);
        Assert.Equal(64, clock.Messages);
    }

    [Fact]
    public void Delayed_messages_do_not_move_the_offset()
    {
        for (int i = 0; i < 200; i++)
        {
            Assert.True(Send(i % 5 == 0 ? -30 : -1));
        }

        Assert.Equal(-1, _watch.Describe().OffsetSeconds);
    }

    [Fact]
    public void A_clock_that_leaps_ahead_is_refused_until_it_is_back()
    {
        Settle(-1);
        Assert.False(Send(300));
        Assert.Equal(DeviceClockState.LeaptAhead, _watch.Describe().State);
        Assert.Equal(301, _watch.Describe().LeapSeconds);
        Assert.False(Send(300));
        Assert.True(Send(-1));
        Assert.Equal(DeviceClockState.Steady, _watch.Describe().State);
    }

    [Fact]
    public void A_clock_that_leaps_back_is_refused_once_it_keeps_pace_and_repeats_times()
    {
        Settle(-1);
        bool[] admitted = [.. Enumerable.Range(0, 90).Select(_ => Send(-3_601))];
        Assert.True(admitted[5]);
        Assert.False(admitted[^1]);
        Assert.Equal(DeviceClockState.LeaptBack, _watch.Describe().State);
        Assert.True(Send(-1));
        Assert.Equal(DeviceClockState.Steady, _watch.Describe().State);
    }

    [Fact]
    public void A_backlog_after_an_outage_is_taken_however_slowly_it_comes()
    {
        Settle(-1);
        _now += TimeSpan.FromHours(1);
        Assert.All(Enumerable.Range(0, 300), _ => Assert.True(Send(-3_600)));
    }

    [Fact]
    public void A_backfill_that_runs_faster_than_time_is_taken()
    {
        Settle(-1);
        for (int i = 0; i < 500; i++)
        {
            _now += TimeSpan.FromMilliseconds(10);
            Assert.True(_watch.Admit(_now - TimeSpan.FromDays(3) + TimeSpan.FromSeconds(10 * i), _now));
        }
    }

    [Fact]
    public void A_backlog_alone_tells_nothing_of_the_clock()
    {
        for (int i = 0; i < 100; i++)
        {
            _now += TimeSpan.FromMilliseconds(10);
            Assert.True(_watch.Admit(_now - TimeSpan.FromDays(3) + TimeSpan.FromSeconds(10 * i), _now));
        }

        Assert.Equal(0, _watch.Describe().Messages);
        Assert.True(double.IsNaN(_watch.Describe().OffsetSeconds));
    }

    [Fact]
    public void A_clock_that_was_put_right_is_learnt_anew()
    {
        Settle(-500);
        Assert.True(Send(-1));
        Assert.Equal(DeviceClockState.Learning, _watch.Describe().State);
        Settle(-1);
        Assert.Equal(-1, _watch.Describe().OffsetSeconds);
    }

    [Fact]
    public void A_limit_of_none_refuses_nothing()
    {
        ClockWatch watch = new(new ReadingTimeRule { LeapLimit = null });
        for (int i = 0; i < 100; i++)
        {
            Assert.True(watch.Admit(_now + TimeSpan.FromSeconds(i % 2 == 0 ? 0 : 500), _now));
        }
    }

    private void Settle(double offset) => Assert.All(Enumerable.Range(0, 64), _ => Assert.True(Send(offset)));

    private bool Send(double offset)
    {
        _now += TimeSpan.FromSeconds(1);
        return _watch.Admit(_now + TimeSpan.FromSeconds(offset), _now);
    }
}
