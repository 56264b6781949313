using System.Buffers;
using System.Runtime.Intrinsics;
using System.Security.Cryptography;
using System.Text;

namespace LabWatch.Records.Audit.Verification;

/// <summary>Reads every entry once: each must have the digest of its own content.</summary>
internal sealed class EntryScan(RecordsSnapshot records, TrailFacts facts, TrailFindings findings)
{
    private const string Columns = "site, sequence, at, actor, action, subject, content, record_digest, previous, digest";

    private static readonly CellKind[] Kinds =
    [
        CellKind.Text, CellKind.Whole, CellKind.Whole, CellKind.Text, CellKind.Text, CellKind.Text, CellKind.Text, CellKind.Bytes, CellKind.Bytes, CellKind.Bytes,
    ];

    private static readonly string[] Names = Columns.Split(", ");

    private readonly ArrayBufferWriter<byte> _canonical = new(4096);

    /// <summary>Called with subject and content of each entry that covers a record, and its place among the facts.</summary>
    public EntryListener? OnEntry { get; init; }

    /// <summary>Reads them all; what can be read stays in the facts where a page is damaged.</summary>
    public void Run(Action<long> progress)
    {
        long count = 0;
        string? damage = records.Walk(Columns, "audit_entries", scan =>
        {
            Take(scan);
            if (++count % 16_384 == 0)
            {
                progress(count);
            }
        });
        if (damage is not null)
        {
            findings.Add(Unreadable.Table("audit_entries", damage));
        }

        progress(count);
    }

    private void Take(TableScan scan)
    {
        if (!HasForm(scan, out int wrong))
        {
            ReportForm(scan, wrong);
            return;
        }

        CanonicalEntry entry = new()
        {
            Site = scan.Bytes(0),
            Sequence = scan.Whole(1),
            At = scan.Whole(2),
            Actor = scan.Bytes(3),
            Action = scan.Bytes(4),
            Subject = scan.Bytes(5),
            Content = scan.Bytes(6),
            RecordDigest = scan.Bytes(7),
            Previous = scan.Bytes(8),
        };
        _canonical.ResetWrittenCount();
        entry.Write(_canonical);
        Span<byte> computed = stackalloc byte[SHA256.HashSizeInBytes];
        SHA256.HashData(_canonical.WrittenSpan, computed);
        Vector256<byte> right = Vector256.Create<byte>(computed);
        Vector256<byte> digest = Vector256.Create(scan.Bytes(9));
        EntryFacts read = new()
        {
            Site = facts.SiteNumber(entry.Site),
            Sequence = entry.Sequence,
            Digest = digest,
            Previous = Vector256.Create(entry.Previous),
            IsAltered = digest != right,
            HasRecord = !entry.RecordDigest.IsEmpty,
            Record = entry.RecordDigest.IsEmpty ? default : Vector256.Create(entry.RecordDigest),
        };
        int place = facts.Entries.Length;
        facts.Add(read, entry.Subject);
        if (read.IsAltered)
        {
            facts.Computed[place] = right;
        }

        if (read.HasRecord || !read.IsAltered)
        {
            OnEntry?.Invoke(place, entry.Subject, entry.Content);
        }
    }

    private static bool HasForm(TableScan scan, out int wrong)
    {
        for (int i = 0; i < Kinds.Length; i++)
        {
            CellKind kind = scan.Kind(i);
            bool isRight = kind == Kinds[i] ? kind is not CellKind.Bytes || scan.Bytes(i).Length == SHA256.HashSizeInBytes : i == 7 && kind is CellKind.Null;
            if (!isRight)
            {
                wrong = i;
                return false;
            }
        }

        wrong = -1;
        return true;
    }

    private void ReportForm(TableScan scan, int wrong)
    {
        string site = scan.Kind(0) is CellKind.Text ? Encoding.UTF8.GetString(scan.Bytes(0)) : "(unknown site)";
        string number = scan.Kind(1) is CellKind.Whole ? FormattableString.Invariant($"{scan.Whole(1)}") : "(unknown number)";
        findings.Add(new TrailFinding(
            TrailCodes.EntryAltered, "audit_entries", $"{site} {number}", Names[wrong], "The entry holds a value of another kind than it was written with.",
            "The entry was altered after it was written, by a person or by a fault of the disk."));
    }
}
