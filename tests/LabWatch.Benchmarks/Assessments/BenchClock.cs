namespace LabWatch.Benchmarks.Assessments;

/// <summary>A clock that stands where it is put; timers of it never fire.</summary>
internal sealed class BenchClock(DateTimeOffset now) : TimeProvider
{
    private readonly DateTimeOffset _start = now;

    public DateTimeOffset Now { get; set; } = now;

    public override long TimestampFrequency => TimeSpan.TicksPerSecond;

    public override DateTimeOffset GetUtcNow() => Now;

    public override long GetTimestamp() => (Now - _start).Ticks;
}
