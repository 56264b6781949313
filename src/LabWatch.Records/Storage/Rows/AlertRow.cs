namespace LabWatch.Records.Storage.Rows;

/// <summary>An alert as it is now. Derived from its transitions, which are never changed.</summary>
internal sealed class AlertRow : AlertStateColumns
{
    public required Guid Id { get; set; }

    /// <summary>Number in the order of recording: makes paging total.</summary>
    public long Number { get; set; }

    public required string Source { get; set; }

    public required string Code { get; set; }

    public required string Subject { get; set; }

    public long RaisedAt { get; set; }

    /// <summary>Sequence of the last transition that was applied.</summary>
    public int Transition { get; set; }
}
