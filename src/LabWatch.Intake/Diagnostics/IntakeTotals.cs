namespace LabWatch.Intake.Diagnostics;

/// <summary>Counts since the start of the service.</summary>
/// <param name="Received">Messages received, repeats included.</param>
/// <param name="Decoded">Readings decoded.</param>
/// <param name="Quarantined">Messages and conflicts put into quarantine.</param>
/// <param name="Committed">Readings newly stored.</param>
/// <param name="Acknowledged">Messages acknowledged to a broker or device.</param>
/// <param name="Spooled">Messages made durable in the spool instead of the store.</param>
/// <param name="Duplicates">Readings delivered again with the same value.</param>
/// <param name="Conflicts">Readings refused because another value stands for them.</param>
/// <param name="Refused">Messages refused for the sender to send again.</param>
/// <param name="Connections">Connections made to the external broker.</param>
public sealed record IntakeTotals(
    long Received,
    long Decoded,
    long Quarantined,
    long Committed,
    long Acknowledged,
    long Spooled,
    long Duplicates,
    long Conflicts,
    long Refused,
    long Connections);
