namespace LabWatch.Records.Storage.Rows;

/// <summary>One step in the life of an alert. Rows are only ever added.</summary>
internal sealed class AlertTransitionRow : AlertStateColumns
{
    public required Guid AlertId { get; set; }

    public int Sequence { get; set; }

    public long At { get; set; }

    public required string Event { get; set; }

    public required string By { get; set; }

    public string? Note { get; set; }
}
