namespace LabWatch.Records.Storage.Rows;

/// <summary>Where the newest window's highest revision of a (source, criterion, scope) is. Derived from the assessments.</summary>
internal sealed class AssessmentHeadRow
{
    public required string Site { get; set; }

    public required string Source { get; set; }

    public required string Criterion { get; set; }

    public required string Scope { get; set; }

    public long WindowEnd { get; set; }

    public int Revision { get; set; }

    public required string AssessmentId { get; set; }
}
