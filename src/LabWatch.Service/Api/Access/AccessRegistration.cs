using LabWatch.Records.Accounts.Passwords;
using LabWatch.Service.Api.Accounts;
using Microsoft.AspNetCore.Authentication;
using Microsoft.AspNetCore.Authorization;
using Microsoft.Extensions.DependencyInjection.Extensions;

namespace LabWatch.Service.Api.Access;

/// <summary>Registers who may call what, and how people sign in.</summary>
internal static class AccessRegistration
{
    /// <summary>Adds authentication by <see cref="ICallers"/>, a policy for each permission, and the desk where people sign in.</summary>
    public static void Add(IServiceCollection services)
    {
        AddSignIn(services);
        services.AddAuthentication(CallerHandler.SchemeName).AddScheme<AuthenticationSchemeOptions, CallerHandler>(CallerHandler.SchemeName, null);
        AuthorizationPolicy signedIn = new AuthorizationPolicyBuilder(CallerHandler.SchemeName).RequireAuthenticatedUser().Build();
        AuthorizationBuilder policies = services.AddAuthorizationBuilder().SetDefaultPolicy(signedIn).SetFallbackPolicy(signedIn);
        foreach (Permission permission in Enum.GetValues<Permission>())
        {
            policies.AddPolicy(
                AccessRules.PolicyOf(permission),
                policy => policy.AddAuthenticationSchemes(CallerHandler.SchemeName).RequireAuthenticatedUser().RequireClaim(CallerHandler.PermissionClaim, Names.Of(permission)));
        }
    }

    private static void AddSignIn(IServiceCollection services)
    {
        services.TryAddSingleton(new SessionClock(TimeProvider.System));
        services.TryAddSingleton(new AccessOptions());
        services.TryAddSingleton(PasswordCost.Standard);
        services.TryAddSingleton<PasswordHasher>();
        services.TryAddSingleton<LastUses>();
        services.AddHostedService(provider => provider.GetRequiredService<LastUses>());
        services.TryAddSingleton<SignedInCallers>();
        services.TryAddSingleton<ICallers>(provider => provider.GetRequiredService<SignedInCallers>());
        services.TryAddSingleton<SignInThrottle>();
        services.TryAddSingleton<RefusalKeeper>();
        services.AddHostedService(provider => provider.GetRequiredService<RefusalKeeper>());
        services.TryAddSingleton<DemoCredentials>();
        services.TryAddSingleton<SetUpDesk>();
        services.AddHostedService(provider => provider.GetRequiredService<SetUpDesk>());
        services.TryAddSingleton<PeopleDesk>();
    }
}
