namespace LabWatch.Intake.Pipeline;

/// <summary>Times and sizes of the committer and of the drain of the spool.</summary>
internal sealed record CommitterOptions
{
    /// <summary>How long the store, or a write to the spool, may take before the next resort is used.</summary>
    public TimeSpan StoreDeadline { get; init; } = TimeSpan.FromSeconds(1);

    /// <summary>Most messages in one commit.</summary>
    public int BatchMessages { get; init; } = 5_000;

    /// <summary>Readings in one commit after which no further message is taken.</summary>
    public int BatchReadings { get; init; } = 100_000;

    /// <summary>First wait after a failure.</summary>
    public TimeSpan RetryFirst { get; init; } = TimeSpan.FromMilliseconds(200);

    /// <summary>Longest wait between two attempts.</summary>
    public TimeSpan RetryLongest { get; init; } = TimeSpan.FromSeconds(5);
}
