using LabWatch.Lab;

namespace LabWatch.Tests.Alerts;

/// <summary>A snapshot source whose snapshot the test replaces.</summary>
internal sealed class FixedLab(LabSnapshot lab) : ILabSnapshotSource
{
    public event EventHandler? Changed;

    public LabSnapshot Current { get; private set; } = lab;

    public void Replace(LabSnapshot next)
    {
        Current = next;
        Changed?.Invoke(this, EventArgs.Empty);
    }
}
