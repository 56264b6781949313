namespace LabWatch.Readings.Quarantine;

/// <summary>A refused message as the table has it.</summary>
internal sealed record QuarantineRow(long Arrival, string Topic, byte[] Payload, string Findings, byte[] Fingerprint)
{
    /// <summary>What the row costs of the byte limit.</summary>
    public long Bytes => Payload.Length + Topic.Length + Findings.Length;
}
