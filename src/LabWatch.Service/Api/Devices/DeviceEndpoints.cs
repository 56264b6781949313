using System.Text.Json.Nodes;
using LabWatch.Intake.Accounts;
using LabWatch.Lab;
using LabWatch.Lab.Findings;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Time;
using LabWatch.Records.Audit;
using LabWatch.Service.Api.Access;
using LabWatch.Service.Api.Requests;
using Microsoft.AspNetCore.Http.HttpResults;

namespace LabWatch.Service.Api.Devices;

/// <summary>Accounts with which devices publish at the embedded broker, each for one source.</summary>
internal static class DeviceEndpoints
{
    private const int MostAccounts = 10_000;

    /// <summary>Maps the endpoints into the group of the API's version.</summary>
    public static void Map(RouteGroupBuilder api)
    {
        RouteGroupBuilder group = api.MapGroup("devices").WithTags("Devices").Allow(Permission.ManageAccounts);
        group.MapGet(string.Empty, List)
            .WithName("ListDeviceAccounts")
            .WithSummary("Accounts of devices at the embedded broker, by name");
        group.MapPost(string.Empty, AddAsync)
            .WithName("AddDeviceAccount")
            .WithSummary("Make an account for a device; the answer has its password, shown once")
            .WithDescription("With it a device may publish for its one source, and subscribe to that source's topics and to what the service publishes.")
            .ProducesProblem(StatusCodes.Status400BadRequest)
            .ProducesProblem(StatusCodes.Status409Conflict);
        group.MapDelete("{name}", RevokeAsync)
            .WithName("RevokeDeviceAccount")
            .WithSummary("Take the account of a device back; its connections end at once")
            .ProducesProblem(StatusCodes.Status404NotFound);
    }

    private static Ok<DeviceAccountListView> List(IDeviceAccounts accounts) => TypedResults.Ok(new DeviceAccountListView([.. accounts.List().Select(DeviceAccountView.Of)]));

    private static async Task<Results<Created<DeviceAccountAnswer>, ProblemHttpResult>> AddAsync(
        DeviceAccountRequest request, HttpContext http, IDeviceAccounts accounts, IAuditLedger trail, ILabSnapshotSource lab, TimeProvider labClock, CancellationToken cancellationToken)
    {
        string name = (request.Name ?? string.Empty).Trim();
        List<Finding> findings = [];
        if (!Slug.IsValid(name))
        {
            findings.Add(new Finding("not-a-slug", "/name", "The name of a device's account is 1 to 63 small letters, digits and hyphens.", Finding.Quote(name), "Choose for example fir-logger."));
        }

        if (!SourceKey.TryParse(request.Source, out SourceKey source) || lab.Current.FindSource(source) is null)
        {
            findings.Add(new Finding("unknown-source", "/source", "There is no source of this key.", Finding.Quote(request.Source), "GET /api/v1/sources lists the sources."));
        }

        if (findings.Count > 0)
        {
            return Refusals.BadRequest(findings);
        }

        IReadOnlyList<DeviceAccount> known = accounts.List();
        if (known.Count >= MostAccounts || known.Any(account => account.Name == name))
        {
            return Refusals.Conflict("name-taken", "This name was given before; the trail knows that device by it.", name, "Choose another name.");
        }

        // The trail first: an account that nobody can find in it must not exist. An entry without its account does no harm.
        Instant now = Instant.Now(labClock);
        string by = Caller.Of(http).Name;
        await trail.AppendAsync(
            new AuditNote(lab.Current.Site.Id, now, by, "device-account-created", "device/" + name, new JsonObject { ["source"] = source.ToString() }, null), cancellationToken);
        return accounts.Add(name, source, by, now) is { } password
            ? TypedResults.Created($"/api/v1/devices/{name}", new DeviceAccountAnswer(DeviceAccountView.Of(new DeviceAccount(name, source.ToString(), now, by, null)), password))
            : Refusals.Conflict("name-taken", "This name was given before; the trail knows that device by it.", name, "Choose another name.");
    }

    private static async Task<Results<NoContent, ProblemHttpResult>> RevokeAsync(
        string name, HttpContext http, IDeviceAccounts accounts, IAuditLedger trail, ILabSnapshotSource lab, TimeProvider labClock, CancellationToken cancellationToken)
    {
        // The door first: a stolen password must stop working even while the records do not answer.
        Instant now = Instant.Now(labClock);
        if (!accounts.Revoke(name, now))
        {
            return Refusals.NotFound("device", name, "GET /api/v1/devices lists the accounts; one that was taken back stays so.");
        }

        await trail.AppendAsync(new AuditNote(lab.Current.Site.Id, now, Caller.Of(http).Name, "device-account-revoked", "device/" + name, [], null), CancellationToken.None);
        return TypedResults.NoContent();
    }
}
