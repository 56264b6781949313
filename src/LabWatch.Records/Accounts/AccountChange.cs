using System.Collections.Immutable;

namespace LabWatch.Records.Accounts;

/// <summary>What to change in an account; null leaves a member as it is.</summary>
public sealed record AccountChange
{
    /// <summary>Name for people.</summary>
    public string? DisplayName { get; init; }

    /// <summary>All roles that the account shall have.</summary>
    public ImmutableArray<Role>? Roles { get; init; }

    /// <summary>Whether the account is closed.</summary>
    public bool? IsDisabled { get; init; }

    /// <summary>Hash of a new password.</summary>
    public PasswordHash? Password { get; init; }

    /// <summary>Whether the password has to be changed first. Counts together with <see cref="Password"/> only.</summary>
    public bool MustChangePassword { get; init; }

    /// <summary>Whether <see cref="Password"/> is the same password, stored with stronger parameters. Sessions then go on.</summary>
    public bool IsSamePassword { get; init; }
}
