using System.Collections.Immutable;
using System.Globalization;
using LabWatch.Lab.Findings;
using LabWatch.Lab.Time;
using LabWatch.Records.Accounts;
using LabWatch.Service.Api.Access;
using LabWatch.Service.Api.Accounts.Views;
using LabWatch.Service.Api.Requests;
using Microsoft.AspNetCore.Http.HttpResults;
using Microsoft.AspNetCore.Mvc;

namespace LabWatch.Service.Api.Accounts;

/// <summary>Tokens with which programs call the API for a person.</summary>
internal static class TokenEndpoints
{
    private const int MostDays = 366;
    private const int MostTokens = 100;

    /// <summary>Maps the endpoints into the group of the API's version.</summary>
    public static void Map(RouteGroupBuilder api)
    {
        RouteGroupBuilder group = api.MapGroup("tokens").WithTags("Tokens").AllowSignedIn();
        group.MapGet(string.Empty, ListAsync)
            .WithName("ListTokens")
            .WithSummary("The own tokens, or everybody's for an administrator")
            .ProducesProblem(StatusCodes.Status403Forbidden);
        group.MapPost(string.Empty, AddAsync)
            .WithName("AddToken")
            .WithSummary("Make a token with some of the own roles; its value is shown once")
            .ProducesProblem(StatusCodes.Status400BadRequest)
            .ProducesProblem(StatusCodes.Status403Forbidden);
        group.MapDelete("{id}", RevokeAsync)
            .WithName("RevokeToken")
            .WithSummary("Take a token back: the own ones, or anybody's for an administrator")
            .ProducesProblem(StatusCodes.Status403Forbidden)
            .ProducesProblem(StatusCodes.Status404NotFound);
    }

    private static async Task<Results<Ok<TokenListView>, ProblemHttpResult>> ListAsync(
        [FromQuery] string? all, HttpContext http, PeopleDesk desk, ISessionLedger sessions, CancellationToken cancellationToken)
    {
        QueryReader query = new(http.Request.Query);
        query.Allow("all");
        bool isAll = query.Flag("all");
        if (query.Findings.Count > 0)
        {
            return Refusals.BadRequest(query.Findings);
        }

        Caller caller = Caller.Of(http);
        if (Refused(caller, isAll ? Permission.ManageAccounts : null) is { } refusal)
        {
            return refusal;
        }

        IReadOnlyList<ApiToken> tokens = await sessions.ListTokensAsync(desk.Site, isAll ? null : caller.Name, cancellationToken);
        return TypedResults.Ok(new TokenListView([.. tokens.Select(AccountAnswers.Of)]));
    }

    private static async Task<Results<Created<TokenAnswer>, ProblemHttpResult>> AddAsync(
        TokenRequest request, HttpContext http, PeopleDesk desk, ISessionLedger sessions, SessionClock clock, CancellationToken cancellationToken)
    {
        Caller caller = Caller.Of(http);
        if (RefusedToAdd(caller) is { } refusal)
        {
            return refusal;
        }

        (ImmutableArray<Role> roles, IEnumerable<Finding> roleFindings) = AccountChecks.Roles(request.Roles);
        Finding[] findings = [.. AccountChecks.DisplayName(request.Name, "/name"), .. roleFindings, .. Above(roles, caller), .. Days(request.ExpiresInDays)];
        if (findings.Length > 0)
        {
            return Refusals.BadRequest(findings);
        }

        Instant now = clock.Now;
        IReadOnlyList<ApiToken> others = await sessions.ListTokensAsync(desk.Site, caller.Name, cancellationToken);
        if (others.Count(token => token.RevokedAt is null && token.ExpiresAt > now) >= MostTokens)
        {
            return Refusals.Conflict("too-many-tokens", "This account has a hundred tokens already.", null, "Take back those that nobody uses.");
        }

        string value = Secret.DrawToken();
        ApiToken made = new(Guid.CreateVersion7(), caller.Name, request.Name!.Trim(), roles, now, now + TimeSpan.FromDays(request.ExpiresInDays!.Value), null, null);
        await sessions.AddTokenAsync(desk.Site, made, Secret.DigestOf(value), cancellationToken);
        return TypedResults.Created($"/api/v1/tokens/{made.Id}", new TokenAnswer(AccountAnswers.Of(made), value));
    }

    private static async Task<Results<NoContent, ProblemHttpResult>> RevokeAsync(
        string id, HttpContext http, PeopleDesk desk, ISessionLedger sessions, SignedInCallers callers, TimeProvider labClock, CancellationToken cancellationToken)
    {
        Caller caller = Caller.Of(http);
        if (Refused(caller, null) is { } refusal)
        {
            return refusal;
        }

        string? owner = caller.May(Permission.ManageAccounts) ? null : caller.Name;
        bool isThere = Guid.TryParse(id, out Guid token) && await sessions.RevokeTokenAsync(desk.Site, owner, token, caller.Name, Instant.Now(labClock), cancellationToken);
        callers.ForgetTokens();
        return isThere ? TypedResults.NoContent() : Refusals.NotFound("token", id, "GET /api/v1/tokens lists them.");
    }

    private static ProblemHttpResult? Refused(Caller caller, Permission? needed) =>
        caller.MustChangePassword || (needed is { } permission && !caller.May(permission)) ? AccessRefusals.Of(caller, needed) : null;

    // A token must not make tokens: a stolen one would never end. And making one is administration: the password is asked for again.
    private static ProblemHttpResult? RefusedToAdd(Caller caller) =>
        caller.Session is null ? AccessRefusals.SessionNeeded()
        : caller.MustChangePassword ? AccessRefusals.ChangePassword()
        : caller.ToBeConfirmed.Contains(Permission.ManageAccounts) ? AccessRefusals.Confirm()
        : null;

    private static IEnumerable<Finding> Above(ImmutableArray<Role> roles, Caller caller) =>
        roles.Except(caller.Roles).Select(role => new Finding("role-not-held", "/roles", "The caller has no such role.", RoleWords.Of(role), "A token has no more roles than its owner."));

    private static IEnumerable<Finding> Days(int? days)
    {
        if (days is not (>= 1 and <= MostDays))
        {
            yield return new Finding("out-of-range", "/expiresInDays", "The days until the token ends are out of range.", days?.ToString(CultureInfo.InvariantCulture), $"Give 1 to {MostDays} days.");
        }
    }
}
