using LabWatch.Records.Accounts;
using LabWatch.Service.Api.Access;
using LabWatch.Service.Api.Accounts;
using Microsoft.Extensions.Time.Testing;

namespace LabWatch.Tests.Access;

public sealed class SignInThrottleTests
{
    private readonly FakeTimeProvider _clock = new(new DateTimeOffset(2026, 12, 1, 9, 0, 0, TimeSpan.Zero));
    private readonly SignInThrottle _throttle;

    public SignInThrottleTests() => _throttle = new SignInThrottle(new SessionClock(_clock));

    [Fact]
    public void Waits_grow_to_a_quarter_of_an_hour() =>
        Assert.Equal([0, 0, 1, 2, 4, 512, 900, 900], new[] { 0, 4, 5, 6, 7, 14, 15, 99 }.Select(failures => SignInThrottle.WaitAfter(failures).TotalSeconds));

    [Theory]
    [InlineData(true)]
    [InlineData(false)]
    public void After_a_hundred_failures_in_a_row_none_is_taken_any_more(bool isAccount)
    {
        // NIST SP 800-63B-4, 3.2.2: no more than 100 consecutive failed attempts on one account; from memory.
        Account? account = isAccount ? Sample(0, 1) : null;
        for (int i = 0; i < SignInThrottle.Most; i++)
        {
            Assert.Null(_throttle.TryEnter("kim", account));
            _clock.Advance(SignInThrottle.LongestWait);
        }

        _clock.Advance(TimeSpan.FromDays(30));
        Assert.NotNull(_throttle.TryEnter("kim", account));
        Assert.Null(_throttle.TryEnter("lee", null));
    }

    [Fact]
    public void Many_attempts_at_once_gain_nothing()
    {
        int taken = Enumerable.Range(0, 50).Count(_ => _throttle.TryEnter("kim", null) is null);
        Assert.Equal(SignInThrottle.Free, taken);
    }

    [Fact]
    public void A_success_forgives_and_a_new_password_on_another_node_does_too()
    {
        for (int i = 0; i < SignInThrottle.Free; i++)
        {
            _throttle.TryEnter("kim", Sample(0, 1));
        }

        Assert.NotNull(_throttle.TryEnter("kim", Sample(0, 1)));
        Assert.Null(_throttle.TryEnter("kim", Sample(0, 2)));
        _throttle.Forgive("kim", hasSucceeded: true);
        Assert.Equal(0, _throttle.FailuresOf("kim"));
    }

    [Fact]
    public void Failures_on_the_record_count_after_a_restart()
    {
        Assert.NotNull(_throttle.TryEnter("kim", Sample(SignInThrottle.Most, 1)));
        Assert.NotNull(_throttle.TryEnter("lee", Sample(20, 1)));
    }

    [Fact]
    public void Names_without_end_take_no_memory_without_end_and_wash_no_account_away()
    {
        for (int i = 0; i < SignInThrottle.Free; i++)
        {
            _throttle.TryEnter("kim", Sample(0, 1));
        }

        for (int i = 0; i < SignInThrottle.MostNames * 3; i++)
        {
            _throttle.TryEnter("name-" + i, null);
        }

        Assert.Equal(SignInThrottle.Free, _throttle.FailuresOf("kim"));
        Assert.Equal(0, _throttle.FailuresOf("name-0"));
    }

    private static Account Sample(int failures, int revision) =>
        new("kim", revision, "Kim", [Role.Auditor], false, false, null, default, null, failures);
}
