namespace LabWatch.Records.Storage.Rows;

/// <summary>A token of a program. Kept after it ended, as it may stand in the trail.</summary>
internal sealed class TokenRow
{
    public required Guid Id { get; set; }

    public required string Site { get; set; }

    public required string Account { get; set; }

    public required string Name { get; set; }

    /// <summary>SHA-256 of the token, small hexadecimal digits. The token itself is nowhere.</summary>
    public required string Digest { get; set; }

    /// <summary>Words of the roles, in order, separated by spaces.</summary>
    public required string Roles { get; set; }

    public long CreatedAt { get; set; }

    public long ExpiresAt { get; set; }

    public long? LastUsedAt { get; set; }

    public long? RevokedAt { get; set; }

    public string? RevokedBy { get; set; }
}
