using System.Globalization;
using LabWatch.Lab;
using LabWatch.Lab.Time;
using LabWatch.Records.Audit;
using LabWatch.Service.Api.Access;
using LabWatch.Service.Api.Requests;
using LabWatch.Service.Api.Views;
using Microsoft.AspNetCore.Http.HttpResults;

namespace LabWatch.Service.Api.Audit;

/// <summary>The audit trail of the site.</summary>
internal static class AuditEndpoints
{
    private const int RowsByDefault = 50;
    private const int MaximumRows = 500;

    /// <summary>Maps the endpoint into the group of the API's version.</summary>
    public static void Map(RouteGroupBuilder api) =>
        api.MapGroup("audit").WithTags("Audit").Allow(Permission.ReadTrail).MapGet(string.Empty, ListAsync)
            .WithName("ListAudit")
            .WithSummary("The audit trail of the site, newest entry first, and the end of its chain")
            .WithDescription("An item without `digest`, in canonical form (RFC 8785), is the text whose SHA-256 is its `digest`. Write `head` down elsewhere: only then a chain that was cut or written anew can be seen.")
            .ProducesProblem(StatusCodes.Status400BadRequest);

    private static async Task<Results<Ok<AuditListView>, ProblemHttpResult>> ListAsync(
        [AsParameters] AuditFilter filter, HttpRequest http, IAuditLedger trail, ILabSnapshotSource lab, CancellationToken cancellationToken)
    {
        QueryReader query = new(http.Query);
        query.Allow("action", "actor", "subject", "from", "to", "after", "count");
        TimeWindow? window = query.Window("from", "to");
        AuditQuery asked = new(lab.Current.Site.Id, query.Count("count", RowsByDefault, MaximumRows))
        {
            Action = query.Text("action"),
            Actor = query.Text("actor"),
            Subject = query.Text("subject"),
            From = window?.Start,
            To = window?.End,
            Before = Before(query),
        };
        if (query.Findings.Count > 0)
        {
            return Refusals.BadRequest(query.Findings);
        }

        AuditPage page = await trail.ListAsync(asked, cancellationToken);
        return TypedResults.Ok(new AuditListView(
            [.. page.Items.Select(Of)],
            page.Next?.ToString(CultureInfo.InvariantCulture),
            page.Head is { } head ? new AuditHeadView(head.Sequence, head.Digest) : null));
    }

    private static long? Before(QueryReader query)
    {
        string? text = query.Cursor("after");
        if (text is null || (long.TryParse(text, NumberStyles.None, CultureInfo.InvariantCulture, out long number) && number > 0))
        {
            return text is null ? null : long.Parse(text, NumberStyles.None, CultureInfo.InvariantCulture);
        }

        query.Add("not-a-cursor", "after", "This is no cursor of this list.", text, "Pass `next` of the page before unchanged.");
        return null;
    }

    private static AuditEntryView Of(AuditEntry entry) => new(
        entry.Site, entry.Sequence, entry.At, entry.Actor, entry.Action, entry.Subject, entry.Content, entry.RecordDigest, entry.Previous, entry.Digest);
}
