namespace LabWatch.Records.Storage.Rows;

/// <summary>One entry of a site's audit trail. Rows are only ever added.</summary>
internal sealed class AuditEntryRow
{
    public required string Site { get; set; }

    /// <summary>1 for the first entry of the site, one more for each later one, without gaps.</summary>
    public long Sequence { get; set; }

    public long At { get; set; }

    public required string Actor { get; set; }

    public required string Action { get; set; }

    public required string Subject { get; set; }

    /// <summary>A JSON object in canonical form.</summary>
    public required string Content { get; set; }

    /// <summary>SHA-256 of the canonical form of the covered record; null where the entry covers none.</summary>
    public byte[]? RecordDigest { get; set; }

    /// <summary>Digest of the entry before; 32 zeros in the first.</summary>
    public required byte[] Previous { get; set; }

    /// <summary>SHA-256 of the canonical form of this entry.</summary>
    public required byte[] Digest { get; set; }
}
