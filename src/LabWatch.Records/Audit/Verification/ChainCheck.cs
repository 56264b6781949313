using System.Runtime.Intrinsics;

namespace LabWatch.Records.Audit.Verification;

/// <summary>Checks each chain from its first entry to its last: digests, numbers, links.</summary>
internal sealed class ChainCheck(TrailFacts facts, TrailFindings findings)
{
    private const string Altered = "The entry was altered after it was written, by a person or by a fault of the disk.";

    /// <summary>Checks, and gives the last entry of each site.</summary>
    public Dictionary<string, AuditHead> Run()
    {
        int[] order = Order();
        Dictionary<string, AuditHead> heads = new(StringComparer.Ordinal);
        for (int i = 0; i < order.Length; i++)
        {
            ref EntryFacts entry = ref facts.Entries[order[i]];
            bool isFirst = i == 0 || facts.Entries[order[i - 1]].Site != entry.Site;
            bool isLast = i == order.Length - 1 || facts.Entries[order[i + 1]].Site != entry.Site;
            CheckDigest(order[i], isFirst ? -1 : order[i - 1], isLast ? -1 : order[i + 1]);
            CheckNumber(entry, isFirst ? 0 : facts.Entries[order[i - 1]].Sequence);
            if (isLast)
            {
                heads[facts.Sites[entry.Site]] = new AuditHead(entry.Sequence, Hex(entry.Digest));
            }
        }

        for (int i = 0; i < order.Length; i++)
        {
            CheckLink(order[i], i == 0 ? -1 : order[i - 1]);
        }

        return heads;
    }

    private int[] Order()
    {
        Span<EntryFacts> entries = facts.Entries;
        int[] order = new int[entries.Length];
        bool isSorted = true;
        for (int i = 0; i < order.Length; i++)
        {
            order[i] = i;
            isSorted &= i == 0 || (entries[i - 1].Site, entries[i - 1].Sequence).CompareTo((entries[i].Site, entries[i].Sequence)) <= 0;
        }

        if (!isSorted)
        {
            Array.Sort(order, (left, right) =>
                (facts.Entries[left].Site, facts.Entries[left].Sequence, left).CompareTo((facts.Entries[right].Site, facts.Entries[right].Sequence, right)));
        }

        return order;
    }

    private void CheckDigest(int place, int before, int after)
    {
        ref EntryFacts entry = ref facts.Entries[place];
        if (!entry.IsAltered)
        {
            return;
        }

        // The entry after remembers the digest that this one had: it tells which of the two, content or digest, was altered.
        bool isDigest = after >= 0 && facts.Entries[after].Previous == facts.Computed[place];
        bool isPrevious = !isDigest && before >= 0 && facts.Entries[before].Digest != entry.Previous && !facts.Entries[before].IsAltered;
        Report(ref entry, TrailCodes.EntryAltered, isDigest ? "digest" : isPrevious ? "previous" : null, "The digest is not that of the entry.", Altered);
    }

    private void CheckNumber(in EntryFacts entry, long before)
    {
        if (entry.Sequence == before)
        {
            Add(entry, TrailCodes.EntryTwice, "sequence", "The number stands twice in the chain.", "An entry was added beside the chain.");
        }
        else if (unchecked(entry.Sequence - before) != 1)
        {
            Add(
                entry, TrailCodes.EntriesMissing, null, FormattableString.Invariant($"The entry before it has the number {before}."),
                FormattableString.Invariant($"Entries {unchecked(before + 1)} to {unchecked(entry.Sequence - 1)} were removed, or numbers were altered."));
        }
    }

    private void CheckLink(int place, int before)
    {
        ref EntryFacts entry = ref facts.Entries[place];
        bool isFirst = before < 0 || facts.Entries[before].Site != entry.Site;
        Vector256<byte> expected = isFirst ? Vector256<byte>.Zero : facts.Entries[before].Digest;
        long number = isFirst ? 0 : facts.Entries[before].Sequence;
        bool isTold = entry.IsReported || unchecked(entry.Sequence - number) != 1 || (!isFirst && facts.Entries[before].IsReported);
        if (isTold || entry.Previous == expected)
        {
            return;
        }

        Report(
            ref entry, TrailCodes.LinkBroken, "previous",
            isFirst ? "The first entry does not begin a chain." : FormattableString.Invariant($"It was chained to another entry {number} than the one that stands there."),
            isFirst ? "Entries before it were removed." : FormattableString.Invariant($"Entry {number} or this one was replaced by another that has a right digest, or entries between them were removed."));
    }

    private void Report(ref EntryFacts entry, string code, string? field, string message, string meaning)
    {
        entry.IsReported = true;
        Add(entry, code, field, message, meaning);
    }

    private void Add(in EntryFacts entry, string code, string? field, string message, string meaning) => findings.Add(
        new TrailFinding(code, "audit_entries", FormattableString.Invariant($"{facts.Sites[entry.Site]} {entry.Sequence}"), field, message, meaning));

    /// <summary>A digest as small hexadecimal digits.</summary>
    public static string Hex(Vector256<byte> digest)
    {
        Span<byte> bytes = stackalloc byte[Vector256<byte>.Count];
        digest.CopyTo(bytes);
        return Convert.ToHexStringLower(bytes);
    }
}
