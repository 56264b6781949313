using System.Text.Json.Nodes;
using LabWatch.Lab;
using LabWatch.Lab.Findings;
using LabWatch.Lab.LabFile;
using LabWatch.Lab.Time;
using LabWatch.Records;
using LabWatch.Records.Revisions;
using LabWatch.Service.Api.Access;
using LabWatch.Service.Api.Requests;
using LabWatch.Service.Api.Views;
using LabWatch.Service.Hosting;
using Microsoft.AspNetCore.Http.HttpResults;

namespace LabWatch.Service.Api.Configured;

/// <summary>Lists revisions, and records new ones: durable first, then in force at once.</summary>
internal sealed class RevisionDesk(ILabRecords records, ILabSnapshotSource lab, ILabInForce inForce, TimeProvider clock, ILogger<RevisionDesk> log)
{
    /// <summary>One page of the revisions of a kind, newest recorded first.</summary>
    /// <param name="kind">The kind.</param>
    /// <param name="isAsked">Whether a record is asked for, by any of its contents.</param>
    /// <param name="after">Cursor of the page before; null for the first.</param>
    /// <param name="count">Rows on the page.</param>
    /// <param name="cancellationToken">Cancels the read.</param>
    public async Task<RevisionListView> ListAsync(LabRecordKind kind, Func<JsonObject, bool> isAsked, string? after, int count, CancellationToken cancellationToken)
    {
        LabRecordSet set = await records.ReadAsync(lab.Current.Site.Id, cancellationToken);
        long before = PageCursor.TryParse(after, out PageCursor cursor) ? cursor.Number : long.MaxValue;
        HashSet<string> asked = [.. set.Revisions.Where(revision => revision.Kind == kind && revision.Entry is { } entry && isAsked(entry.Content)).Select(revision => revision.Id)];
        RecordRevision[] rows = [.. set.Revisions
            .Where(revision => revision.Kind == kind && asked.Contains(revision.Id) && revision.Sequence < before)
            .OrderByDescending(revision => revision.Sequence)
            .Take(count + 1)];
        IReadOnlySet<(LabRecordKind, string)> now = RevisionViews.InForce(set, lab.Current, Instant.Now(clock));
        return new RevisionListView(
            [.. rows.Take(count).Select(revision => RevisionViews.Of(revision, now))],
            rows.Length > count ? new PageCursor(0, rows[count - 1].Sequence).ToString() : null);
    }

    /// <summary>The instruments with everything recorded of them.</summary>
    public async Task<InstrumentListView> InstrumentsAsync(CancellationToken cancellationToken)
    {
        LabSnapshot site = lab.Current;
        LabRecordSet set = await records.ReadAsync(site.Site.Id, cancellationToken);
        Instant at = Instant.Now(clock);
        IReadOnlySet<(LabRecordKind, string)> now = RevisionViews.InForce(set, site, at);
        return new InstrumentListView([.. site.Instruments.Select(instrument => new InstrumentView(
            instrument.Id,
            instrument.SerialNumber,
            instrument.Description,
            instrument.WithdrawnFrom,
            [.. site.Installations
                .Where(stay => string.Equals(stay.Instrument, instrument.Id, StringComparison.Ordinal))
                .OrderBy(stay => stay.From)
                .Select(stay => new StayView(stay.Channel.Source.ToString(), stay.Channel.Channel, stay.From, stay.Until))],
            [.. site.Certificates.Where(certificate => string.Equals(certificate.Instrument, instrument.Id, StringComparison.Ordinal)).Select(certificate => certificate.Reference)],
            RevisionViews.CertificateInForce(site, instrument.Id, at)?.Reference,
            [.. set.Revisions
                .Where(revision => IsOf(revision, instrument.Id))
                .OrderByDescending(revision => revision.Sequence)
                .Select(revision => RevisionViews.Of(revision, now))]))]);
    }

    /// <summary>Records a revision, and puts it in force.</summary>
    public async Task<Results<Created<RevisionView>, Ok<RevisionView>, ProblemHttpResult>> ReviseAsync(
        LabRecordKind kind, HttpContext http, CancellationToken cancellationToken)
    {
        (JsonObject? content, string reason, IReadOnlyList<Finding> findings) = await RevisionBody.ReadAsync(http.Request, cancellationToken);
        if (content is null)
        {
            return Refusals.BadRequest(findings);
        }

        string site = lab.Current.Site.Id;
        RevisionOutcome outcome = await records.ReviseAsync(
            new RevisionOrder(site, kind, content, Caller.Of(http).Name, reason, Instant.Now(clock)), cancellationToken);
        if (outcome.Findings.Count > 0)
        {
            return Refusals.BadRequest(outcome.Findings);
        }

        if (outcome.Conflict is { } conflict)
        {
            return Refusals.Conflict(conflict.Code, conflict.Message, conflict.Value, conflict.Cure);
        }

        // The reader has accepted the whole; a finding here would be a defect, and the records keep the revision in any case.
        foreach (Finding finding in inForce.Adopt(outcome.Records!))
        {
            ApiLog.NotInForce(log, finding);
        }

        RevisionView view = RevisionViews.Of(outcome.Revision!, RevisionViews.InForce(outcome.Records!, lab.Current, Instant.Now(clock)));
        return outcome.IsNew ? TypedResults.Created((string?)null, view) : TypedResults.Ok(view);
    }

    private static bool IsOf(RecordRevision revision, string instrument) => revision.Kind switch
    {
        LabRecordKind.Instrument => string.Equals(revision.Id, instrument, StringComparison.Ordinal),
        LabRecordKind.Installation => revision.Id.StartsWith(instrument + "/", StringComparison.Ordinal),
        _ => false,
    };
}
