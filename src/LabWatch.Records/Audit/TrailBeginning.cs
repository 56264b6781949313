using System.Text.Json.Nodes;
using LabWatch.Lab.Time;
using LabWatch.Records.Audit.Covered;
using LabWatch.Records.Storage;
using LabWatch.Records.Storage.Rows;
using Microsoft.EntityFrameworkCore;

namespace LabWatch.Records.Audit;

/// <summary>
/// Begins to cover tables that hold rows already: an upgrade from a version that had no trail, or a table that a version covers newly.
/// Their rows get entries of their own, marked as chained later, because the trail cannot tell what became of them before.
/// </summary>
internal sealed class TrailBeginning(RecordsContexts contexts, TimeProvider clock)
{
    private const int Batch = 500;

    /// <summary>Covers what is not covered yet, inside the transaction of <paramref name="context"/>.</summary>
    public async Task RunAsync(RecordsContext context, CancellationToken cancellationToken)
    {
        if (contexts.IsSqlite)
        {
            await AppendOnlyGuard.MakeAsync(context, cancellationToken);
        }

        HashSet<string> begun = [.. await context.Positions.Select(row => row.Reader).ToListAsync(cancellationToken)];
        foreach (CoveredTable table in CoveredTables.All)
        {
            string marker = "trail/" + CoveredColumns.TableName(context, table);
            if (!begun.Contains(marker))
            {
                await CoverAsync(context, table, cancellationToken);
                await PositionLedger.MoveAsync(context, marker, 1, cancellationToken);
                await context.SaveChangesAsync(cancellationToken);
            }
        }
    }

    private async Task CoverAsync(RecordsContext context, CoveredTable table, CancellationToken cancellationToken)
    {
        HashSet<(string Site, string Subject)> chained = await ChainedAsync(context, table, cancellationToken);
        HashSet<string> begun = [];
        string name = CoveredColumns.TableName(context, table);
        int waiting = 0;
        await using RecordsContext reading = contexts.Create();
        await foreach (object row in table.Rows(reading).WithCancellation(cancellationToken))
        {
            (string site, string subject, string digest) = CoveredRow.Describe(context, row);
            if (chained.Contains((site, subject)))
            {
                continue;
            }

            if (begun.Add(site))
            {
                await AuditChain.AppendAsync(context, Note(site, AuditActions.ChainBegun, "table/" + name, null), cancellationToken);
            }

            await AuditChain.AppendAsync(context, Note(site, AuditActions.ChainedLater, subject, digest), cancellationToken);
            if (++waiting % Batch == 0)
            {
                await context.SaveChangesAsync(cancellationToken);
                context.ChangeTracker.Clear();
            }
        }
    }

    private static async Task<HashSet<(string Site, string Subject)>> ChainedAsync(
        RecordsContext context, CoveredTable table, CancellationToken cancellationToken)
    {
        HashSet<(string, string)> chained = [];
        IQueryable<AuditEntryRow> entries = context.AuditEntries.Where(row => row.RecordDigest != null && row.Subject.StartsWith(table.Prefix));
        await foreach (var entry in entries.Select(row => new { row.Site, row.Subject }).AsAsyncEnumerable().WithCancellation(cancellationToken))
        {
            chained.Add((entry.Site, entry.Subject));
        }

        return chained;
    }

    private AuditNote Note(string site, string action, string subject, string? digest) =>
        new(site, Instant.Now(clock), AuditActor.Service, action, subject, new JsonObject(), digest);
}
