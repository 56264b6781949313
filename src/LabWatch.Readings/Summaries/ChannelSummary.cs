namespace LabWatch.Readings.Summaries;

/// <summary>The summary rows of one channel in one sealed part, in rising order.</summary>
internal sealed record ChannelSummary(string Channel, IReadOnlyList<ReadingSummary> Rows);
