namespace LabWatch.Intake.Outgoing;

/// <summary>The newest message of a topic.</summary>
/// <param name="Topic">The topic in full.</param>
/// <param name="Payload">The message.</param>
/// <param name="Version">Rises with each change of any topic.</param>
internal sealed record StateMessage(string Topic, byte[] Payload, long Version);
