using LabWatch.Intake.Brokers.Embedded;
using LabWatch.Intake.Brokers.External;
using LabWatch.Intake.Diagnostics;
using LabWatch.Intake.Pipeline;
using LabWatch.Intake.Spool;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Time;

namespace LabWatch.Intake;

/// <summary>Gathers the state of the parts.</summary>
internal sealed class IntakeState(
    LinkStatus link, MessageIntake intake, IntakeQueue queue, IntakeSpool spool, CommitSignal signal, IntakeCounters counters, EmbeddedBroker? embedded = null)
    : IIntakeState
{
    public BrokerLinkState Link => link.State;

    public bool SessionPresent => link.SessionPresent;

    public string? LinkNote => link.Note;

    public int? EmbeddedPort => embedded?.Port;

    public bool CommitsStopped => signal.Stopped;

    public int QueueLength => queue.Count;

    public long SpoolLength => spool.Entries;

    public long SpoolBytes => spool.Bytes;

    public IReadOnlyDictionary<SourceKey, Instant> LastMessages => intake.LastMessages;

    public IReadOnlyDictionary<SourceKey, DeviceClock> Clocks => intake.Clocks;

    public IntakeTotals Totals => counters.Totals();
}
