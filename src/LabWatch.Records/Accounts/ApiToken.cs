using System.Collections.Immutable;
using LabWatch.Lab.Time;

namespace LabWatch.Records.Accounts;

/// <summary>A token with which a program calls the API for an account.</summary>
/// <param name="Id">UUIDv7.</param>
/// <param name="Account">Name of the account.</param>
/// <param name="Name">What it is for.</param>
/// <param name="Roles">Its roles; those that the account has lost since do not count.</param>
/// <param name="CreatedAt">When it was made.</param>
/// <param name="ExpiresAt">When it ends.</param>
/// <param name="LastUsedAt">When it was last used, to the minute; null for never.</param>
/// <param name="RevokedAt">When it was taken back; null where it was not.</param>
public sealed record ApiToken(
    Guid Id, string Account, string Name, ImmutableArray<Role> Roles, Instant CreatedAt, Instant ExpiresAt, Instant? LastUsedAt, Instant? RevokedAt);
