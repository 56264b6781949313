namespace LabWatch.Records.Storage.Rows;

/// <summary>How far a source has been assessed by a criterion.</summary>
internal sealed class WatermarkRow
{
    public required string Site { get; set; }

    public required string Source { get; set; }

    public required string Criterion { get; set; }

    public long WindowEnd { get; set; }
}
