using System.Security.Claims;
using System.Text.Encodings.Web;
using LabWatch.Service.Api.Requests;
using Microsoft.AspNetCore.Authentication;
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
        Caller? caller = await callers.FindAsync(Context);
        if (caller is null)
        {
            return AuthenticateResult.NoResult();
        }

        Context.Features.Set(caller);
        ClaimsIdentity identity = new(
            [new Claim(ClaimTypes.Name, caller.Name), .. caller.Permissions.Select(permission => new Claim(PermissionClaim, Names.Of(permission)))],
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
        string? needed = Context.GetEndpoint()?.Metadata.GetMetadata<PermissionNeeded>() is { } metadata ? Names.Of(metadata.Permission) : null;
        return Refusals.Forbidden(
            "not-permitted", "The roles of this account do not allow this.", needed, "Ask somebody whose role does, or an administrator for the role.").ExecuteAsync(Context);
    }
}
