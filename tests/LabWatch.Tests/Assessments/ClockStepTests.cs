using LabWatch.Assessments.Clock;
using LabWatch.Lab.Time;
using Microsoft.Extensions.Logging.Abstractions;

namespace LabWatch.Tests.Assessments;

public sealed class ClockStepTests
{
    [Theory]
    [InlineData(3600)]
    [InlineData(-3600)]
    [InlineData(1.1)]
    public void A_step_is_seen_with_its_size(double seconds)
    {
        SteppingClock clock = new(TestLab.Noon);
        ClockComparison comparison = new(clock);
        clock.Advance(TimeSpan.FromSeconds(4));
        clock.Step(TimeSpan.FromSeconds(seconds));
        clock.Advance(TimeSpan.FromSeconds(6));
        ClockStep step = Assert.IsType<ClockStep>(comparison.Look());
        Assert.Equal(TimeSpan.FromSeconds(seconds), step.Step);
        Assert.Equal(TimeSpan.FromSeconds(10), step.Within);
        Assert.Equal(Instant.Now(clock), step.NoticedAt);
        clock.Advance(TimeSpan.FromSeconds(10));
        Assert.Null(comparison.Look());
    }

    [Theory]
    [InlineData(0)]
    [InlineData(0.9)]
    [InlineData(-0.9)]
    public void A_slewed_clock_is_no_step(double seconds)
    {
        SteppingClock clock = new(TestLab.Noon);
        ClockComparison comparison = new(clock);
        clock.Step(TimeSpan.FromSeconds(seconds));
        clock.Advance(TimeSpan.FromSeconds(10));
        Assert.Null(comparison.Look());
    }

    [Fact]
    public async Task The_watchdog_tells_of_a_step_within_ten_seconds()
    {
        CancellationToken token = TestContext.Current.CancellationToken;
        SteppingClock clock = new(TestLab.Noon);
        using ClockStepWatchdog watchdog = new(clock, NullLogger<ClockStepWatchdog>.Instance);
        TaskCompletionSource<ClockStep> told = new(TaskCreationOptions.RunContinuationsAsynchronously);
        watchdog.Stepped += (_, step) => told.TrySetResult(step);
        await watchdog.StartAsync(token);
        clock.Step(TimeSpan.FromHours(-1));
        clock.Advance(TimeSpan.FromSeconds(10));
        Assert.Equal(TimeSpan.FromHours(-1), (await told.Task.WaitAsync(token)).Step);
        await watchdog.StopAsync(token);
    }
}
