using LabWatch.Records.Audit.Covered;
using Microsoft.EntityFrameworkCore;

namespace LabWatch.Records.Audit.Verification;

/// <summary>Verifies the records against the chains, in steps: the trail, the covered tables, the noted ends, what is left over.</summary>
internal sealed class TrailVerifier(RecordsSnapshot records, TrailFindings findings)
{
    /// <summary>The entries, once they are read.</summary>
    public TrailFacts Facts { get; } = new();

    /// <summary>
    /// Why the database cannot be verified by this program at all, in words: another schema, or no trail in it. Null where it can.
    /// Throws <see cref="UnreadableException"/> where not even that can be read.
    /// </summary>
    public string? Unfit()
    {
        HashSet<string> applied = new(StringComparer.Ordinal);
        using (TableScan scan = records.Scan("SELECT \"MigrationId\" FROM \"__EFMigrationsHistory\""))
        {
            while (scan.Read())
            {
                applied.Add(System.Text.Encoding.UTF8.GetString(scan.Bytes(0)));
            }
        }

        HashSet<string> known = [.. records.Model.Database.GetMigrations()];
        return applied.SetEquals(known) ? null
            : applied.IsSubsetOf(known) ? "The records have the schema of an older version; the service brings them up to date when this version starts once."
            : "The records have the schema of another or newer version; verify them with that version.";
    }

    /// <summary>Reads every entry and checks every chain. Gives the last entry of each site.</summary>
    public IReadOnlyDictionary<string, AuditHead> ReadTrail(EntryListener? listener, Action<string, long> progress)
    {
        new EntryScan(records, Facts, findings) { OnEntry = listener }.Run(count => progress("audit_entries", count));
        return new ChainCheck(Facts, findings).Run();
    }

    /// <summary>Checks every row of every covered table, and what is derived from them.</summary>
    public void CheckTables(Action<string, long> progress)
    {
        foreach (CoveredTable table in CoveredTables.All)
        {
            string name = CoveredColumns.TableName(records.Model, table);
            new CoveredScan(records, Facts, findings, table).Run(count => progress(name, count));
        }

        new DerivedCheck(records, findings).Run();
    }

    /// <summary>Whether a noted end stands in a chain, and where not a finding.</summary>
    /// <param name="site">The site; null where the note does not say.</param>
    /// <param name="noted">The noted end.</param>
    /// <param name="keptIn">Where it was kept.</param>
    public void CheckHead(string? site, AuditHead noted, string keptIn)
    {
        long last = 0;
        foreach (ref readonly EntryFacts entry in Facts.Entries)
        {
            if (site is not null && Facts.Sites[entry.Site] != site)
            {
                continue;
            }

            last = Math.Max(last, entry.Sequence);
            if (entry.Sequence == noted.Sequence && ChainCheck.Hex(entry.Digest) == noted.Digest)
            {
                return;
            }
        }

        string id = site is null ? FormattableString.Invariant($"{noted.Sequence}") : FormattableString.Invariant($"{site} {noted.Sequence}");
        findings.Add(new TrailFinding(
            TrailCodes.HeadDiffers, "audit_entries", id, null,
            last < noted.Sequence
                ? FormattableString.Invariant($"The chain ends at entry {last}, before the end that was noted in {keptIn}.")
                : FormattableString.Invariant($"Entry {noted.Sequence} has another digest than was noted in {keptIn}."),
            last < noted.Sequence
                ? "Entries were cut from its end, or the database was restored from an older copy."
                : "The chain was written anew from that entry or from one before it."));
    }

    /// <summary>Reports entries without their record. Gives the number of those whose kind of record this program does not know.</summary>
    /// <param name="otherTables">Tables outside the records, by what their subjects begin with.</param>
    /// <param name="nameOf">Name of a record for a reader, from the place of its entry and its subject.</param>
    public long CheckUnclaimed(IReadOnlyDictionary<string, string> otherTables, Func<int, string, string> nameOf) =>
        new UnclaimedCheck(records, Facts, findings).Run(otherTables, nameOf);
}
