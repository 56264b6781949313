namespace LabWatch.Records.Storage.Rows;

/// <summary>One revision of an account; the highest counts. Rows are only ever added, and a name is never given again.</summary>
internal sealed class AccountRow
{
    public required string Site { get; set; }

    public required string Name { get; set; }

    public int Revision { get; set; }

    public required string DisplayName { get; set; }

    /// <summary>Words of the roles, in order, separated by spaces.</summary>
    public required string Roles { get; set; }

    public bool Disabled { get; set; }

    public bool MustChangePassword { get; set; }

    /// <summary>Salted, slow hash with its parameters; null where nobody can sign in by password.</summary>
    public string? Password { get; set; }

    public long At { get; set; }

    public required string By { get; set; }
}
