using LabWatch.Lab.Findings;
using LabWatch.Lab.Time;

namespace LabWatch.Readings.Quarantine;

/// <summary>Something that came in and could not become a reading, kept with the reasons so that nothing is lost silently.</summary>
/// <param name="Arrival">When it arrived.</param>
/// <param name="Topic">MQTT topic, or what else says where it came from.</param>
/// <param name="Payload">The bytes as received, cut to the store's limit.</param>
/// <param name="Findings">Why it was refused; at least one.</param>
public sealed record QuarantinedMessage(Instant Arrival, string Topic, ReadOnlyMemory<byte> Payload, IReadOnlyList<Finding> Findings);
