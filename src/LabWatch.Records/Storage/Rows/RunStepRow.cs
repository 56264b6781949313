namespace LabWatch.Records.Storage.Rows;

/// <summary>One step in the life of a calibration run. Rows are only ever added.</summary>
internal sealed class RunStepRow
{
    public required Guid RunId { get; set; }

    public int Number { get; set; }

    public required string Site { get; set; }

    public long At { get; set; }

    public required string By { get; set; }

    public required string What { get; set; }

    public string? Reason { get; set; }

    /// <summary>Canonical JSON of the run as it stood after the step.</summary>
    public required string Content { get; set; }

    /// <summary>What the client named the request by, so that sending it again adds nothing; null where it named none.</summary>
    public string? RequestKey { get; set; }
}
