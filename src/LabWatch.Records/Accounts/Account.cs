using System.Collections.Immutable;
using LabWatch.Lab.Time;

namespace LabWatch.Records.Accounts;

/// <summary>An account of a person, as its newest revision has it.</summary>
/// <param name="Name">Slug, never given again. It is the actor in the audit trail.</param>
/// <param name="Revision">1 when created, one more with each change.</param>
/// <param name="DisplayName">Name for people.</param>
/// <param name="Roles">What the person is in the laboratory.</param>
/// <param name="IsDisabled">Whether the account is closed.</param>
/// <param name="MustChangePassword">Whether nothing but a change of the password is allowed.</param>
/// <param name="Password">Hash of the password; null where nobody can sign in by password.</param>
/// <param name="CreatedAt">When it was created.</param>
/// <param name="LastSignInAt">When somebody last signed in; null for never.</param>
/// <param name="Failures">Refused sign-ins since the last one that succeeded.</param>
public sealed record Account(
    string Name,
    int Revision,
    string DisplayName,
    ImmutableArray<Role> Roles,
    bool IsDisabled,
    bool MustChangePassword,
    PasswordHash? Password,
    Instant CreatedAt,
    Instant? LastSignInAt,
    int Failures);
