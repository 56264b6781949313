using LabWatch.Service.Api.Requests;
using Microsoft.AspNetCore.Http.HttpResults;

namespace LabWatch.Service.Api.Access;

/// <summary>Why somebody who is signed in may not do something now.</summary>
internal static class AccessRefusals
{
    /// <summary>The answer to a caller who lacks a permission, or may not use it now.</summary>
    public static ProblemHttpResult Of(Caller? caller, Permission? needed) => caller switch
    {
        { MustChangePassword: true } => ChangePassword(),
        not null when needed is { } permission && caller.Permissions.Contains(permission) => Confirm(),
        _ => Refusals.Forbidden(
            "not-permitted", "The roles of this account do not allow this.", needed is { } lacking ? Names.Of(lacking) : null,
            "Ask somebody whose role does, or an administrator for the role."),
    };

    /// <summary>The password has to be changed first.</summary>
    public static ProblemHttpResult ChangePassword() => Refusals.Forbidden(
        "password-change-needed", "The password has to be changed first.", null, "Choose a password of your own: POST /api/v1/me/password.");

    /// <summary>The password has to be entered again first.</summary>
    public static ProblemHttpResult Confirm() => Refusals.Forbidden(
        "confirm-password", "The password was entered too long ago for this.", null, "Enter it again (POST /api/v1/me/confirm), or sign in again.");

    /// <summary>A token cannot do this.</summary>
    public static ProblemHttpResult SessionNeeded() => Refusals.Forbidden(
        "session-needed", "A token cannot do this; a person can.", null, "Sign in on the pages.");
}
