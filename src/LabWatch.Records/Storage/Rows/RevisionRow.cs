namespace LabWatch.Records.Storage.Rows;

/// <summary>One revision of one record of what is configured about a site. Rows are only ever added.</summary>
internal sealed class RevisionRow
{
    public required string Site { get; set; }

    public required string Kind { get; set; }

    public required string Id { get; set; }

    public int Revision { get; set; }

    /// <summary>Number in the order of recording at the site, without gaps.</summary>
    public long Sequence { get; set; }

    public long EffectiveFrom { get; set; }

    public required string Author { get; set; }

    public required string Reason { get; set; }

    public long RecordedAt { get; set; }

    /// <summary>Canonical JSON; null for a withdrawal.</summary>
    public string? Content { get; set; }

    /// <summary>SHA-256 of the content; of nothing for a withdrawal.</summary>
    public required string Digest { get; set; }

    /// <summary>Number of the import that brought it; null for an edit.</summary>
    public int? Import { get; set; }
}
