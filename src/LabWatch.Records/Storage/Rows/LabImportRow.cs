namespace LabWatch.Records.Storage.Rows;

/// <summary>A lab file as imported. Rows are only ever added.</summary>
internal sealed class LabImportRow
{
    public required string Site { get; set; }

    public int Sequence { get; set; }

    public required string Digest { get; set; }

    public required string Document { get; set; }

    public long At { get; set; }

    public required string By { get; set; }

    /// <summary>Why; null on record from before a reason was kept.</summary>
    public string? Reason { get; set; }
}
