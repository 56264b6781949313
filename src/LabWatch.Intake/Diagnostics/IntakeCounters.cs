using System.Diagnostics.Metrics;

namespace LabWatch.Intake.Diagnostics;

/// <summary>Counts since the start, as metrics (meter <c>LabWatch.Intake</c>) and for the health page.</summary>
internal sealed class IntakeCounters : IDisposable
{
    /// <summary>Name of the meter.</summary>
    public const string MeterName = "LabWatch.Intake";

    private readonly Meter _meter = new(MeterName);
    private readonly CountedTotal _received;
    private readonly CountedTotal _decoded;
    private readonly CountedTotal _quarantined;
    private readonly CountedTotal _committed;
    private readonly CountedTotal _acknowledged;
    private readonly CountedTotal _spooled;
    private readonly CountedTotal _duplicates;
    private readonly CountedTotal _conflicts;
    private readonly CountedTotal _refused;
    private readonly CountedTotal _connections;
    private readonly CountedTotal _turnedAway;

    public IntakeCounters()
    {
        _received = new(_meter, "labwatch.intake.received", "{message}", "Messages received.");
        _decoded = new(_meter, "labwatch.intake.decoded", "{reading}", "Readings decoded.");
        _quarantined = new(_meter, "labwatch.intake.quarantined", "{message}", "Messages and conflicts put into quarantine.");
        _committed = new(_meter, "labwatch.intake.committed", "{reading}", "Readings newly stored.");
        _acknowledged = new(_meter, "labwatch.intake.acknowledged", "{message}", "Messages acknowledged to a broker or device.");
        _spooled = new(_meter, "labwatch.intake.spooled", "{message}", "Messages made durable in the spool.");
        _duplicates = new(_meter, "labwatch.intake.duplicates", "{reading}", "Readings delivered again with the same value.");
        _conflicts = new(_meter, "labwatch.intake.conflicts", "{reading}", "Readings refused because another value stands.");
        _refused = new(_meter, "labwatch.intake.refused", "{message}", "Messages refused for the sender to send again.");
        _turnedAway = new(_meter, "labwatch.intake.turned-away", "{connection}", "Connections of devices that the embedded broker refused.");
        _connections = new(_meter, "labwatch.intake.connections", "{connection}", "Connections made to the external broker.");
    }

    public void Received() => _received.Add(1);

    public void Decoded(int readings) => _decoded.Add(readings);

    public void Quarantined(int messages) => _quarantined.Add(messages);

    public void Committed(int accepted, int duplicates, int conflicts)
    {
        _committed.Add(accepted);
        _duplicates.Add(duplicates);
        _conflicts.Add(conflicts);
    }

    public void Acknowledged(int messages) => _acknowledged.Add(messages);

    public void Spooled(int messages) => _spooled.Add(messages);

    public void Refused() => _refused.Add(1);

    public void TurnedAway() => _turnedAway.Add(1);

    public void Connected() => _connections.Add(1);

    public IntakeTotals Totals() => new(
        _received.Total, _decoded.Total, _quarantined.Total, _committed.Total, _acknowledged.Total, _spooled.Total, _duplicates.Total,
        _conflicts.Total, _refused.Total, _connections.Total);

    /// <inheritdoc/>
    public void Dispose() => _meter.Dispose();
}
