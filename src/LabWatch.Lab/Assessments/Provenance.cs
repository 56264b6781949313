namespace LabWatch.Lab.Assessments;

/// <summary>All that is needed to compute an assessment again.</summary>
/// <param name="ReadingsDigest">SHA-256 (hex) over the canonical form of the raw readings used.</param>
/// <param name="Hours">The source-hours read, with their revisions.</param>
/// <param name="Certificates">Certificates used, as <c>id@revision</c>.</param>
/// <param name="Limit">Limit used, as <c>id@revision</c>; null where there was none.</param>
/// <param name="ProgramVersion">Version of this program.</param>
public sealed record Provenance(
    string ReadingsDigest,
    IReadOnlyList<SourceHourRead> Hours,
    IReadOnlyList<string> Certificates,
    string? Limit,
    string ProgramVersion)
{
    /// <summary>Revision of the source's description that was judged, as <c>id@revision</c>; null on record from before sources had revisions.</summary>
    public string? Source { get; init; }
}
