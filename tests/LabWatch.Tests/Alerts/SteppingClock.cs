using Microsoft.Extensions.Time.Testing;

namespace LabWatch.Tests.Alerts;

/// <summary>A fake clock whose wall time can be set without moving the monotonic one, as an operator or NTP does.</summary>
internal sealed class SteppingClock(DateTimeOffset start) : FakeTimeProvider(start)
{
    /// <summary>What the wall clock shows beyond the monotonic one.</summary>
    public TimeSpan Step { get; set; }

    public override DateTimeOffset GetUtcNow() => base.GetUtcNow() + Step;

    public override long GetTimestamp() => base.GetUtcNow().Ticks;
}
