namespace LabWatch.Records.Storage.Rows;

/// <summary>How far a reader of a sequence has come.</summary>
internal sealed class PositionRow
{
    /// <summary>Site that the reader looks at; empty where it looks at all of them.</summary>
    public required string Site { get; set; }

    public required string Reader { get; set; }

    public long Position { get; set; }
}
