using LabWatch.Lab.Identity;
using LabWatch.Lab.Time;

namespace LabWatch.Intake.Diagnostics;

/// <summary>How the intake stands, for the health page. Reading it never waits.</summary>
public interface IIntakeState
{
    /// <summary>The link to the external broker.</summary>
    BrokerLinkState Link { get; }

    /// <summary>Whether the broker had kept the session when the link was made.</summary>
    bool SessionPresent { get; }

    /// <summary>What the last attempt to connect, or the broker, said; null where there is nothing to say.</summary>
    string? LinkNote { get; }

    /// <summary>Port on which the embedded broker listens; null where it does not run.</summary>
    int? EmbeddedPort { get; }

    /// <summary>Whether nothing can be made durable now, neither in the store nor in the spool.</summary>
    bool CommitsStopped { get; }

    /// <summary>Messages between decoding and committing.</summary>
    int QueueLength { get; }

    /// <summary>Messages in the spool that wait for the store.</summary>
    long SpoolLength { get; }

    /// <summary>Bytes of the spool on disk.</summary>
    long SpoolBytes { get; }

    /// <summary>Arrival of the newest good message of each source that has sent one since the start.</summary>
    IReadOnlyDictionary<SourceKey, Instant> LastMessages { get; }

    /// <summary>What is known about the clock of the device of each source that states times.</summary>
    IReadOnlyDictionary<SourceKey, DeviceClock> Clocks { get; }

    /// <summary>Counts since the start.</summary>
    IntakeTotals Totals { get; }
}
