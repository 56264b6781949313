using LabWatch.Lab;

namespace LabWatch.Tests.Assessments;

/// <summary>A snapshot that a test exchanges.</summary>
internal sealed class FakeSnapshots(LabSnapshot current) : ILabSnapshotSource
{
    public LabSnapshot Current { get; private set; } = current;

    public event EventHandler? Changed;

    public void Exchange(LabSnapshot snapshot)
    {
        Current = snapshot;
        Changed?.Invoke(this, EventArgs.Empty);
    }
}
