using System.Collections.Immutable;
using LabWatch.Lab.Findings;
using LabWatch.Lab.Time;
using LabWatch.Records.Accounts;
using LabWatch.Records.Accounts.Passwords;
using LabWatch.Service.Api.Access;
using LabWatch.Service.Api.Accounts.Views;
using LabWatch.Service.Api.Requests;
using Microsoft.AspNetCore.Http.HttpResults;

namespace LabWatch.Service.Api.Accounts;

/// <summary>The administrator's work: who has an account, and what that person is.</summary>
internal static class AccountEndpoints
{
    /// <summary>Maps the endpoints into the group of the API's version.</summary>
    public static void Map(RouteGroupBuilder api)
    {
        RouteGroupBuilder group = api.MapGroup("accounts").WithTags("Accounts").Allow(Permission.ManageAccounts);
        group.MapGet(string.Empty, ListAsync)
            .WithName("ListAccounts")
            .WithSummary("All accounts, by name");
        group.MapPost(string.Empty, AddAsync)
            .WithName("AddAccount")
            .WithSummary("Make an account; the answer has its one-time password")
            .ProducesProblem(StatusCodes.Status400BadRequest)
            .ProducesProblem(StatusCodes.Status409Conflict);
        group.MapPost("{name}", ChangeAsync)
            .WithName("ChangeAccount")
            .WithSummary("Change name for people, roles, whether it is closed; reset the password")
            .WithDescription("A closed account and a reset password end all sessions of the account. The last administrator cannot be taken away.")
            .ProducesProblem(StatusCodes.Status400BadRequest)
            .ProducesProblem(StatusCodes.Status404NotFound)
            .ProducesProblem(StatusCodes.Status409Conflict);
    }

    private static async Task<Ok<AccountListView>> ListAsync(PeopleDesk desk, IAccountLedger accounts, CancellationToken cancellationToken) =>
        TypedResults.Ok(new AccountListView([.. (await accounts.ListAsync(desk.Site, cancellationToken)).Select(AccountAnswers.Of)]));

    private static async Task<Results<Created<AccountAnswer>, ProblemHttpResult>> AddAsync(
        AccountRequest request, HttpContext http, PeopleDesk desk, IAccountLedger accounts, PasswordHasher hasher, TimeProvider labClock, CancellationToken cancellationToken)
    {
        string name = (request.Name ?? string.Empty).Trim();
        (ImmutableArray<Role> roles, IEnumerable<Finding> roleFindings) = AccountChecks.Roles(request.Roles);
        Finding[] findings = [.. AccountChecks.Name(name), .. AccountChecks.DisplayName(request.DisplayName), .. roleFindings];
        if (findings.Length > 0)
        {
            return Refusals.BadRequest(findings);
        }

        string password = OneTimePassword.Draw();
        if (await hasher.HashAsync(password, cancellationToken) is not { } hash)
        {
            return AccountAnswers.Busy(http);
        }

        Instant now = Instant.Now(labClock);
        Account account = new(name, 1, request.DisplayName!.Trim(), roles, false, true, hash, now, null, 0);
        AccountOutcome outcome = await accounts.AddAsync(desk.Site, account, Caller.Of(http).Name, now, isFirst: false, cancellationToken);
        return outcome is AccountOutcome.Done
            ? TypedResults.Created($"/api/v1/accounts/{name}", new AccountAnswer(AccountAnswers.Of(account), password))
            : Refusals.Conflict("name-taken", "This name was given before; the trail knows that person by it.", name, "Choose another name.");
    }

    private static async Task<Results<Ok<AccountAnswer>, ProblemHttpResult>> ChangeAsync(
        string name, AccountChangeRequest request, HttpContext http, PeopleDesk desk, IAccountLedger accounts, PasswordHasher hasher, CancellationToken cancellationToken)
    {
        ImmutableArray<Role> roles = [];
        IEnumerable<Finding> roleFindings = [];
        if (request.Roles is not null)
        {
            (roles, roleFindings) = AccountChecks.Roles(request.Roles);
        }

        Finding[] findings = [.. AccountChecks.DisplayName(request.DisplayName, isNeeded: false), .. roleFindings];
        if (findings.Length > 0)
        {
            return Refusals.BadRequest(findings);
        }

        string? password = request.ResetPassword == true ? OneTimePassword.Draw() : null;
        PasswordHash? hash = password is null ? null : await hasher.HashAsync(password, cancellationToken);
        if (password is not null && hash is null)
        {
            return AccountAnswers.Busy(http);
        }

        AccountChange change = new()
        {
            DisplayName = request.DisplayName?.Trim(),
            Roles = request.Roles is null ? null : roles,
            IsDisabled = request.Disabled,
            Password = hash,
            MustChangePassword = hash is not null,
        };
        AccountOutcome outcome = await desk.ChangeAsync(name, change, Caller.Of(http).Name, cancellationToken);
        return outcome switch
        {
            AccountOutcome.Done when await accounts.FindAsync(desk.Site, name, cancellationToken) is { } account => TypedResults.Ok(new AccountAnswer(AccountAnswers.Of(account), password)),
            AccountOutcome.LastAdministrator => Refusals.Conflict("last-administrator", "Nobody would be left who can look after accounts.", name, "Make another administrator first."),
            _ => Refusals.NotFound("account", name, "GET /api/v1/accounts lists the accounts."),
        };
    }
}
