using System.Collections.Immutable;
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

    /// <summary>Whether the roles allow something.</summary>
    public bool May(Permission permission) => Permissions.Contains(permission);

    /// <summary>
    /// Who makes this request. Throws <see cref="InvalidOperationException"/> on an endpoint that is open to strangers; every other endpoint
    /// is reached by a caller only.
    /// </summary>
    public static Caller Of(HttpContext http) =>
        Find(http) ?? throw new InvalidOperationException("Nobody is signed in on this request; let the endpoint need a permission.");

    /// <summary>Who makes this request; null for a stranger.</summary>
    public static Caller? Find(HttpContext http) => http.Features.Get<Caller>();
}
