namespace LabWatch.Readings.Summaries;

/// <summary>The summary kept beside a sealed part: rows a minute, or one row an hour where readings are so sparse that minutes would be longer than they.</summary>
/// <param name="StepMicroseconds">Length of a row.</param>
/// <param name="Channels">Channels in the order of the block.</param>
internal sealed record SealedSummary(long StepMicroseconds, IReadOnlyList<ChannelSummary> Channels);
