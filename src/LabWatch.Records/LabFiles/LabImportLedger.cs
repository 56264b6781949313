using System.Security.Cryptography;
using System.Text;
using System.Text.Json.Nodes;
using LabWatch.Lab.Time;
using LabWatch.Records.Audit;
using LabWatch.Records.Revisions;
using LabWatch.Records.Storage;
using LabWatch.Records.Storage.Rows;
using Microsoft.EntityFrameworkCore;

namespace LabWatch.Records.LabFiles;

/// <summary>The imported lab files in the records database.</summary>
internal sealed class LabImportLedger(RecordsDatabase database) : ILabImportLedger
{
    public async ValueTask<LabImport?> LatestAsync(string site, CancellationToken cancellationToken)
    {
        LabImportRow? row = await database.ReadAsync(context => Latest(context, site).FirstOrDefaultAsync(cancellationToken), cancellationToken);
        return row is null ? null : ToImport(row);
    }

    public async ValueTask<IReadOnlyList<LabImport>> ListAsync(string site, CancellationToken cancellationToken)
    {
        List<LabImportRow> rows = await database.ReadAsync(
            context => context.LabImports.Where(row => row.Site == site).OrderBy(row => row.Sequence).ToListAsync(cancellationToken), cancellationToken);
        return rows.ConvertAll(ToImport);
    }

    /// <summary>SHA-256 of a file, small hexadecimal digits.</summary>
    internal static string DigestOf(ReadOnlySpan<byte> utf8) => Convert.ToHexStringLower(SHA256.HashData(utf8));

    /// <summary>Adds an import inside the caller's transaction. A file that is the latest import already is not added again.</summary>
    internal static async Task<LabImport> AddAsync(
        RecordsContext context, LabRecordSet records, string digest, LabImportOrder order, LabImportPlan plan, CancellationToken cancellationToken)
    {
        if (records.LatestImport is { } latest && string.Equals(latest.Digest, digest, StringComparison.Ordinal))
        {
            // On record from before the records had revisions.
            return latest;
        }

        LabImportRow row = new()
        {
            Site = records.Site,
            Sequence = (records.LatestImport?.Sequence ?? 0) + 1,
            Digest = digest,
            Document = Encoding.UTF8.GetString(order.Document.Span),
            At = order.At.Microseconds,
            By = order.Author,
            Reason = order.Reason,
        };
        context.LabImports.Add(row);
        JsonObject facts = new() { ["digest"] = digest, ["file"] = order.FileName, ["revisions"] = plan.Revisions.Count, ["accepted"] = plan.ToAccept.Count };
        if (order.Reason is not null)
        {
            facts["reason"] = order.Reason;
        }

        await AuditChain.CoverAsync(context, row, new AuditNote(records.Site, order.At, order.Author, "lab-file-imported", string.Empty, facts, null), cancellationToken);
        return ToImport(row);
    }

    internal static IQueryable<LabImportRow> Latest(RecordsContext context, string site) =>
        context.LabImports.Where(row => row.Site == site).OrderByDescending(row => row.Sequence);

    internal static LabImport ToImport(LabImportRow row) =>
        new(row.Site, row.Sequence, row.Digest, row.Document, new Instant(row.At), row.By) { Reason = row.Reason };
}
