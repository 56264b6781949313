using LabWatch.Alerts;
using LabWatch.Alerts.Push;
using LabWatch.Lab.Alerts;
using LabWatch.Lab.Findings;
using LabWatch.Records.Alerts;
using LabWatch.Service.Api.Access;
using LabWatch.Service.Api.Accounts;
using LabWatch.Service.Api.Requests;
using Microsoft.AspNetCore.Http.HttpResults;

namespace LabWatch.Service.Api.Notifying;

/// <summary>The ways in which people are told, the devices that they have subscribed, and test messages.</summary>
internal static class NotifierEndpoints
{
    /// <summary>Maps the endpoints into the group of the API's version.</summary>
    public static void Map(RouteGroupBuilder api)
    {
        RouteGroupBuilder notifiers = api.MapGroup("notifiers").WithTags("Notifiers");
        notifiers.MapGet(string.Empty, List)
            .Allow(Permission.Read)
            .WithName("ListNotifiers")
            .WithSummary("The notifiers of the lab file, with what waits for each");
        notifiers.MapPost("{id}/test", TestAsync)
            .Allow(Permission.Acknowledge)
            .WithName("TestNotifier")
            .WithSummary("Send a test message, and say whether it was taken")
            .ProducesProblem(StatusCodes.Status404NotFound);
        RouteGroupBuilder devices = api.MapGroup("me/devices").WithTags("Notifiers").Allow(Permission.Read);
        devices.MapGet(string.Empty, Devices)
            .WithName("ListOwnDevices")
            .WithSummary("The own devices that take push messages, and the key to subscribe with");
        devices.MapPost(string.Empty, AddDevice)
            .WithName("AddOwnDevice")
            .WithSummary("Subscribe this device: what the browser's subscription says, and a name")
            .ProducesProblem(StatusCodes.Status400BadRequest);
        devices.MapDelete("{id}", RemoveDevice)
            .WithName("RemoveOwnDevice")
            .WithSummary("Take a device away")
            .ProducesProblem(StatusCodes.Status404NotFound);
        devices.MapPost("{id}/test", TestDeviceAsync)
            .WithName("TestOwnDevice")
            .WithSummary("Send a test message to an own device")
            .ProducesProblem(StatusCodes.Status404NotFound);
    }

    private static Ok<NotifierListView> List(ITestMessages messages, IAlertBoard board)
    {
        ILookup<string, OutboxMessage> waiting = board.PendingMessages().ToLookup(message => message.Notifier, StringComparer.Ordinal);
        return TypedResults.Ok(new NotifierListView(
        [
            .. messages.Notifiers.Where(notifier => notifier.Kind != NotifierKind.Push).Select(notifier => new NotifierView(
                notifier.Id, Names.Of(notifier.Kind), waiting[notifier.Id].Count(), waiting[notifier.Id].OrderByDescending(message => message.Attempts).FirstOrDefault()?.LastError)),
        ]));
    }

    private static async Task<Results<Ok<TestView>, ProblemHttpResult>> TestAsync(
        string id, HttpContext http, ITestMessages messages, CancellationToken cancellationToken)
    {
        bool isOfLab = messages.Notifiers.Any(notifier => notifier.Kind != NotifierKind.Push && string.Equals(notifier.Id, id, StringComparison.Ordinal));
        TestOutcome? result = isOfLab ? await messages.SendAsync(id, Caller.Of(http).Name, cancellationToken) : null;
        return result is null ? Refusals.NotFound("notifier", id, "GET /api/v1/notifiers lists them.") : TypedResults.Ok(new TestView(result.IsTaken, result.Error));
    }

    private static Ok<PushDeviceListView> Devices(HttpContext http, IPushDesk push) =>
        TypedResults.Ok(new PushDeviceListView(push.PublicKey, [.. push.DevicesOf(Caller.Of(http).Name).OrderBy(device => device.CreatedAt).Select(PushDeviceView.Of)]));

    private static Results<Created<PushDeviceView>, ProblemHttpResult> AddDevice(PushDeviceRequest request, HttpContext http, IPushDesk push)
    {
        Finding[] findings = [.. AccountChecks.DisplayName(request.Name, "/name")];
        if (findings.Length > 0)
        {
            return Refusals.BadRequest(findings);
        }

        (PushSubscription? made, IReadOnlyList<Finding> wrong) = push.Add(
            Caller.Of(http).Name, request.Name!.Trim(), request.Endpoint ?? string.Empty, request.Keys?.P256dh ?? string.Empty, request.Keys?.Auth ?? string.Empty);
        return made is null ? Refusals.BadRequest(wrong) : TypedResults.Created($"/api/v1/me/devices/{made.Id}", PushDeviceView.Of(made));
    }

    private static Results<NoContent, ProblemHttpResult> RemoveDevice(string id, HttpContext http, IPushDesk push) =>
        push.Remove(Caller.Of(http).Name, id) ? TypedResults.NoContent() : Missing(id);

    private static async Task<Results<Ok<TestView>, ProblemHttpResult>> TestDeviceAsync(
        string id, HttpContext http, IPushDesk push, ITestMessages messages, CancellationToken cancellationToken)
    {
        string by = Caller.Of(http).Name;
        bool isOwn = push.DevicesOf(by).Any(device => device.Id == id);
        TestOutcome? result = isOwn ? await messages.SendAsync("push-" + id, by, cancellationToken) : null;
        return result is null ? Missing(id) : TypedResults.Ok(new TestView(result.IsTaken, result.Error));
    }

    private static ProblemHttpResult Missing(string id) => Refusals.NotFound("device", id, "GET /api/v1/me/devices lists the own ones.");
}
