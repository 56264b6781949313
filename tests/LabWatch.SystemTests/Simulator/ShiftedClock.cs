namespace LabWatch.SystemTests.Simulator;

/// <summary>The system's clock with its wall time moved.</summary>
internal sealed class ShiftedClock(TimeSpan shift) : TimeProvider
{
    public override DateTimeOffset GetUtcNow() => base.GetUtcNow() + shift;
}
