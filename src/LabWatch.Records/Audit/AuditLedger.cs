using System.Text.Json.Nodes;
using LabWatch.Lab.Time;
using LabWatch.Records.Storage;
using LabWatch.Records.Storage.Rows;
using Microsoft.EntityFrameworkCore;

namespace LabWatch.Records.Audit;

/// <summary>The audit trail in the records database.</summary>
internal sealed class AuditLedger(RecordsDatabase database) : IAuditLedger
{
    public async ValueTask AppendAsync(
        IReadOnlyList<AuditNote> notes, (string Reader, long Position)? reader, CancellationToken cancellationToken) =>
        await database.WriteAsync(
            async context =>
            {
                foreach (AuditNote note in notes)
                {
                    await AuditChain.AppendAsync(context, note, cancellationToken);
                }

                if (reader is { } moved)
                {
                    await PositionLedger.MoveAsync(context, moved.Reader, moved.Position, cancellationToken);
                }

                return 0;
            },
            cancellationToken);

    public async ValueTask<AuditPage> ListAsync(AuditQuery query, CancellationToken cancellationToken)
    {
        (List<AuditEntryRow> rows, AuditHead? head) = await database.ReadAsync(
            async context => (
                await Matching(context, query).Take(query.Count + 1).ToListAsync(cancellationToken),
                await AuditChain.HeadAsync(context, query.Site, cancellationToken)),
            cancellationToken);
        long? next = rows.Count > query.Count ? rows[query.Count - 1].Sequence : null;
        return new AuditPage([.. rows.Take(query.Count).Select(ToEntry)], next, head);
    }

    public async ValueTask<AuditHead?> HeadAsync(string site, CancellationToken cancellationToken) =>
        await database.ReadAsync(context => AuditChain.HeadAsync(context, site, cancellationToken).AsTask(), cancellationToken);

    private static IQueryable<AuditEntryRow> Matching(RecordsContext context, AuditQuery query)
    {
        IQueryable<AuditEntryRow> rows = context.AuditEntries.Where(row => row.Site == query.Site);
        if (query.Action is { } action)
        {
            rows = rows.Where(row => row.Action == action);
        }

        if (query.Actor is { } actor)
        {
            rows = rows.Where(row => row.Actor == actor);
        }

        if (query.Subject is { } subject)
        {
            rows = subject.EndsWith('/') ? rows.Where(row => row.Subject.StartsWith(subject)) : rows.Where(row => row.Subject == subject);
        }

        if (query.From is { } from)
        {
            rows = rows.Where(row => row.At >= from.Microseconds);
        }

        if (query.To is { } to)
        {
            rows = rows.Where(row => row.At < to.Microseconds);
        }

        if (query.Before is { } before)
        {
            rows = rows.Where(row => row.Sequence < before);
        }

        return rows.OrderByDescending(row => row.Sequence);
    }

    private static AuditEntry ToEntry(AuditEntryRow row) => new(
        row.Site,
        row.Sequence,
        new Instant(row.At),
        row.Actor,
        row.Action,
        row.Subject,
        JsonNode.Parse(row.Content)!.AsObject(),
        row.RecordDigest is { } digest ? Convert.ToHexStringLower(digest) : null,
        Convert.ToHexStringLower(row.Previous),
        Convert.ToHexStringLower(row.Digest));
}
