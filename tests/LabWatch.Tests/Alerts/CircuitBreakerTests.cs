using LabWatch.Alerts.Outbox;

namespace LabWatch.Tests.Alerts;

/// <summary>A receiver that does not answer is spared.</summary>
public sealed class CircuitBreakerTests
{
    private static readonly TimeSpan Rest = TimeSpan.FromSeconds(30);
    private readonly SteppingClock _clock = new(TestSite.Start.ToDateTimeOffset());

    [Fact]
    public void After_five_failures_in_a_row_nothing_is_tried_until_the_rest_is_over_and_then_one_alone()
    {
        CircuitBreaker breaker = new(_clock, Rest);
        for (int i = 0; i < 5; i++)
        {
            Assert.Equal(TimeSpan.Zero, breaker.Ask());
            breaker.Note(answered: false);
        }

        Assert.True(breaker.IsOpen);
        Assert.Equal(Rest, breaker.Ask());
        _clock.Advance(Rest);
        Assert.Equal(TimeSpan.Zero, breaker.Ask());
        Assert.True(breaker.Ask() > TimeSpan.Zero);
        breaker.Note(answered: false);
        Assert.Equal(Rest, breaker.Ask());
        _clock.Advance(Rest);
        Assert.Equal(TimeSpan.Zero, breaker.Ask());
        breaker.Note(answered: true);
        Assert.False(breaker.IsOpen);
        Assert.Equal(TimeSpan.Zero, breaker.Ask());
    }

    [Fact]
    public void An_answer_between_failures_keeps_it_closed()
    {
        CircuitBreaker breaker = new(_clock, Rest);
        for (int i = 0; i < 20; i++)
        {
            breaker.Note(answered: i % 4 == 3);
        }

        Assert.Equal(TimeSpan.Zero, breaker.Ask());
    }
}
