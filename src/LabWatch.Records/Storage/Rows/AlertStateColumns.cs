namespace LabWatch.Records.Storage.Rows;

/// <summary>What changes in the life of an alert: kept with the alert as it is now, and with each step as it was then.</summary>
internal abstract class AlertStateColumns
{
    public required string Site { get; set; }

    public required string Priority { get; set; }

    public required string State { get; set; }

    public required string Headline { get; set; }

    public required string Detail { get; set; }

    public double? Value { get; set; }

    public double? LimitValue { get; set; }

    public required string Unit { get; set; }

    public long? ReturnedAt { get; set; }

    public long? AcknowledgedAt { get; set; }

    public string? AcknowledgedBy { get; set; }

    public string? AcknowledgeNote { get; set; }
}
