using LabWatch.Lab.Findings;
using LabWatch.Lab.Time;
using LabWatch.Records.Accounts;
using LabWatch.Records.Accounts.Passwords;
using LabWatch.Service.Api.Access;
using LabWatch.Service.Api.Accounts.Views;
using LabWatch.Service.Api.Requests;
using Microsoft.AspNetCore.Http.HttpResults;

namespace LabWatch.Service.Api.Accounts;

/// <summary>What everybody does for themselves: see who they are, change the password, end sessions.</summary>
internal static class MeEndpoints
{
    /// <summary>Maps the endpoints into the group of the API's version.</summary>
    public static void Map(RouteGroupBuilder api)
    {
        RouteGroupBuilder group = api.MapGroup("me").WithTags("Me").AllowSignedIn();
        group.MapGet(string.Empty, (HttpContext http) => TypedResults.Ok(AccountAnswers.Of(Caller.Of(http))))
            .WithName("GetMe")
            .WithSummary("Who is signed in, and what that person may do");
        group.MapPost("password", ChangePasswordAsync)
            .RequireRateLimiting(RateLimits.SignIn)
            .WithName("ChangePassword")
            .WithSummary("Change the own password; all other sessions end")
            .ProducesProblem(StatusCodes.Status400BadRequest)
            .ProducesProblem(StatusCodes.Status403Forbidden)
            .ProducesProblem(StatusCodes.Status429TooManyRequests);
        group.MapPost("confirm", ConfirmAsync)
            .RequireRateLimiting(RateLimits.SignIn)
            .WithName("ConfirmPassword")
            .WithSummary("Enter the password again, where a change asks for it")
            .ProducesProblem(StatusCodes.Status403Forbidden)
            .ProducesProblem(StatusCodes.Status429TooManyRequests);
        group.MapGet("sessions", ListAsync)
            .WithName("ListSessions")
            .WithSummary("The own sessions, newest first");
        group.MapDelete("sessions/{id}", EndAsync)
            .WithName("EndSession")
            .WithSummary("End one of the own sessions")
            .ProducesProblem(StatusCodes.Status404NotFound);
    }

    private static async Task<Results<NoContent, ProblemHttpResult>> ChangePasswordAsync(PasswordRequest request, HttpContext http, PeopleDesk desk)
    {
        Caller caller = Caller.Of(http);
        if (caller.Session is null)
        {
            return AccessRefusals.SessionNeeded();
        }

        IReadOnlyList<Finding> findings = PasswordPolicy.Check(request.New, "/new", [caller.Name, caller.DisplayName, desk.Site]);
        if (findings.Count > 0)
        {
            return Refusals.BadRequest(findings);
        }

        SignInResult checkedNow = await desk.CheckAsync(http, caller, request.Current);
        if (checkedNow.Kind is not SignInKind.Done)
        {
            return WrongPassword(http, checkedNow, "/current");
        }

        return await desk.ChangePasswordAsync(http, caller, request.New!) ? TypedResults.NoContent() : AccountAnswers.Busy(http);
    }

    private static async Task<Results<Ok<MeView>, ProblemHttpResult>> ConfirmAsync(ConfirmRequest request, HttpContext http, PeopleDesk desk)
    {
        Caller caller = Caller.Of(http);
        if (caller.Session is null)
        {
            return AccessRefusals.SessionNeeded();
        }

        SignInResult result = await desk.CheckAsync(http, caller, request.Password);
        return result.Kind is SignInKind.Done
            ? TypedResults.Ok(AccountAnswers.Of(await desk.ConfirmAsync(http, caller)))
            : WrongPassword(http, result, "/password");
    }

    // Not 401: the caller is signed in, and a page must not think otherwise.
    private static ProblemHttpResult WrongPassword(HttpContext http, SignInResult result, string where) => result.Kind is SignInKind.Wrong
        ? Refusals.BadRequest([new Finding("wrong-password", where, "The password is wrong.", null, "Try again.")])
        : AccountAnswers.Of(http, result);

    private static async Task<Ok<SessionListView>> ListAsync(HttpContext http, PeopleDesk desk, ISessionLedger sessions, CancellationToken cancellationToken)
    {
        Caller caller = Caller.Of(http);
        IReadOnlyList<Session> found = await sessions.ListAsync(desk.Site, caller.Name, cancellationToken);
        return TypedResults.Ok(new SessionListView([.. found.Select(session => AccountAnswers.Of(session, caller.Session))]));
    }

    private static async Task<Results<NoContent, ProblemHttpResult>> EndAsync(
        string id, HttpContext http, PeopleDesk desk, ISessionLedger sessions, SignedInCallers callers, TimeProvider labClock, CancellationToken cancellationToken)
    {
        Caller caller = Caller.Of(http);
        bool isEnded = Guid.TryParse(id, out Guid session) && await sessions.EndAsync(desk.Site, caller.Name, session, Instant.Now(labClock), cancellationToken);
        callers.Forget(caller.Name);
        return isEnded ? TypedResults.NoContent() : Refusals.NotFound("session", id, "GET /api/v1/me/sessions lists them.");
    }
}
