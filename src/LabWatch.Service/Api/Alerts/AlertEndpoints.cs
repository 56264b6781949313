using LabWatch.Alerts;
using LabWatch.Alerts.Links;
using LabWatch.Alerts.Push;
using LabWatch.Lab.Alerts;
using LabWatch.Lab.Findings;
using LabWatch.Lab.Time;
using LabWatch.Records.Alerts;
using LabWatch.Service.Api.Access;
using LabWatch.Service.Api.Live;
using LabWatch.Service.Api.Requests;
using LabWatch.Service.Api.Views;
using Microsoft.AspNetCore.Http.HttpResults;

namespace LabWatch.Service.Api.Alerts;

/// <summary>Alerts and their acknowledgement.</summary>
internal static class AlertEndpoints
{
    private const int RowsByDefault = 50;
    private const int MaximumRows = 500;

    /// <summary>Maps the endpoints into the group of the API's version.</summary>
    public static void Map(RouteGroupBuilder api)
    {
        RouteGroupBuilder group = api.MapGroup("alerts").WithTags("Alerts");
        group.MapGet(string.Empty, ListAsync)
            .Allow(Permission.Read)
            .WithName("ListAlerts")
            .WithSummary("Alerts, newest raised first")
            .ProducesProblem(StatusCodes.Status400BadRequest);
        group.MapGet("{id}", FindAsync)
            .Allow(Permission.Read)
            .WithName("GetAlert")
            .WithSummary("One alert with every step of its life")
            .ProducesProblem(StatusCodes.Status404NotFound);
        group.MapGet("{id}/messages", MessagesAsync)
            .Allow(Permission.Read)
            .WithName("ListAlertMessages")
            .WithSummary("Who was told about an alert, when, and whether it arrived")
            .ProducesProblem(StatusCodes.Status404NotFound);
        group.MapGet("links/{token}", Follow)
            .Allow(Permission.Read)
            .WithName("FollowAlertLink")
            .WithSummary("The alert that a link in a message leads to; refused once the link has ended")
            .ProducesProblem(StatusCodes.Status404NotFound);
        group.MapPost("{id}/shelve", (string id, ShelveRequest request, HttpContext http, SiteBoard board, IAlertBoard desk, CancellationToken cancellationToken) =>
                ShelveAsync(id, request, TimeSpan.FromMinutes(Math.Clamp(request.Minutes ?? 0, 0, 1_000_000)), http, board, desk, cancellationToken))
            .Allow(Permission.Acknowledge)
            .WithName("ShelveAlert")
            .WithSummary("Tell nobody of an alert until an end; never of a hazard")
            .ProducesProblem(StatusCodes.Status400BadRequest)
            .ProducesProblem(StatusCodes.Status404NotFound);
        group.MapPost("{id}/out-of-service", (string id, ShelveRequest request, HttpContext http, SiteBoard board, IAlertBoard desk, CancellationToken cancellationToken) =>
                ShelveAsync(id, request, null, http, board, desk, cancellationToken))
            .Allow(Permission.ReviseRecords)
            .WithName("TakeAlertOutOfService")
            .WithSummary("Tell nobody of an alert until it is put back into service; never of a hazard")
            .ProducesProblem(StatusCodes.Status400BadRequest)
            .ProducesProblem(StatusCodes.Status404NotFound);
        group.MapPost("{id}/unshelve", (string id, AcknowledgeRequest request, HttpContext http, SiteBoard board, IAlertBoard desk, CancellationToken cancellationToken) =>
                UnshelveAsync(id, isOutOfService: false, request, http, board, desk, cancellationToken))
            .Allow(Permission.Acknowledge)
            .WithName("UnshelveAlert")
            .WithSummary("End the shelf of an alert")
            .ProducesProblem(StatusCodes.Status400BadRequest)
            .ProducesProblem(StatusCodes.Status404NotFound);
        group.MapPost("{id}/return-to-service", (string id, AcknowledgeRequest request, HttpContext http, SiteBoard board, IAlertBoard desk, CancellationToken cancellationToken) =>
                UnshelveAsync(id, isOutOfService: true, request, http, board, desk, cancellationToken))
            .Allow(Permission.ReviseRecords)
            .WithName("ReturnAlertToService")
            .WithSummary("Put an alert back into service")
            .ProducesProblem(StatusCodes.Status400BadRequest)
            .ProducesProblem(StatusCodes.Status404NotFound);
        group.MapPost("{id}/acknowledge", AcknowledgeAsync)
            .Allow(Permission.Acknowledge)
            .WithName("AcknowledgeAlert")
            .WithSummary("Acknowledge an alert")
            .WithDescription(
                "Says who has seen the alert; it stops escalation, not the hazard. It cannot be taken back. "
                + "Acknowledging again as the same person changes nothing. The answer comes when the acknowledgement is durable.")
            .ProducesProblem(StatusCodes.Status400BadRequest)
            .ProducesProblem(StatusCodes.Status404NotFound)
            .ProducesProblem(StatusCodes.Status409Conflict);
    }

    private static async Task<Results<Ok<AlertListView>, ProblemHttpResult>> ListAsync(
        [AsParameters] AlertFilter filter, HttpRequest http, SiteBoard board, IAlertLedger ledger, CancellationToken cancellationToken)
    {
        QueryReader query = new(http.Query);
        query.Allow("source", "open", "after", "count");
        AlertQuery asked = new(
            query.Source("source"), query.Flag("open"), query.Cursor("after"), query.Count("count", RowsByDefault, MaximumRows));
        if (query.Findings.Count > 0)
        {
            return Refusals.BadRequest(query.Findings);
        }

        AlertPage page = asked.OpenOnly ? OpenAlertPage.Of(board.OpenAlerts(), asked) : await ledger.ListAsync(asked, cancellationToken);
        return TypedResults.Ok(new AlertListView([.. page.Items.Select(alert => AlertViews.Of(board.Lab, alert))], page.Next));
    }

