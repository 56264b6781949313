namespace LabWatch.Records.Storage.Rows;

/// <summary>A session of a person at a browser. Deleted when it ends.</summary>
internal sealed class SessionRow
{
    public required Guid Id { get; set; }

    public required string Site { get; set; }

    public required string Account { get; set; }

    /// <summary>SHA-256 of the secret in the cookie, small hexadecimal digits. The secret itself is nowhere.</summary>
    public required string Digest { get; set; }

    public long StartedAt { get; set; }

    /// <summary>When the password was last entered in it.</summary>
    public long ConfirmedAt { get; set; }

    public long LastUsedAt { get; set; }

    public long ExpiresAt { get; set; }

    /// <summary>Address it was started from.</summary>
    public required string Address { get; set; }

    /// <summary>What the browser calls itself, shortened.</summary>
    public required string Agent { get; set; }
}
