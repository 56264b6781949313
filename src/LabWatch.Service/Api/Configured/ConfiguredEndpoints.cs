using System.Text.Json.Nodes;
using LabWatch.Lab.Identity;
using LabWatch.Lab.LabFile;
using LabWatch.Service.Api.Access;
using LabWatch.Service.Api.Requests;
using LabWatch.Service.Api.Views;
using Microsoft.AspNetCore.Http.HttpResults;
using Microsoft.AspNetCore.Mvc;

namespace LabWatch.Service.Api.Configured;

/// <summary>Acceptance limits, certificates and instruments in all their revisions.</summary>
internal static class ConfiguredEndpoints
{
    private const int RowsByDefault = 100;
    private const int MaximumRows = 500;

    /// <summary>Maps the endpoints into the group of the API's version.</summary>
    public static void Map(RouteGroupBuilder api)
    {
        RouteGroupBuilder limits = api.MapGroup("limits").WithTags("Limits");
        limits.MapGet(string.Empty, ListLimitsAsync)
            .Allow(Permission.Read)
            .WithName("ListLimits")
            .WithSummary("Acceptance limits in all revisions, newest recorded first")
            .ProducesProblem(StatusCodes.Status400BadRequest);
        Revisable<LimitRequest>(limits.MapPost(string.Empty, static (HttpContext http, RevisionDesk desk, CancellationToken token) => desk.ReviseAsync(LabRecordKind.Limit, http, token)))
            .WithName("ReviseLimit")
            .WithSummary("Record a new acceptance limit, or the next revision of one")
            .WithDescription(
                "The body is an entry of `limits` of the lab file with the member `reason`; findings point into it. It is in force at once, and assessments of the windows that it "
                + "touches are superseded. 409 where the revision is not the next; the same revision with the same content again adds nothing.");
        RouteGroupBuilder certificates = api.MapGroup("certificates").WithTags("Certificates");
        certificates.MapGet(string.Empty, ListCertificatesAsync)
            .Allow(Permission.Read)
            .WithName("ListCertificates")
            .WithSummary("Calibration certificates in all revisions, newest recorded first")
            .ProducesProblem(StatusCodes.Status400BadRequest);
        Revisable<CertificateRequest>(certificates.MapPost(string.Empty, static (HttpContext http, RevisionDesk desk, CancellationToken token) => desk.ReviseAsync(LabRecordKind.Certificate, http, token)))
            .WithName("ReviseCertificate")
            .WithSummary("Record a new certificate, or the next revision of one")
            .WithDescription(
                "The body is an entry of `certificates` of an instrument of the lab file with the members `instrument` and `reason`; findings point into it. It is in force at once, and "
                + "assessments that rest on another certificate are superseded. 409 where the revision is not the next; the same revision with the same content again adds nothing.");
        api.MapGet("instruments", static (RevisionDesk desk, CancellationToken token) => desk.InstrumentsAsync(token))
            .Allow(Permission.Read)
            .WithTags("Instruments")
            .WithName("ListInstruments")
            .WithSummary("Instruments with their stays, certificates and every recorded revision");
    }

    private static RouteHandlerBuilder Revisable<TRequest>(RouteHandlerBuilder endpoint)
        where TRequest : notnull => endpoint
        .Allow(Permission.ReviseRecords)
        .Accepts<TRequest>("application/json")
        .WithMetadata(new RequestSizeLimitAttribute(RevisionBody.MaximumLength))
        .ProducesProblem(StatusCodes.Status400BadRequest)
        .ProducesProblem(StatusCodes.Status409Conflict);

    private static async Task<Results<Ok<RevisionListView>, ProblemHttpResult>> ListLimitsAsync(
        [AsParameters] LimitFilter filter, HttpRequest http, RevisionDesk desk, CancellationToken cancellationToken)
    {
        QueryReader query = new(http.Query);
        query.Allow("source", "criterion", "after", "count");
        (SourceKey? source, string? criterion) = (query.Source("source"), query.Criterion("criterion"));
        (string? after, int count) = (query.Cursor("after"), query.Count("count", RowsByDefault, MaximumRows));
        return query.Findings.Count > 0
            ? Refusals.BadRequest(query.Findings)
            : TypedResults.Ok(await desk.ListAsync(
                LabRecordKind.Limit, limit => (source is null || Is(limit, "source", source.Value.Source)) && (criterion is null || Is(limit, "criterion", criterion)), after, count, cancellationToken));
    }

    private static async Task<Results<Ok<RevisionListView>, ProblemHttpResult>> ListCertificatesAsync(
        [AsParameters] CertificateFilter filter, HttpRequest http, RevisionDesk desk, CancellationToken cancellationToken)
    {
        QueryReader query = new(http.Query);
        query.Allow("instrument", "after", "count");
        string? instrument = query.Text("instrument");
        (string? after, int count) = (query.Cursor("after"), query.Count("count", RowsByDefault, MaximumRows));
        return query.Findings.Count > 0
            ? Refusals.BadRequest(query.Findings)
            : TypedResults.Ok(await desk.ListAsync(
                LabRecordKind.Certificate, certificate => instrument is null || Is(certificate, "instrument", instrument), after, count, cancellationToken));
    }

    private static bool Is(JsonObject content, string member, string value) => string.Equals(content[member]?.GetValue<string>(), value, StringComparison.Ordinal);
}
