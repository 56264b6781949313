namespace LabWatch.Benchmarks.Intake;

/// <summary>What the publishing process reports.</summary>
/// <param name="Seconds">From the first message to the last acknowledgement.</param>
/// <param name="MedianMilliseconds">Median time from publish to acknowledgement.</param>
/// <param name="P99Milliseconds">99th percentile of it.</param>
internal sealed record PublisherReport(double Seconds, double MedianMilliseconds, double P99Milliseconds);
