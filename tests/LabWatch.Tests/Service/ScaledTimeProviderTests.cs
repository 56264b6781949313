using LabWatch.Service.Hosting;
using Microsoft.Extensions.Time.Testing;

namespace LabWatch.Tests.Service;

public sealed class ScaledTimeProviderTests
{
    private static readonly DateTimeOffset Start = new(2026, 3, 2, 8, 0, 0, TimeSpan.Zero);

    private readonly FakeTimeProvider _inner = new(new DateTimeOffset(2026, 1, 1, 0, 0, 0, TimeSpan.Zero));

    [Fact]
    public void Wall_and_monotonic_time_run_at_the_stated_speed()
    {
        ScaledTimeProvider clock = new(_inner, 60, Start);
        long stamp = clock.GetTimestamp();

        _inner.Advance(TimeSpan.FromSeconds(10));

        Assert.Equal(Start.AddMinutes(10), clock.GetUtcNow());
        Assert.Equal(TimeSpan.FromMinutes(10), clock.GetElapsedTime(stamp));
    }

    [Fact]
    public void A_timer_fires_after_its_time_on_this_clock()
    {
        ScaledTimeProvider clock = new(_inner, 60, Start);
        int fired = 0;
        using ITimer timer = clock.CreateTimer(_ => fired++, null, TimeSpan.FromMinutes(1), TimeSpan.FromMinutes(2));

        _inner.Advance(TimeSpan.FromMilliseconds(999));
        Assert.Equal(0, fired);
        _inner.Advance(TimeSpan.FromMilliseconds(1));
        Assert.Equal(1, fired);
        _inner.Advance(TimeSpan.FromSeconds(4));
        Assert.Equal(3, fired);
    }

    [Theory]
    [InlineData(0)]
    [InlineData(-1)]
    [InlineData(double.NaN)]
    [InlineData(double.PositiveInfinity)]
    public void A_speed_that_is_not_positive_and_finite_is_refused(double speed) =>
        Assert.Throws<ArgumentOutOfRangeException>(() => new ScaledTimeProvider(_inner, speed, Start));
}
