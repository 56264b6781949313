using System.Collections.Immutable;
using LabWatch.Lab.Time;
using LabWatch.Records.Accounts;

namespace LabWatch.Service.Api.Access;

/// <summary>Who makes a request.</summary>
/// <param name="Name">Name of the account: a slug, never reused. It is the actor in the audit trail.</param>
/// <param name="DisplayName">Name for people.</param>
/// <param name="Roles">The roles that count for this request.</param>
internal sealed record Caller(string Name, string DisplayName, ImmutableArray<Role> Roles)
{
    /// <summary>What the roles allow.</summary>
    public ImmutableHashSet<Permission> Permissions { get; } = Access.Permissions.Of(Roles);

    /// <summary>Id of the session; null where a token calls.</summary>
    public Guid? Session { get; init; }

    /// <summary>When the session or token ends.</summary>
    public Instant ExpiresAt { get; init; } = Instant.MaxValue;

    /// <summary>When the password was last entered in the session; null where a token calls.</summary>
    public Instant? ConfirmedAt { get; init; }

    /// <summary>Whether nothing but a change of the password is allowed.</summary>
    public bool MustChangePassword { get; init; }

    /// <summary>What the roles allow, but not before the password is entered again.</summary>
    public ImmutableHashSet<Permission> ToBeConfirmed { get; init; } = [];

    /// <summary>Whether something is allowed now.</summary>
    public bool May(Permission permission) => !MustChangePassword && Permissions.Contains(permission) && !ToBeConfirmed.Contains(permission);

    /// <summary>
    /// Who makes this request. Throws <see cref="InvalidOperationException"/> on an endpoint that is open to strangers; every other endpoint
    /// is reached by a caller only.
    /// </summary>
    public static Caller Of(HttpContext http) =>
        Find(http) ?? throw new InvalidOperationException("Nobody is signed in on this request; let the endpoint need a permission.");

    /// <summary>Who makes this request; null for a stranger.</summary>
    public static Caller? Find(HttpContext http) => http.Features.Get<Caller>();
}
