using System.Security.Cryptography;
using System.Text;
using LabWatch.Lab.Time;
using LabWatch.Records.Storage;
using LabWatch.Records.Storage.Rows;
using Microsoft.EntityFrameworkCore;

namespace LabWatch.Records.LabFiles;

/// <summary>The imported lab files in the records database.</summary>
internal sealed class LabImportLedger(RecordsDatabase database) : ILabImportLedger
{
    public ValueTask<LabImport> RecordAsync(string site, string document, Instant at, string by, CancellationToken cancellationToken)
    {
        string digest = Convert.ToHexStringLower(SHA256.HashData(Encoding.UTF8.GetBytes(document)));
        return database.WriteAsync(
            async context =>
            {
                LabImportRow? latest = await Latest(context, site).FirstOrDefaultAsync(cancellationToken);
                if (latest is not null && string.Equals(latest.Digest, digest, StringComparison.Ordinal))
                {
                    return ToImport(latest);
                }

                LabImportRow row = new()
                {
                    Site = site,
                    Sequence = (latest?.Sequence ?? 0) + 1,
                    Digest = digest,
                    Document = document,
                    At = at.Microseconds,
                    By = by,
                };
                context.LabImports.Add(row);
                return ToImport(row);
            },
            cancellationToken);
    }

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

    private static IQueryable<LabImportRow> Latest(RecordsContext context, string site) =>
        context.LabImports.Where(row => row.Site == site).OrderByDescending(row => row.Sequence);

    private static LabImport ToImport(LabImportRow row) =>
        new(row.Site, row.Sequence, row.Digest, row.Document, new Instant(row.At), row.By);
}
