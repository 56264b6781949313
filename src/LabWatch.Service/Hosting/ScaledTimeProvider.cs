namespace LabWatch.Service.Hosting;

/// <summary>
/// A clock that runs a fixed number of times faster (or slower) than the one beneath it: wall clock, monotonic time stamps and timers alike,
/// so that everything which asks this provider stays consistent.
/// </summary>
internal sealed class ScaledTimeProvider : TimeProvider
{
    private readonly TimeProvider _inner;
    private readonly double _speed;
    private readonly DateTimeOffset _originWall;
    private readonly long _originStamp;

    /// <summary>Starts the clock at a wall time.</summary>
    /// <param name="inner">The clock beneath.</param>
    /// <param name="speed">How many of its seconds pass in one of the clock beneath; positive and finite.</param>
    /// <param name="startAt">Wall time to start at.</param>
    public ScaledTimeProvider(TimeProvider inner, double speed, DateTimeOffset startAt)
    {
        ArgumentNullException.ThrowIfNull(inner);
        if (!(speed > 0 && double.IsFinite(speed)))
        {
            throw new ArgumentOutOfRangeException(nameof(speed), speed, "The speed must be positive and finite.");
        }

        _inner = inner;
        _speed = speed;
        _originWall = startAt;
        _originStamp = inner.GetTimestamp();
    }

    /// <inheritdoc/>
    public override long TimestampFrequency => _inner.TimestampFrequency;

    /// <inheritdoc/>
    public override TimeZoneInfo LocalTimeZone => TimeZoneInfo.Utc;

    /// <inheritdoc/>
    public override DateTimeOffset GetUtcNow() => _originWall + (_inner.GetElapsedTime(_originStamp) * _speed);

    /// <inheritdoc/>
    public override long GetTimestamp() => _originStamp + (long)((_inner.GetTimestamp() - _originStamp) * _speed);

    /// <inheritdoc/>
    public override ITimer CreateTimer(TimerCallback callback, object? state, TimeSpan dueTime, TimeSpan period) =>
        new ScaledTimer(_inner.CreateTimer(callback, state, Shrink(dueTime), Shrink(period)), this);

    private TimeSpan Shrink(TimeSpan span)
    {
        if (span == Timeout.InfiniteTimeSpan || span == TimeSpan.Zero)
        {
            return span;
        }

        // A due time of less than a tick would mean "at once" and a period of zero "never again".
        return TimeSpan.FromTicks(Math.Max(TimeSpan.TicksPerMillisecond, (long)(span.Ticks / _speed)));
    }

    private sealed class ScaledTimer(ITimer inner, ScaledTimeProvider clock) : ITimer
    {
        public bool Change(TimeSpan dueTime, TimeSpan period) => inner.Change(clock.Shrink(dueTime), clock.Shrink(period));

        public void Dispose() => inner.Dispose();

        public ValueTask DisposeAsync() => inner.DisposeAsync();
    }
}
