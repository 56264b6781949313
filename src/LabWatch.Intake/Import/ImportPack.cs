using LabWatch.Lab.Readings;

namespace LabWatch.Intake.Import;

/// <summary>The good readings of one source out of some rows.</summary>
/// <param name="Topic">Topic by which they would come in.</param>
/// <param name="Payload">The SenML pack by which they would come in.</param>
/// <param name="Pack">The readings.</param>
internal sealed record ImportPack(string Topic, byte[] Payload, ReadingPack Pack);
