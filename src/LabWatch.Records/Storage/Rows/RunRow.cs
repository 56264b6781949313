namespace LabWatch.Records.Storage.Rows;

/// <summary>A calibration run as it is now. Derived from its steps, which are never changed.</summary>
internal sealed class RunRow
{
    public required Guid Id { get; set; }

    public required string Site { get; set; }

    public required string Source { get; set; }

    /// <summary>Number in the order of recording: makes paging total.</summary>
    public long Number { get; set; }

    public required string JobNumber { get; set; }

    public required string Item { get; set; }

    public double SetPointCelsius { get; set; }

    public string? Band { get; set; }

    public string? Note { get; set; }

    public long StartedAt { get; set; }

    public required string StartedBy { get; set; }

    public long? EndedAt { get; set; }

    public string? EndedBy { get; set; }

    public string? OverrideReason { get; set; }

    public required string ReadinessAtStart { get; set; }

    public long? CancelledAt { get; set; }

    /// <summary>Number of the last step that was applied.</summary>
    public int Step { get; set; }
}
