namespace LabWatch.Intake.Payloads;

/// <summary>Where a topic leads.</summary>
/// <param name="Source">The source.</param>
/// <param name="Channel">The one channel of a channel's topic; null on a source's topic.</param>
internal sealed record TopicRoute(SourceChannels Source, ChannelEntry? Channel);
