using LabWatch.Records.Storage;
using Microsoft.EntityFrameworkCore;

namespace LabWatch.Records.Audit.Covered;

/// <summary>
/// Triggers of the SQLite file that refuse to change or delete rows of tables that are only added to: a guard against mistakes. Whoever
/// can write the file can remove them; the trail is what shows that.
/// </summary>
internal static class AppendOnlyGuard
{
    /// <summary>Makes the triggers where they are missing.</summary>
    public static async Task MakeAsync(RecordsContext context, CancellationToken cancellationToken)
    {
        IEnumerable<string> covered = CoveredTables.All.Where(table => table.IsAppendOnly).Select(table => CoveredColumns.TableName(context, table));
        foreach (string table in covered.Append("audit_entries"))
        {
            foreach (string change in (string[])["UPDATE", "DELETE"])
            {
                string trigger = $"""
                    CREATE TRIGGER IF NOT EXISTS "{table}_refuse_{change.ToLowerInvariant()}" BEFORE {change} ON "{table}"
                    BEGIN SELECT RAISE(ABORT, 'Rows of {table} are only ever added.'); END;
                    """;
                await context.Database.ExecuteSqlRawAsync(trigger, cancellationToken);
            }
        }
    }
}
