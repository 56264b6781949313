namespace LabWatch.Records.Storage.Rows;

/// <summary>One revision of an assessment. Rows are only ever added.</summary>
internal sealed class AssessmentRow
{
    public required string Id { get; set; }

    /// <summary>Number in the order of recording, without gaps: what the alerts read by.</summary>
    public long Sequence { get; set; }

    public required string Site { get; set; }

    public required string Source { get; set; }

    public required string Criterion { get; set; }

    public required string Scope { get; set; }

    public long WindowStart { get; set; }

    public long WindowEnd { get; set; }

    public int Revision { get; set; }

    public double? Value { get; set; }

    public double? StandardUncertainty { get; set; }

    public double? DegreesOfFreedom { get; set; }

    public required string Unit { get; set; }

    public double? LimitValue { get; set; }

    public double? CoverageFactor { get; set; }

    public required string Decision { get; set; }

    public double? ConformityProbability { get; set; }

    public required string Figures { get; set; }

    public required string Explanation { get; set; }

    public required string Provenance { get; set; }

    public long ComputedAt { get; set; }

    public string? SupersedeReason { get; set; }
}
