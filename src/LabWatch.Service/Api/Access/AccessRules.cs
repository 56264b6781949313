using Microsoft.AspNetCore.Authorization;

namespace LabWatch.Service.Api.Access;

/// <summary>States on an endpoint who may call it. An endpoint without a statement needs somebody who is signed in.</summary>
internal static class AccessRules
{
    /// <summary>Only callers with a permission.</summary>
    public static TBuilder Allow<TBuilder>(this TBuilder endpoint, Permission permission)
        where TBuilder : IEndpointConventionBuilder =>
        endpoint.WithMetadata(new PermissionNeeded(permission)).RequireAuthorization(new AuthorizeAttribute(PolicyOf(permission)));

    /// <summary>Everybody who is signed in, with whatever role, also while the password has to be changed.</summary>
    public static TBuilder AllowSignedIn<TBuilder>(this TBuilder endpoint)
        where TBuilder : IEndpointConventionBuilder => endpoint.RequireAuthorization();

    /// <summary>Everybody, strangers too.</summary>
    public static TBuilder AllowStrangers<TBuilder>(this TBuilder endpoint)
        where TBuilder : IEndpointConventionBuilder => endpoint.WithMetadata(new AllowAnonymousAttribute());

    /// <summary>Name of the policy that demands a permission.</summary>
    public static string PolicyOf(Permission permission) => "permission:" + Names.Of(permission);
}
