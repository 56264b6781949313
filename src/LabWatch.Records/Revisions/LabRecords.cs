using LabWatch.Lab.Findings;
using LabWatch.Lab.LabFile;
using LabWatch.Records.LabFiles;
using LabWatch.Records.Storage;
using LabWatch.Records.Storage.Rows;
using Microsoft.EntityFrameworkCore;

namespace LabWatch.Records.Revisions;

/// <summary>The versioned records in the records database.</summary>
internal sealed class LabRecords(RecordsDatabase database) : ILabRecords
{
    public async ValueTask<IReadOnlyList<string>> SitesAsync(CancellationToken cancellationToken) =>
        await database.ReadAsync(context => context.Revisions.Select(row => row.Site).Distinct().Order().ToListAsync(cancellationToken), cancellationToken);

    public ValueTask<long> HeadAsync(string site, CancellationToken cancellationToken) =>
        database.ReadAsync(
            async context => await context.Revisions.Where(row => row.Site == site).MaxAsync(row => (long?)row.Sequence, cancellationToken) ?? 0, cancellationToken);

    public ValueTask<LabRecordSet> ReadAsync(string site, CancellationToken cancellationToken) =>
        database.ReadAsync(context => ReadAsync(context, site, cancellationToken), cancellationToken);

    public async ValueTask<LabImportOutcome> ImportAsync(LabImportOrder order, CancellationToken cancellationToken)
    {
        ArgumentNullException.ThrowIfNull(order);
        LabFileResult alone = LabFileReader.Read(order.Document);
        if (alone.Findings.Any(finding => !MayBeOnRecord(finding)))
        {
            return Refuse(LabImportPlan.Refused(alone.Findings));
        }

        string site = LabDocument.Parse(order.Document)["site"]!["id"]!.GetValue<string>();
        string digest = LabImportLedger.DigestOf(order.Document.Span);
        return order.DryRun
            ? Look(await ReadAsync(site, cancellationToken), order, digest)
            : await database.WriteAsync(context => ImportAsync(context, site, digest, order, cancellationToken), cancellationToken);
    }

    public ValueTask<RevisionOutcome> ReviseAsync(RevisionOrder order, CancellationToken cancellationToken)
    {
        ArgumentNullException.ThrowIfNull(order);
        return database.WriteAsync(
            async context =>
            {
                RevisionOutcome outcome = RevisionPlanner.Plan(await ReadAsync(context, order.Site, cancellationToken), order);
                if (outcome is { IsNew: true, Revision: { } revision })
                {
                    await RevisionWriting.AddAsync(context, [revision], cancellationToken);
                }

                return outcome;
            },
            cancellationToken);
    }

    /// <summary>What a file may refer to though it does not have it: a channel, band or source of earlier times.</summary>
    private static bool MayBeOnRecord(Finding finding) => finding.Code is "unknown-reference" or "unit-mismatch";

    private static LabImportOutcome Look(LabRecordSet records, LabImportOrder order, string digest)
    {
        LabImportPlan plan = IsInForce(records, digest) ? new LabImportPlan([], [], [], []) : LabImportPlanner.Plan(records, order, digest);
        return new LabImportOutcome(plan, Refusal(plan, order), null, null);
    }

    private static async Task<LabImportOutcome> ImportAsync(
        RecordsContext context, string site, string digest, LabImportOrder order, CancellationToken cancellationToken)
    {
        LabRecordSet records = await ReadAsync(context, site, cancellationToken);
        if (IsInForce(records, digest))
        {
            return new LabImportOutcome(new LabImportPlan([], [], [], []), [], records.LatestImport, records);
        }

        LabImportPlan plan = LabImportPlanner.Plan(records, order, digest);
        if (Refusal(plan, order).Count > 0)
        {
            return Refuse(plan, order);
        }

        LabImport import = await LabImportLedger.AddAsync(context, records, digest, order, plan, cancellationToken);
        await RevisionWriting.AddAsync(context, plan.Revisions, cancellationToken);
        return new LabImportOutcome(plan, [], import, records with { Revisions = [.. records.Revisions, .. plan.Revisions], LatestImport = import });
    }

    private static bool IsInForce(LabRecordSet records, string digest) =>
        records.Revisions.Count > 0 && string.Equals(records.LatestImport?.Digest, digest, StringComparison.Ordinal);

    private static IReadOnlyList<Finding> Refusal(LabImportPlan plan, LabImportOrder order) =>
        plan.Findings.Count > 0 ? plan.Findings : order.Accept ? [] : plan.ToAccept;

    private static LabImportOutcome Refuse(LabImportPlan plan, LabImportOrder? order = null) =>
        new(plan, order is null ? plan.Findings : Refusal(plan, order), null, null);

    private static async Task<LabRecordSet> ReadAsync(RecordsContext context, string site, CancellationToken cancellationToken)
    {
        List<RevisionRow> rows = await context.Revisions.AsNoTracking().Where(row => row.Site == site).OrderBy(row => row.Sequence).ToListAsync(cancellationToken);
        LabImportRow? latest = await LabImportLedger.Latest(context, site).AsNoTracking().FirstOrDefaultAsync(cancellationToken);
        return new LabRecordSet(site, rows.ConvertAll(RevisionWriting.ToRevision), latest is null ? null : LabImportLedger.ToImport(latest));
    }
}
