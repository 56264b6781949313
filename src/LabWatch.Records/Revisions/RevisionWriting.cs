using System.Text.Json.Nodes;
using LabWatch.Lab.LabFile;
using LabWatch.Lab.Time;
using LabWatch.Records.Audit;
using LabWatch.Records.Storage;
using LabWatch.Records.Storage.Rows;

namespace LabWatch.Records.Revisions;

/// <summary>What belongs to recording revisions, inside the caller's transaction.</summary>
internal static class RevisionWriting
{
    /// <summary>Adds revisions in their order.</summary>
    public static async Task AddAsync(RecordsContext context, IReadOnlyList<RecordRevision> revisions, CancellationToken cancellationToken)
    {
        foreach (RecordRevision revision in revisions)
        {
            RevisionRow row = ToRow(revision);
            context.Revisions.Add(row);
            JsonObject facts = new() { ["reason"] = revision.Reason, ["effectiveFrom"] = revision.EffectiveFrom.ToString() };
            if (revision.Import is { } import)
            {
                facts["import"] = import;
            }

            if (revision.IsWithdrawal)
            {
                facts["withdrawn"] = true;
            }

            await AuditChain.CoverAsync(
                context, row, new AuditNote(revision.Site, revision.RecordedAt, revision.Author, "record-revised", string.Empty, facts, null), cancellationToken);
        }
    }

    public static RecordRevision ToRevision(RevisionRow row) => new(
        row.Site, LabEntry.KindOf(row.Kind), row.Id, row.Revision, row.Sequence, new Instant(row.EffectiveFrom), row.Author, row.Reason, new Instant(row.RecordedAt),
        row.Content, row.Digest, row.Import);

    private static RevisionRow ToRow(RecordRevision revision) => new()
    {
        Site = revision.Site,
        Kind = LabEntry.NameOf(revision.Kind),
        Id = revision.Id,
        Revision = revision.Revision,
        Sequence = revision.Sequence,
        EffectiveFrom = revision.EffectiveFrom.Microseconds,
        Author = revision.Author,
        Reason = revision.Reason,
        RecordedAt = revision.RecordedAt.Microseconds,
        Content = revision.Content,
        Digest = revision.Digest,
        Import = revision.Import,
    };
}
