using LabWatch.Records.Accounts;
using LabWatch.Service.Api.Access;
using LabWatch.Service.Api.Accounts.Views;
using LabWatch.Service.Api.Requests;
using Microsoft.AspNetCore.Http.HttpResults;

namespace LabWatch.Service.Api.Accounts;

/// <summary>Accounts, sessions and tokens as the API shows them, and its refusals about them.</summary>
internal static class AccountAnswers
{
    public static MeView Of(Caller caller) => new(
        caller.Name,
        caller.DisplayName,
        [.. caller.Roles.Select(RoleWords.Of)],
        [.. caller.Permissions.Order().Select(permission => Names.Of(permission))],
        caller.MustChangePassword,
        caller.ExpiresAt,
        caller.Session is not null,
        caller.ConfirmedAt);

    public static AccountView Of(Account account) => new(
        account.Name,
        account.DisplayName,
        [.. account.Roles.Select(RoleWords.Of)],
        account.IsDisabled,
        account.CreatedAt,
        account.LastSignInAt,
        account.MustChangePassword);

    public static SessionView Of(Session session, Guid? current) => new(
        session.Id, session.StartedAt, session.LastUsedAt, session.ExpiresAt, session.Address, session.Agent, session.Id == current);

    public static TokenView Of(ApiToken token) => new(
        token.Id, token.Account, token.Name, [.. token.Roles.Select(RoleWords.Of)], token.CreatedAt, token.ExpiresAt, token.LastUsedAt, token.RevokedAt);

    /// <summary>The answer to a sign-in that was refused.</summary>
    public static ProblemHttpResult Of(HttpContext http, SignInResult refused)
    {
        switch (refused.Kind)
        {
            case SignInKind.TooMany:
                Refusals.RetryAfter(http, refused.Wait);
                return Refusals.TooMany(
                    "too-many-attempts", "There were too many attempts to sign in with this name.",
                    "Wait as long as Retry-After says. After a hundred in a row an administrator has to reset the password (for the administrator: labwatch account reset).");
            case SignInKind.Busy:
                return Busy(http);
            default:
                return Refusals.Unauthorized("wrong-credentials", "Name or password is wrong.", "Try again; whoever has forgotten the password asks an administrator for a new one.");
        }
    }

    /// <summary>Too many passwords are being checked.</summary>
    public static ProblemHttpResult Busy(HttpContext http)
    {
        Refusals.RetryAfter(http, TimeSpan.FromSeconds(2));
        return Refusals.Unavailable("busy", "Too many sign-ins are being checked.", "Try again in some seconds.");
    }
}
