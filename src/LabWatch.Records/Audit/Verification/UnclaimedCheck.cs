using System.Globalization;
using System.Text;
using LabWatch.Records.Audit.Covered;

namespace LabWatch.Records.Audit.Verification;

/// <summary>Every entry that covers a record must have found it.</summary>
internal sealed class UnclaimedCheck(RecordsSnapshot records, TrailFacts facts, TrailFindings findings)
{
    private const string Gone = "The record was removed after it was recorded, or what names it was altered.";

    /// <summary>Reports entries without their record. Gives the number of entries whose kind of record this program does not know.</summary>
    /// <param name="otherTables">Tables outside the records, by what their subjects begin with.</param>
    /// <param name="nameOf">Name of a record for a reader, from the place of its entry and its subject.</param>
    public long Run(IReadOnlyDictionary<string, string> otherTables, Func<int, string, string> nameOf)
    {
        long unknown = 0;
        for (int place = 0; place < facts.Entries.Length; place++)
        {
            EntryFacts entry = facts.Entries[place];
            if (!entry.HasRecord || entry.IsClaimed)
            {
                continue;
            }

            if (!findings.Keeps(TrailCodes.RowMissing))
            {
                findings.Count(TrailCodes.RowMissing);
                continue;
            }

            string subject = SubjectOf(facts.Sites[entry.Site], entry.Sequence);
            if (TableOf(subject, otherTables) is { } table)
            {
                findings.Add(new TrailFinding(
                    TrailCodes.RowMissing, table, nameOf(place, subject), null, FormattableString.Invariant($"Entry {entry.Sequence} tells of the record, and it is not there."), Gone));
            }
            else
            {
                unknown++;
            }
        }

        return unknown;
    }

    private string? TableOf(string subject, IReadOnlyDictionary<string, string> otherTables)
    {
        CoveredTable[] candidates = [.. CoveredTables.All.Where(candidate => subject.StartsWith(candidate.Prefix, StringComparison.Ordinal))];
        CoveredTable? table = candidates.Length > 1
            ? candidates.FirstOrDefault(candidate => subject.Count(letter => letter == '/') == candidate.Template.Count(letter => letter == '/'))
            : candidates.FirstOrDefault();
        return table is not null ? CoveredColumns.TableName(records.Model, table)
            : otherTables.FirstOrDefault(other => subject.StartsWith(other.Key, StringComparison.Ordinal)).Value;
    }

    private string SubjectOf(string site, long sequence)
    {
        try
        {
            using TableScan scan = records.Scan(
                $"SELECT subject FROM audit_entries WHERE site = '{site.Replace("'", "''", StringComparison.Ordinal)}' AND sequence = {sequence.ToString(CultureInfo.InvariantCulture)}");
            return scan.Read() && scan.Kind(0) is CellKind.Text ? Encoding.UTF8.GetString(scan.Bytes(0)) : string.Empty;
        }
        catch (UnreadableException)
        {
            return string.Empty;
        }
    }
}
