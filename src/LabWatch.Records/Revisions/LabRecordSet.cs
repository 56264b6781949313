using LabWatch.Lab.LabFile;
using LabWatch.Records.LabFiles;

namespace LabWatch.Records.Revisions;

/// <summary>All records of one site.</summary>
/// <param name="Site">Id of the site.</param>
/// <param name="Revisions">All revisions, in the order of recording.</param>
/// <param name="LatestImport">The lab file imported last; null before the first.</param>
public sealed record LabRecordSet(string Site, IReadOnlyList<RecordRevision> Revisions, LabImport? LatestImport)
{
    /// <summary>Number of the newest revision; 0 where there is none.</summary>
    public long Sequence => Revisions.Count == 0 ? 0 : Revisions[^1].Sequence;

    /// <summary>The document in force as UTF-8; null where nothing is on record.</summary>
    public byte[]? Compose() => Revisions.Count == 0 ? null : LabDocument.Write(LabComposition.Compose(Revisions, LatestImport?.Digest));
}
