using LabWatch.Intake.Diagnostics;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Time;

namespace LabWatch.Tests.Api.Fakes;

/// <summary>An intake as a test says.</summary>
internal sealed class FakeIntake : IIntakeState
{
    public BrokerLinkState Link { get; set; } = BrokerLinkState.None;

    public bool SessionPresent => false;

    public string? LinkNote => null;

    public int? EmbeddedPort { get; set; } = 1883;

    public bool CommitsStopped { get; set; }

    public int QueueLength => 0;

    public long SpoolLength => 0;

    public long SpoolBytes => 0;

    public IReadOnlyDictionary<SourceKey, Instant> LastMessages { get; } = new Dictionary<SourceKey, Instant>();

    public Dictionary<SourceKey, DeviceClock> DeviceClocks { get; } = [];

    public IReadOnlyDictionary<SourceKey, DeviceClock> Clocks => DeviceClocks;

    public IntakeTotals Totals => throw new NotSupportedException();
}
