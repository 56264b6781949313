using LabWatch.Intake.Diagnostics;

namespace LabWatch.Intake.Brokers.External;

/// <summary>What the health page is told about the link. Written by the supervisor, read by anybody.</summary>
internal sealed class LinkStatus
{
    private volatile Snapshot _snapshot = new(BrokerLinkState.None, false, null);

    public BrokerLinkState State => _snapshot.State;

    public bool SessionPresent => _snapshot.SessionPresent;

    public string? Note => _snapshot.Note;

    public void Set(BrokerLinkState state, bool sessionPresent, string? note) => _snapshot = new Snapshot(state, sessionPresent, note);

    private sealed record Snapshot(BrokerLinkState State, bool SessionPresent, string? Note);
}
