using LabWatch.Lab.Findings;
using LabWatch.Records.Accounts;
using LabWatch.Records.Accounts.Passwords;
using LabWatch.Service.Api.Access;
using LabWatch.Service.Api.Accounts.Views;
using LabWatch.Service.Api.Live;
using LabWatch.Service.Api.Requests;
using Microsoft.AspNetCore.Http.HttpResults;

namespace LabWatch.Service.Api.Accounts;

/// <summary>The door: sign-in, sign-out, and the set-up of the first administrator.</summary>
internal static class SignInEndpoints
{
    /// <summary>Maps the endpoints into the group of the API's version.</summary>
    public static void Map(RouteGroupBuilder api)
    {
        RouteGroupBuilder group = api.MapGroup(string.Empty).WithTags("Sign-in");
        group.MapGet("sign-in", LookAsync)
            .AllowStrangers()
            .WithName("GetDoor")
            .WithSummary("What the page of the sign-in shows");
        group.MapPost("sign-in", SignInAsync)
            .AllowStrangers()
            .RequireRateLimiting(RateLimits.SignIn)
            .WithName("SignIn")
            .WithSummary("Sign in: the answer carries the cookie of a session")
            .ProducesProblem(StatusCodes.Status401Unauthorized)
            .ProducesProblem(StatusCodes.Status429TooManyRequests)
            .ProducesProblem(StatusCodes.Status503ServiceUnavailable);
        group.MapPost("sign-out", SignOutAsync)
            .AllowSignedIn()
            .WithName("SignOut")
            .WithSummary("End this session");
        group.MapPost("set-up", SetUpAsync)
            .AllowStrangers()
            .RequireRateLimiting(RateLimits.SetUp)
            .WithName("SetUp")
            .WithSummary("Make the first administrator, with the code that the service printed")
            .ProducesProblem(StatusCodes.Status400BadRequest)
            .ProducesProblem(StatusCodes.Status403Forbidden)
            .ProducesProblem(StatusCodes.Status409Conflict)
            .ProducesProblem(StatusCodes.Status429TooManyRequests);
    }

    private static async Task<Ok<DoorView>> LookAsync(SiteBoard board, SetUpDesk setUp, DemoCredentials demo, CancellationToken cancellationToken) =>
        TypedResults.Ok(new DoorView(board.Lab.Site.Name, SiteBoard.Version, demo.Codes.Count > 0, await setUp.IsNeededAsync(cancellationToken), SiteBoard.Caution));

    private static async Task<Results<Ok<MeView>, ProblemHttpResult>> SignInAsync(SignInRequest request, HttpContext http, PeopleDesk desk)
    {
        SignInResult result = await desk.SignInAsync(http, request.Name, request.Password);
        return result.Kind is SignInKind.Done ? TypedResults.Ok(AccountAnswers.Of(Caller.Of(http))) : AccountAnswers.Of(http, result);
    }

    private static async Task<NoContent> SignOutAsync(
        HttpContext http, PeopleDesk desk, ISessionLedger sessions, SignedInCallers callers, TimeProvider labClock, CancellationToken cancellationToken)
    {
        Caller caller = Caller.Of(http);
        if (caller.Session is { } session)
        {
            await sessions.EndAsync(desk.Site, caller.Name, session, Lab.Time.Instant.Now(labClock), cancellationToken);
            callers.Forget(caller.Name);
            SessionCookie.Remove(http);
        }

        return TypedResults.NoContent();
    }

    private static async Task<Results<Ok<MeView>, ProblemHttpResult>> SetUpAsync(
        SetUpRequest request, HttpContext http, SetUpDesk setUp, PeopleDesk desk, IAccountLedger accounts, CancellationToken cancellationToken)
    {
        if (!await setUp.IsNeededAsync(cancellationToken))
        {
            return Done();
        }

        if (!setUp.IsCode(request.Code))
        {
            return Refusals.Forbidden("wrong-code", "This is not the code.", null, "The service printed it at its start; it is also in the file set-up-code of the data directory.");
        }

        string name = (request.Name ?? string.Empty).Trim();
        string displayName = (request.DisplayName ?? string.Empty).Trim();
        Finding[] findings =
        [
            .. AccountChecks.Name(name),
            .. AccountChecks.DisplayName(displayName),
            .. PasswordPolicy.Check(request.Password, "/password", [name, displayName, desk.Site]),
        ];
        if (findings.Length > 0)
        {
            return Refusals.BadRequest(findings);
        }

        AccountOutcome? outcome = await setUp.FinishAsync(name, displayName, request.Password!, cancellationToken);
        if (outcome is not AccountOutcome.Done)
        {
            return outcome is null ? AccountAnswers.Busy(http) : Done();
        }

        Account account = (await accounts.FindAsync(desk.Site, name, CancellationToken.None))!;
        return TypedResults.Ok(AccountAnswers.Of(await desk.StartAsync(http, account, null)));
    }

    private static ProblemHttpResult Done() =>
        Refusals.Conflict("set-up-done", "The set-up is done: there are accounts.", null, "Sign in.");
}
