using System.Runtime.Intrinsics;
using System.Security.Cryptography;
using System.Text;
using LabWatch.Evidence.Recording;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Time;
using LabWatch.Readings;
using LabWatch.Readings.Blocks;
using LabWatch.Records.Audit.Verification;

namespace LabWatch.Evidence.Verification;

/// <summary>Checks every sealed part of every source-hour: its bytes against the trail, its columns and its summary against its bytes.</summary>
internal sealed class HourCheck(ISealedParts file, TrailFacts facts, IReadOnlyDictionary<int, HourFacts> told, IReadOnlySet<(string Before, string After)> removals, TrailFindings findings)
{
    private const string Altered = "The sealed readings or what is kept about them were altered, by a person or by a fault of the disk; assessments made from this hour cannot be relied on.";

    private readonly Dictionary<long, (long Right, long Wrong, SourceKey Inside)> _named = [];

    /// <summary>Sealed parts that were examined.</summary>
    public long Parts { get; private set; }

    /// <summary>Parts that were sealed after the last entry about one: the service enters them within seconds when it runs.</summary>
    public long Pending { get; private set; }

    /// <summary>Parts of which readings were removed as the trail says.</summary>
    public long Thinned { get; private set; }

    /// <summary>Readings that were decoded.</summary>
    public long Readings { get; private set; }

    /// <summary>What a part is called in findings: its subject in the trail and its seal, the number of its row.</summary>
    public static string NameOf(string subject, long seal) => FormattableString.Invariant($"{subject} (seal {seal})").TrimStart();

    /// <summary>Checks them all.</summary>
    public void Run(Action<long> progress)
    {
        Dictionary<long, SourceKey> sources = file.Sources(out string? damage);
        Report("source", damage);
        List<StoredPart> parts = file.Parts(out damage, out List<long> odd);
        Report("block", damage);
        HashSet<long> summaries = file.Summaries(out damage);
        Report("summary", damage);
        foreach (long id in odd)
        {
            Add(TrailCodes.BlockAltered, "block", NameOf(string.Empty, id), null, "The row holds a value of another kind than it was written with.");
        }

        long last = told.Values.Select(one => one.Seal).DefaultIfEmpty(0).Max();
        foreach (StoredPart part in parts)
        {
            Examine(part, sources.TryGetValue(part.SourceId, out SourceKey source) ? source : null, last, summaries.Remove(part.Id));
            progress(++Parts);
        }

        foreach (long orphan in summaries)
        {
            Add(TrailCodes.SummaryDiffers, "summary", NameOf(string.Empty, orphan), null, "There is no sealed part that the summary belongs to.");
        }

        ReportSources(sources);
    }

    private void Examine(StoredPart part, SourceKey? named, long last, bool hasSummary)
    {
        (byte[]? data, string? unreadable) = Data("block", "id", part.Id);
        if (data is not null && part.Digest.Length == SHA256.HashSizeInBytes && removals.Contains((Convert.ToHexStringLower(part.Digest), Convert.ToHexStringLower(SHA256.HashData(data)))))
        {
            ExamineThinned(part, named, data);
            return;
        }

        (SealedBlock? block, List<ReadingSeries> series, string? reason) = data is null ? (null, [], unreadable) : BlockExaminer.Decode(data);
        Readings += block?.Readings ?? 0;
        // What stands inside the sealed bytes is what their digest proves; the columns only say it again.
        SourceKey source = block?.Header.Source ?? named ?? default;
        string subject = HourNote.Subject(source, new Instant(block?.Header.Hour ?? part.Hour), block?.Header.Part ?? unchecked((int)part.Part));
        string where = NameOf(subject, part.Id);
        byte[] digest = SHA256.HashData(data ?? []);
        int place = facts.Find(Encoding.UTF8.GetBytes(source.Site ?? string.Empty), Encoding.UTF8.GetBytes(subject));
        if (block is not null)
        {
            CompareColumns(part, block, named, where);
        }

        if (place < 0)
        {
            Uncovered(part, where, last, reason);
        }
        else
        {
            Covered(part, place, where, digest, data is null ? unreadable : reason);
        }

        if (block is not null)
        {
            CheckSummary(part, series, block.Header.Hour, where, hasSummary);
        }
    }

    /// <summary>What is left is proved by the entry about the removal; that it was sealed, by the entry about the hour and the digest kept beside.</summary>
    private void ExamineThinned(StoredPart part, SourceKey? named, byte[] data)
    {
        Thinned++;
        SealedBlock? block = data.Length == 0 ? null : BlockExaminer.Decode(data).Block;
        SourceKey source = block?.Header.Source ?? named ?? default;
        string subject = HourNote.Subject(source, new Instant(part.Hour), unchecked((int)part.Part));
        string where = NameOf(subject, part.Id);
        Readings += block?.Readings ?? 0;
        int place = facts.Find(Encoding.UTF8.GetBytes(source.Site ?? string.Empty), Encoding.UTF8.GetBytes(subject));
        if (place < 0)
        {
            Add(TrailCodes.RowAdded, "block", where, null, "No entry of the trail tells of the sealed part.");
            return;
        }

        ref EntryFacts entry = ref facts.Entries[place];
        if (entry.IsClaimed)
        {
            Add(TrailCodes.RowAdded, "block", where, null, "The sealed part is there a second time.");
        }
        else if (entry.Record != Vector256.Create(part.Digest))
        {
            Add(TrailCodes.BlockAltered, "block", where, "digest", "The digest kept of the sealed part is not the one that was recorded.");
        }

        entry.IsClaimed = true;
        CompareFacts(part, place, where);
        if (told.TryGetValue(place, out HourFacts fact))
        {
            Compare(where, "readings", part.Readings, fact.Readings);
        }
    }

