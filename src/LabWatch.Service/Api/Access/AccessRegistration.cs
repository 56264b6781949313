using Microsoft.AspNetCore.Authentication;
using Microsoft.AspNetCore.Authorization;
using Microsoft.Extensions.DependencyInjection.Extensions;

namespace LabWatch.Service.Api.Access;

/// <summary>Registers who may call what.</summary>
internal static class AccessRegistration
{
    /// <summary>Adds authentication by <see cref="ICallers"/> and a policy for each permission.</summary>
    public static void Add(IServiceCollection services)
    {
        services.TryAddSingleton<ICallers, OpenHouse>();
        services.AddAuthentication(CallerHandler.SchemeName).AddScheme<AuthenticationSchemeOptions, CallerHandler>(CallerHandler.SchemeName, null);
        AuthorizationBuilder policies = services.AddAuthorizationBuilder()
            .SetFallbackPolicy(new AuthorizationPolicyBuilder(CallerHandler.SchemeName).RequireAuthenticatedUser().Build());
        foreach (Permission permission in Enum.GetValues<Permission>())
        {
            policies.AddPolicy(
                AccessRules.PolicyOf(permission),
                policy => policy.AddAuthenticationSchemes(CallerHandler.SchemeName).RequireAuthenticatedUser().RequireClaim(CallerHandler.PermissionClaim, Names.Of(permission)));
        }
    }
}
