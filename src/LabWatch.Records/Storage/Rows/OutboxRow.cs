namespace LabWatch.Records.Storage.Rows;

/// <summary>A message on its way to one notifier.</summary>
internal sealed class OutboxRow
{
    public required string Id { get; set; }

    public required string Site { get; set; }

    public required Guid AlertId { get; set; }

    public required string Notifier { get; set; }

    public required string Body { get; set; }

    public long QueuedAt { get; set; }

    public long DueAt { get; set; }

    public int Attempts { get; set; }

    public long? SentAt { get; set; }

    public long? GivenUpAt { get; set; }

    public string? LastError { get; set; }
}