    private static async Task<Results<Ok<AlertDetailView>, ProblemHttpResult>> FindAsync(
        string id, SiteBoard board, IAlertLedger ledger, CancellationToken cancellationToken)
    {
        if (!Guid.TryParse(id, out Guid guid))
        {
            return Missing(id);
        }

        // An open alert is known before the ledger has it, and shows the latest value of its sensor.
        Alert? alert = board.OpenAlerts().FirstOrDefault(open => open.Id == guid) ?? await ledger.FindAsync(guid, cancellationToken);
        return alert is null
            ? Missing(id)
            : TypedResults.Ok(new AlertDetailView(
                AlertViews.Of(board.Lab, alert),
                [.. (await ledger.TransitionsAsync(guid, cancellationToken)).Select(AlertViews.Of)],
                SiteBoard.Caution));
    }

    private static async Task<Results<Ok<AlertMessageListView>, ProblemHttpResult>> MessagesAsync(
        string id, IAlertBoard board, IPushDesk push, IAlertLedger ledger, CancellationToken cancellationToken)
    {
        if (!Guid.TryParse(id, out Guid guid))
        {
            return Missing(id);
        }

        // What waits is known in memory before the records have it, and newer there.
        Dictionary<string, OutboxMessage> messages = (await ledger.MessagesAsync(guid, cancellationToken)).ToDictionary(message => message.Id, StringComparer.Ordinal);
        foreach (OutboxMessage waiting in board.PendingMessages().Where(message => message.AlertId == guid))
        {
            messages[waiting.Id] = waiting;
        }

        return TypedResults.Ok(new AlertMessageListView(
        [
            .. messages.Values.OrderBy(message => message.QueuedAt).ThenBy(message => message.Notifier, StringComparer.Ordinal).Select(message => new AlertMessageView(
                message.Id, message.Notifier, push.AccountOf(message.Notifier), AlertViews.HeadlineOf(message), message.QueuedAt, message.SentAt, message.GivenUpAt,
                message.Attempts, message.LastError)),
        ]));
    }

    private static Results<Ok<AlertLinkView>, ProblemHttpResult> Follow(string token, IAlertLinks links, TimeProvider clock) =>
        links.Read(token, Instant.Now(clock)) is { } alert
            ? TypedResults.Ok(new AlertLinkView(alert))
            : Refusals.NotFound("link", "it has ended, or was not made here", "Open the list of alerts: what stands is there.");

    private static async Task<Results<Ok<AlertView>, ProblemHttpResult>> ShelveAsync(
        string id, ShelveRequest request, TimeSpan? length, HttpContext http, SiteBoard board, IAlertBoard desk, CancellationToken cancellationToken) =>
        Guid.TryParse(id, out Guid guid)
            ? Answer(id, board, await desk.ShelveAsync(guid, Caller.Of(http).Name, length, request.Reason, cancellationToken))
            : Missing(id);

    private static async Task<Results<Ok<AlertView>, ProblemHttpResult>> UnshelveAsync(
        string id, bool isOutOfService, AcknowledgeRequest request, HttpContext http, SiteBoard board, IAlertBoard desk, CancellationToken cancellationToken)
    {
        IReadOnlyList<Finding> findings = request.Check();
        if (findings.Count > 0)
        {
            return Refusals.BadRequest(findings);
        }

        // What is out of service only a quality manager puts back.
        bool fits = Guid.TryParse(id, out Guid guid) && board.OpenAlerts().Any(alert => alert.Id == guid && alert.Shelf?.IsOutOfService == isOutOfService);
        return fits ? Answer(id, board, await desk.UnshelveAsync(guid, Caller.Of(http).Name, request.Note?.Trim(), cancellationToken)) : Missing(id);
    }

    private static Results<Ok<AlertView>, ProblemHttpResult> Answer(string id, SiteBoard board, AcknowledgeResult result) =>
        result.Findings.Count > 0
            ? Refusals.BadRequest(result.Findings)
            : result.Alert is { } alert ? TypedResults.Ok(AlertViews.Of(board.Lab, alert)) : Missing(id);

    private static async Task<Results<Ok<AlertView>, ProblemHttpResult>> AcknowledgeAsync(
        string id, AcknowledgeRequest request, HttpContext http, SiteBoard board, IAlertBoard desk, CancellationToken cancellationToken)
    {
        IReadOnlyList<Finding> findings = request.Check();
        if (findings.Count > 0)
        {
            return Refusals.BadRequest(findings);
        }

        if (!Guid.TryParse(id, out Guid guid))
        {
            return Missing(id);
        }

        string by = Caller.Of(http).Name;
        string? note = string.IsNullOrWhiteSpace(request.Note) ? null : request.Note.Trim();
        AcknowledgeResult result = await desk.AcknowledgeAsync(guid, by, note, cancellationToken);
        if (result.Findings.Count > 0)
        {
            return Refusals.BadRequest(result.Findings);
        }

        return result.Alert switch
        {
            null => Missing(id),
            { AcknowledgedBy: { } first } when !string.Equals(first, by, StringComparison.Ordinal) => Refusals.Conflict(
                "acknowledged-already", $"{first} has acknowledged this alert already.", id, "Nothing is left to do; the record keeps who was first."),
            { } alert => TypedResults.Ok(AlertViews.Of(board.Lab, alert)),
        };
    }

    private static ProblemHttpResult Missing(string id) => Refusals.NotFound("alert", id, "GET /api/v1/alerts lists the alerts.");
}
