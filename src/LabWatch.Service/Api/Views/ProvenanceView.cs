using System.ComponentModel;

namespace LabWatch.Service.Api.Views;

/// <summary>All that is needed to compute an assessment again.</summary>
internal sealed record ProvenanceView(
    [property: Description("SHA-256 over the canonical form of the raw readings used, hexadecimal.")] string ReadingsDigest,
    [property: Description("The source-hours read.")] IReadOnlyList<HourReadView> Hours,
    [property: Description("Certificates used, as id@revision.")] IReadOnlyList<string> Certificates,
    [property: Description("Limit used, as id@revision; null where there was none.")] string? Limit,
    [property: Description("Version of the program that computed it.")] string ProgramVersion,
    [property: Description("Revision of the source's description that was judged, as id@revision; null on record from before sources had revisions.")] string? Source);
