using LabWatch.Lab.Time;
using Microsoft.Extensions.Time.Testing;

namespace LabWatch.Tests.Assessments;

/// <summary>A clock that a test advances, and whose wall time it can step without the monotonic time noticing.</summary>
internal sealed class SteppingClock(Instant start) : TimeProvider
{
    private readonly FakeTimeProvider _inner = new(start.ToDateTimeOffset());
    private TimeSpan _stepped;

    public override long TimestampFrequency => _inner.TimestampFrequency;

    public override DateTimeOffset GetUtcNow() => _inner.GetUtcNow() + _stepped;

    public override long GetTimestamp() => _inner.GetTimestamp();

    public override ITimer CreateTimer(TimerCallback callback, object? state, TimeSpan dueTime, TimeSpan period) =>
        _inner.CreateTimer(callback, state, dueTime, period);

    public void Advance(TimeSpan by) => _inner.Advance(by);

    public void AdvanceTo(Instant instant) => _inner.Advance(instant.ToDateTimeOffset() - GetUtcNow());

    public void Step(TimeSpan by) => _stepped += by;
}