    private void Uncovered(StoredPart part, string where, long last, string? reason)
    {
        if (reason is not null)
        {
            Add(TrailCodes.BlockAltered, "block", where, "data", "The sealed bytes do not decode: " + reason);
        }
        else if (part.Id > last)
        {
            Pending++;
        }
        else
        {
            Add(TrailCodes.RowAdded, "block", where, null, "No entry of the trail tells of the sealed part.");
        }
    }

    private void Covered(StoredPart part, int place, string where, byte[] digest, string? reason)
    {
        ref EntryFacts entry = ref facts.Entries[place];
        if (entry.IsClaimed)
        {
            Add(TrailCodes.RowAdded, "block", where, null, "The sealed part is there a second time.");
        }
        else if (reason is not null && entry.Record != Vector256.Create(digest))
        {
            Add(TrailCodes.BlockAltered, "block", where, "data", "The sealed bytes are not those that were recorded, and do not decode: " + reason);
        }
        else if (entry.Record != Vector256.Create(digest))
        {
            Add(TrailCodes.BlockAltered, "block", where, "data", "The sealed bytes do not have the digest that was recorded.");
        }
        else if (!part.Digest.AsSpan().SequenceEqual(digest))
        {
            Add(TrailCodes.BlockAltered, "block", where, "digest", "The digest beside the sealed bytes is not theirs.");
        }

        entry.IsClaimed = true;
        CompareFacts(part, place, where);
    }

    private void CompareFacts(StoredPart part, int place, string where)
    {
        if (told.TryGetValue(place, out HourFacts fact))
        {
            Compare(where, "id", part.Id, fact.Seal);
            Compare(where, "last_change", part.LastChange, fact.LastChange);
            Compare(where, "sealed_at", part.SealedAt, fact.SealedAt);
        }
    }

    private void CompareColumns(StoredPart part, SealedBlock block, SourceKey? named, string where)
    {
        (long right, long wrong, _) = _named.GetValueOrDefault(part.SourceId);
        bool isRight = named == block.Header.Source;
        _named[part.SourceId] = (right + (isRight ? 1 : 0), wrong + (isRight ? 0 : 1), block.Header.Source);
        if (!isRight)
        {
            string other = named is { } key ? key.ToString() : "none";
            Add(TrailCodes.BlockAltered, "block", where, "source_id", $"The column names the source {other}, the sealed bytes {block.Header.Source}.");
        }

        Compare(where, "hour", part.Hour, block.Header.Hour);
        Compare(where, "part", part.Part, block.Header.Part);
        Compare(where, "readings", part.Readings, block.Readings);
    }

    private void CheckSummary(StoredPart part, List<ReadingSeries> series, long hour, string where, bool hasSummary)
    {
        (byte[]? data, string? unreadable) = hasSummary ? Data("summary", "block_id", part.Id) : (null, "It is missing.");
        if ((data is null ? unreadable : BlockExaminer.CompareSummary(data, series, hour)) is { } reason)
        {
            findings.Add(new TrailFinding(
                TrailCodes.SummaryDiffers, "summary", where, "data", "The summary for charts does not follow from the readings: " + reason,
                "Charts of this hour may be wrong; the sealed readings themselves are judged apart."));
        }
    }

    /// <summary>A source whose parts all bear another name inside was renamed in its table.</summary>
    private void ReportSources(Dictionary<long, SourceKey> sources)
    {
        foreach ((long id, (_, long wrong, SourceKey inside)) in _named.Where(one => one.Value.Right == 0 && one.Value.Wrong > 0))
        {
            string named = sources.TryGetValue(id, out SourceKey key) ? key.ToString() : "nothing";
            Add(TrailCodes.BlockAltered, "source", FormattableString.Invariant($"{id}"), null, $"The row says {named}; every sealed part of it ({wrong}) says {inside}.");
        }
    }

    private (byte[]? Data, string? Unreadable) Data(string table, string key, long id)
    {
        try
        {
            return file.Data(table, key, id) is { } data ? (data, null) : (null, "There are no bytes.");
        }
        catch (UnreadableException exception)
        {
            return (null, exception.Message);
        }
    }

    private void Compare(string where, string column, long found, long expected)
    {
        if (found != expected)
        {
            Add(TrailCodes.BlockAltered, "block", where, column, FormattableString.Invariant($"The column says {found}; {expected} was sealed and recorded."));
        }
    }

    private void Report(string table, string? damage)
    {
        if (damage is not null)
        {
            findings.Add(Unreadable.Table(table, damage));
        }
    }

    private void Add(string code, string table, string id, string? field, string message) =>
        findings.Add(new TrailFinding(code, table, id, field, message, Altered));
}
