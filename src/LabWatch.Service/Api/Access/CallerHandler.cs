using System.Security.Claims;
using System.Text.Encodings.Web;
using LabWatch.Records;
using LabWatch.Service.Api.Requests;
using Microsoft.AspNetCore.Authentication;
using Microsoft.AspNetCore.Authorization;
using Microsoft.Extensions.Options;

namespace LabWatch.Service.Api.Access;

/// <summary>Joins <see cref="ICallers"/> to the framework's authentication, and answers strangers with problem details.</summary>
internal sealed class CallerHandler(
    ICallers callers, IOptionsMonitor<AuthenticationSchemeOptions> options, ILoggerFactory log, UrlEncoder encoder)
    : AuthenticationHandler<AuthenticationSchemeOptions>(options, log, encoder)
{
    /// <summary>Name of the scheme.</summary>
    public const string SchemeName = "LabWatch";

    /// <summary>Type of the claims that name permissions.</summary>
    public const string PermissionClaim = "permission";

    protected override async Task<AuthenticateResult> HandleAuthenticateAsync()
    {
        Caller? caller = await FindAsync();
        if (caller is null)
        {
            return AuthenticateResult.NoResult();
        }

        Context.Features.Set(caller);
        ClaimsIdentity identity = new(
            [
                new Claim(ClaimTypes.Name, caller.Name),
                .. caller.Permissions.Where(caller.May).Select(permission => new Claim(PermissionClaim, Names.Of(permission))),
            ],
            SchemeName);
        return AuthenticateResult.Success(new AuthenticationTicket(new ClaimsPrincipal(identity), SchemeName));
    }

    protected override Task HandleChallengeAsync(AuthenticationProperties properties)
    {
        Response.Headers.WWWAuthenticate = "Bearer";
        return Refusals.NotSignedIn().ExecuteAsync(Context);
    }

    protected override Task HandleForbiddenAsync(AuthenticationProperties properties)
    {
        Permission? needed = Context.GetEndpoint()?.Metadata.GetMetadata<PermissionNeeded>()?.Permission;
        return AccessRefusals.Of(Caller.Find(Context), needed).ExecuteAsync(Context);
    }

    // What strangers may see too, such as the health of the service, needs no records to say who asks.
    private async ValueTask<Caller?> FindAsync()
    {
        try
        {
            return await callers.FindAsync(Context);
        }
        catch (RecordsUnavailableException) when (Context.GetEndpoint()?.Metadata.GetMetadata<IAllowAnonymous>() is not null)
        {
            return null;
        }
    }
}
